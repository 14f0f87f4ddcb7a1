// @ts-check
import { closeSync, mkdirSync, openSync } from 'node:fs';
import path from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { tailOf } from './logs.mjs';
import { npmCommand } from './packages.mjs';
import { root } from './paths.mjs';
import { freePort } from './ports.mjs';
import { ended, launch, signalGroup, stopChild } from './processes.mjs';
import { Failure } from './say.mjs';
import { stopLater } from './shutdown.mjs';

/** A first start makes a database and may wait for other work; no start takes this long. */
const withinMs = 10 * 60_000;

/**
 * The time that a person waits at a second `npm start`: from giving the command until the application answers a
 * request, with packages, database and build as the first start left them. Both starts are real ones, in a state folder
 * of their own, so that neither touches the person's data.
 *
 * @param {object} what
 * @param {string} what.stateDir
 * @param {Readonly<Record<string, string | undefined>>} what.env
 * @returns {Promise<number>} seconds
 */
export async function measureSecondStart({ stateDir, env }) {
  const port = await freePort('127.0.0.1', 3200);
  await timeOfStart({ stateDir, env, port });
  return timeOfStart({ stateDir, env, port });
}

/**
 * @param {{ stateDir: string, env: Readonly<Record<string, string | undefined>>, port: number }} what
 * @returns {Promise<number>} seconds
 */
async function timeOfStart({ stateDir, env, port }) {
  mkdirSync(stateDir, { recursive: true, mode: 0o700 });
  const log = path.join(stateDir, 'start.log');
  const handle = openSync(log, 'w');
  const [program, ...first] = npmCommand();
  const start = performance.now();
  const child = launch(program, [...first, 'start'], {
    cwd: root,
    env: { ...env, OHMSTEAD_STATE: stateDir, PORT: String(port), HOST: '', NEXTAUTH_URL: '' },
    stdio: ['ignore', handle, handle],
  });
  closeSync(handle);
  const stop = () => stopChild(child, 20_000);
  const forget = stopLater({ stop, kill: () => signalGroup(child.pid, 'SIGKILL') });
  try {
    let over = false;
    void ended(child).then(() => (over = true));
    while (!(await answers(`http://localhost:${port}/api/health`))) {
      if (over) throw new Failure(`npm start ended before it served: ${tailOf(log).trim().split('\n').at(-1)}`);
      if (performance.now() - start > withinMs) throw new Failure('npm start did not serve within ten minutes.');
      await wait(20);
    }
    return (performance.now() - start) / 1000;
  } finally {
    await stop();
    forget();
  }
}

/** @param {string} url */
async function answers(url) {
  try {
    return (await fetch(url, { signal: AbortSignal.timeout(30_000) })).ok;
  } catch {
    return false;
  }
}
