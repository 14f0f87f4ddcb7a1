// @ts-check
import { closeSync, mkdirSync, openSync, rmSync, writeFileSync } from 'node:fs';
import net from 'node:net';
import path from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { rotate, sizeOf } from './logs.mjs';
import { asRoot, makeDataDirectory, sizes } from './mariadb-data.mjs';
import { cannotStart, reasonFor } from './mariadb-log.mjs';
import { mariadbServer } from './mariadb-programs.mjs';
import { freePort, rememberedPort } from './ports.mjs';
import { ended, launch, livePidIn, signalGroup, stopChild, stopPid } from './processes.mjs';
import { stopLater } from './shutdown.mjs';

/** @typedef {import('./paths.mjs').Layout} Layout */
/** @typedef {import('./processes.mjs').ChildProcess} ChildProcess */

/**
 * A private MariaDB server that runs.
 *
 * @typedef {object} PrivateMariadb
 * @property {number} port on 127.0.0.1
 * @property {number} pid
 * @property {boolean} isNew whether its data directory was made by this start
 * @property {(database: string) => string} url the address for the application's account
 * @property {Promise<import('./processes.mjs').Ending>} exited
 * @property {() => Promise<void>} stop orderly, killed after ten seconds
 * @property {() => void} kill
 */

/** The account that the application connects as; with --skip-name-resolve its host has to be the number. */
const account = { name: 'app', host: '127.0.0.1' };

/**
 * A clean stop writes the changed pages, mostly in less than a second; what is killed instead loses nothing (InnoDB
 * recovers it at the next start), so waiting longer than this helps nobody.
 */
const stopGraceMs = 10_000;

/** Recovery after a hard kill reads the whole redo log, which can take long on a slow disk. */
const readyWithinMs = 120_000;

const strictMode = [
  'STRICT_ALL_TABLES',
  'NO_ZERO_IN_DATE',
  'NO_ZERO_DATE',
  'ERROR_FOR_DIVISION_BY_ZERO',
  'NO_AUTO_CREATE_USER',
  'NO_ENGINE_SUBSTITUTION',
].join(',');

/**
 * Starts the private server of a state folder on loopback, with its own data directory, socket and account; makes what
 * is not there yet. Nobody else may be doing the same for that folder: the caller holds its lock.
 *
 * @param {object} wanted
 * @param {Layout} wanted.layout
 * @param {string} wanted.password of the application's account; letters and digits only
 * @param {readonly string[]} wanted.databases made when they are missing, all of them the account's
 * @param {number} wanted.preferredPort
 * @returns {Promise<PrivateMariadb>}
 * @throws {import('./say.mjs').Failure} with the reason in one sentence when it cannot be started
 */
export async function startMariadb({ layout, password, databases, preferredPort }) {
  const server = mariadbServer();
  mkdirSync(layout.logs, { recursive: true, mode: 0o700 });
  rotate(layout.databaseLog);
  await endForerunner(server, layout);
  const isNew = await makeDataDirectory(server, layout);

  const refused = new Set();
  for (let attempt = 0; attempt < 5; attempt += 1) {
    const port = await choosePort(layout, preferredPort, refused);
    const outcome = await tryStart(server, layout, port, openingStatements(databases, password));
    if (outcome.kind === 'runs') {
      writeFileSync(layout.databasePort, `${port}\n`);
      const { child } = outcome;
      return {
        port,
        pid: child.pid ?? 0,
        isNew,
        url: (database) => `mariadb://${account.name}:${password}@${account.host}:${port}/${database}`,
        exited: ended(child),
        stop: () => stopChild(child, stopGraceMs),
        kill: () => signalGroup(child.pid, 'SIGKILL'),
      };
    }
    if (outcome.kind === 'other') throw cannotStart(outcome.clause, layout);
    refused.add(port);
  }
  throw cannotStart('every port that was tried was taken by another program', layout);
}

/**
 * A server of this data directory whose starter was killed is shutting down by itself, or, where the kernel did not
 * tell it, still runs. It is waited for, then ended; a process number that now belongs to something else is left alone.
 *
 * @param {string} server
 * @param {Layout} layout
 */
async function endForerunner(server, layout) {
  const identity = { name: path.basename(server), commandIncludes: `--datadir=${layout.data}` };
  const pid = livePidIn(layout.databasePid, identity);
  if (pid !== null) await stopPid(pid, stopGraceMs);
  rmSync(layout.databasePid, { force: true });
}

/**
 * What the server does at every start before it lets anyone in. The password is set each time, so that losing the
 * secrets file costs nothing.
 *
 * @param {readonly string[]} databases
 * @param {string} password
 * @returns {string} one statement a line, as --init-file wants it
 */
function openingStatements(databases, password) {
  const who = `'${account.name}'@'${account.host}'`;
  return [
    ...databases.map(
      (name) => `CREATE DATABASE IF NOT EXISTS \`${name}\` CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci;`,
    ),
    `CREATE USER IF NOT EXISTS ${who} IDENTIFIED BY '${password}';`,
    `ALTER USER ${who} IDENTIFIED BY '${password}';`,
    ...databases.map((name) => `GRANT ALL PRIVILEGES ON \`${name.replace(/_/g, '\\_')}\`.* TO ${who};`),
    '',
  ].join('\n');
}

/**
 * @param {Layout} layout
 * @param {number} preferred
 * @param {ReadonlySet<number>} refused
 */
async function choosePort(layout, preferred, refused) {
  const remembered = rememberedPort(layout.databasePort);
  if (remembered !== null && !refused.has(remembered)) {
    const again = await freePort(account.host, remembered);
    if (again === remembered) return again;
  }
  return freePort(account.host, preferred, refused);
}

/**
 * @param {string} server
 * @param {Layout} layout
 * @param {number} port
 * @param {string} statements
 * @returns {Promise<{ kind: 'runs', child: ChildProcess } | ReturnType<typeof reasonFor>>}
 */
async function tryStart(server, layout, port, statements) {
  const opening = path.join(layout.dir, 'db.opening.sql');
  writeFileSync(opening, statements, { mode: 0o600 });
  rmSync(layout.socket, { force: true });
  const logStart = sizeOf(layout.databaseLog);
  const log = openSync(layout.databaseLog, 'a', 0o600);
  const child = launch(
    server,
    [
      '--no-defaults',
      ...asRoot(),
      `--datadir=${layout.data}`,
      `--socket=${layout.socket}`,
      `--pid-file=${layout.databasePid}`,
      `--log-error=${layout.databaseLog}`,
      `--init-file=${opening}`,
      `--bind-address=${account.host}`,
      `--port=${port}`,
      '--skip-name-resolve',
      '--skip-log-bin',
      '--character-set-server=utf8mb4',
      '--collation-server=utf8mb4_unicode_ci',
      '--default-time-zone=+00:00',
      `--sql-mode=${strictMode}`,
      ...sizes,
      '--max-allowed-packet=64M',
      '--performance-schema=OFF',
    ],
    { cwd: layout.dir, env: process.env, stdio: ['ignore', log, log] },
  );
  closeSync(log);
  const end = ended(child);
  const forget = stopLater({ stop: () => stopChild(child, stopGraceMs), kill: () => signalGroup(child.pid, 'SIGKILL') });
  try {
    const ready = await becomesReady(layout.socket, end);
    if (ready) return { kind: 'runs', child };
    if (child.exitCode === null && child.signalCode === null) {
      await stopChild(child, stopGraceMs);
      return { kind: 'other', clause: `it did not answer within ${readyWithinMs / 1000} seconds` };
    }
    return reasonFor(layout, logStart);
  } finally {
    forget();
    rmSync(opening, { force: true });
  }
}

/**
 * Waits until the server greets on its socket, which it does only when it has recovered and has done its opening
 * statements. The socket and not the port is asked, because behind the port could be another server.
 *
 * @param {string} socket
 * @param {Promise<unknown>} end
 * @returns {Promise<boolean>} false when it ended, or time is over
 */
async function becomesReady(socket, end) {
  let over = false;
  void end.then(() => (over = true));
  const until = performance.now() + readyWithinMs;
  while (performance.now() < until) {
    if (over) return false;
    if (await greets(socket)) return true;
    await wait(30);
  }
  return false;
}

/**
 * @param {string} socket
 * @returns {Promise<boolean>} whether a server sent its greeting: a packet whose first byte is protocol version 10
 */
function greets(socket) {
  return new Promise((resolve) => {
    const connection = net.connect({ path: socket });
    connection.setTimeout(1000, () => connection.destroy());
    connection.once('data', (bytes) => {
      connection.destroy();
      resolve(bytes[4] === 10);
    });
    connection.once('error', () => resolve(false));
    connection.once('close', () => resolve(false));
  });
}
