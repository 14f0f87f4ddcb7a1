// @ts-check
import { closeSync, mkdirSync, openSync, rmSync, writeFileSync } from 'node:fs';
import { setTimeout as wait } from 'node:timers/promises';
import { nextProgram } from './build.mjs';
import { rotate, sizeOf, tailOf } from './logs.mjs';
import { root, shown } from './paths.mjs';
import { ended, launch, signalGroup, stopChild } from './processes.mjs';
import { Failure, say } from './say.mjs';
import { isStopping, stopLater } from './shutdown.mjs';

/** @typedef {import('./paths.mjs').Layout} Layout */

/** Requests that are under way may end; a browser's open connection must not hold up a stop for longer. */
const stopGraceMs = 5000;

/**
 * The host at which this machine reaches a server that listens on `host`.
 *
 * @param {string} host
 */
function reachableHost(host) {
  if (host === '0.0.0.0' || host === 'localhost') return '127.0.0.1';
  if (host === '::') return '[::1]';
  return host.includes(':') ? `[${host}]` : host;
}

/**
 * The address to give to a person.
 *
 * @param {string} host
 * @param {number} port
 */
export function addressOf(host, port) {
  const everyday = ['127.0.0.1', 'localhost', '0.0.0.0', '::', '::1'].includes(host);
  return `http://${everyday ? 'localhost' : reachableHost(host)}:${port}`;
}

/**
 * The environment of everything that is the application: its server, its migrations, its tests.
 *
 * @param {object} what
 * @param {import('./processes.mjs').Environment} what.env of this process and `.env`
 * @param {'production' | 'development'} what.mode
 * @param {string} what.host
 * @param {number} what.port
 * @param {string} what.databaseUrl
 * @param {string} what.authSecret taken unless the person set one
 * @returns {import('./processes.mjs').Environment}
 */
export function applicationEnvironment({ env, mode, host, port, databaseUrl, authSecret }) {
  return {
    ...env,
    NODE_ENV: mode,
    NEXT_TELEMETRY_DISABLED: '1',
    HOST: host,
    PORT: String(port),
    DATABASE_URL: databaseUrl,
    NEXTAUTH_SECRET: env.NEXTAUTH_SECRET ?? authSecret,
    NEXTAUTH_URL: env.NEXTAUTH_URL ?? addressOf(host, port),
  };
}

/**
 * Starts the web server and waits until /api/health says that the database answers too.
 *
 * @param {object} what
 * @param {'start' | 'dev'} what.mode
 * @param {string} what.host
 * @param {number} what.port
 * @param {import('./processes.mjs').Environment} what.env
 * @param {Layout} what.layout
 * @returns {Promise<import('./supervise.mjs').Server>}
 */
export async function startWeb({ mode, host, port, env, layout }) {
  mkdirSync(layout.logs, { recursive: true, mode: 0o700 });
  rotate(layout.webLog);
  const logStart = sizeOf(layout.webLog);
  // A developer wants to see what the development server says; in production it is the log's.
  const log = mode === 'dev' ? null : openSync(layout.webLog, 'a', 0o600);
  const child = launch(process.execPath, [nextProgram, mode, '-H', host, '-p', String(port)], {
    cwd: root,
    env,
    stdio: ['ignore', log ?? 'inherit', log ?? 'inherit'],
    // The production server has nothing to put in order; killed at once, it leaves its port for the next run.
    deathSignal: mode === 'dev' ? 'TERM' : 'KILL',
  });
  if (log !== null) closeSync(log);
  writeFileSync(layout.webPid, `${child.pid}\n`);
  const exited = ended(child);
  const server = {
    exited,
    stop: async () => {
      await stopChild(child, stopGraceMs);
      rmSync(layout.webPid, { force: true });
    },
    kill: () => signalGroup(child.pid, 'SIGKILL'),
  };
  const forget = stopLater(server);
  const trouble = await waitForHealth(`http://${reachableHost(host)}:${port}/api/health`, exited, mode === 'dev' ? 30_000 : 120_000);
  forget();
  if (trouble === null) return server;
  const runs = child.exitCode === null && child.signalCode === null;
  if (runs && mode === 'dev' && !isStopping()) {
    // What is wrong is in the developer's own hands, and the server will see when it is mended.
    say(`✗ The development server runs, but ${trouble}.`);
    return server;
  }
  await server.stop();
  if (runs) throw new Failure(`The web server runs, but ${trouble} (its log is ${shown(layout.webLog)}).`);
  throw new Failure(endedSentence(tailOf(layout.webLog, logStart), port, shown(layout.webLog)));
}

/**
 * @param {string} text what the server printed
 * @param {number} port
 * @param {string} log
 */
export function endedSentence(text, port, log) {
  if (text.includes('EADDRINUSE')) return `Port ${port} was taken by another program meanwhile; stop that one, or choose another with PORT.`;
  const line = text.split('\n').map((part) => part.trim()).findLast((part) => /error|⨯/i.test(part));
  return `The web server ended while starting: ${line ?? 'it gave no reason'} (its log is ${log}).`;
}

/**
 * @param {string} url
 * @param {Promise<unknown>} exited
 * @param {number} withinMs
 * @returns {Promise<string | null>} null when it is well, otherwise what is wrong
 */
async function waitForHealth(url, exited, withinMs) {
  let over = false;
  void exited.then(() => (over = true));
  const until = performance.now() + withinMs;
  let trouble = `nothing answered within ${withinMs / 1000} seconds`;
  while (performance.now() < until && !over) {
    try {
      const answer = await fetch(url, { signal: AbortSignal.timeout(30_000), redirect: 'manual' });
      await answer.arrayBuffer();
      if (answer.status === 200) return null;
      trouble = `/api/health answers with status ${answer.status}`;
    } catch {
      // Not listening yet.
    }
    await wait(40);
  }
  return over ? 'it ended' : trouble;
}
