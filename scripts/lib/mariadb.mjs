// @ts-check
import {
  closeSync,
  createReadStream,
  existsSync,
  mkdirSync,
  openSync,
  readdirSync,
  renameSync,
  rmSync,
  statfsSync,
  writeFileSync,
} from 'node:fs';
import net from 'node:net';
import os from 'node:os';
import path from 'node:path';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { setTimeout as wait } from 'node:timers/promises';
import { rotate, sizeOf, tailOf } from './logs.mjs';
import { diskFull, reasonIn } from './mariadb-log.mjs';
import { mariadbServer, systemTableFiles } from './mariadb-programs.mjs';
import { shown } from './paths.mjs';
import { freePort, rememberedPort } from './ports.mjs';
import { ended, launch, livePidIn, signalGroup, stopChild, stopPid } from './processes.mjs';
import { Failure } from './say.mjs';
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
 * A clean stop writes the changed pages and takes two seconds here; what is killed instead loses nothing (InnoDB
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

/** The options that hold for making the data directory and for serving it. */
const sizes = ['--innodb-buffer-pool-size=128M', '--innodb-log-file-size=32M'];

/** MariaDB refuses to run as root unless told to; any other account it runs as is its own. */
const asRoot = () => (process.getuid?.() === 0 ? ['--user=root'] : []);

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
 * @throws {Failure} with the reason in one sentence when it cannot be started
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
 * @param {string} clause
 * @param {Layout} layout
 */
function cannotStart(clause, layout) {
  return new Failure(`MariaDB could not be started: ${clause} (its log is ${shown(layout.databaseLog)}).`);
}

/**
 * @param {Layout} layout
 * @param {number} logStart size of the log before the attempt
 * @returns {ReturnType<typeof reasonIn>}
 */
function reasonFor(layout, logStart) {
  const reason = reasonIn(tailOf(layout.databaseLog, logStart));
  const { bavail, bsize } = statfsSync(layout.dir);
  // The log lies on the same disk, and a full one has no room for the line that would say so.
  const full = bavail * bsize < 4_000_000;
  return reason.kind === 'other' && full ? { kind: 'other', clause: diskFull } : reason;
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
 * Makes the data directory when there is none, beside its place and moved there when whole, so that a run that was
 * killed half-way leaves nothing that looks like one. The server is fed Debian's own SQL files directly: the script
 * that would do it breaks on spaces in paths and, as root, changes the owner of files of the system's MariaDB.
 *
 * @param {string} server
 * @param {Layout} layout
 * @returns {Promise<boolean>} whether it was made now
 */
async function makeDataDirectory(server, layout) {
  if (existsSync(path.join(layout.data, 'mysql'))) return false;
  if (existsSync(layout.data) && readdirSync(layout.data).length > 0) {
    throw new Failure(`${shown(layout.data)} is there but is no data directory of MariaDB's; move it away and run this again.`);
  }
  const unfinished = `${layout.data}.unfinished`;
  rmSync(unfinished, { recursive: true, force: true });
  mkdirSync(unfinished, { recursive: true, mode: 0o700 });

  const logStart = sizeOf(layout.databaseLog);
  const log = openSync(layout.databaseLog, 'a', 0o600);
  const child = launch(
    server,
    [
      '--no-defaults',
      '--bootstrap',
      ...asRoot(),
      `--datadir=${unfinished}`,
      ...sizes,
      '--log-warnings=0',
      '--enforce-storage-engine=',
      '--max-allowed-packet=8M',
      '--net-buffer-length=16K',
    ],
    { cwd: layout.dir, env: process.env, stdio: ['pipe', log, log], deathSignal: 'KILL' },
  );
  closeSync(log);
  const end = ended(child);
  if (child.stdin !== null) {
    // A server that ends early closes its end; the reason is in its log and not in this error.
    await pipeline(Readable.from(bootstrapText()), child.stdin).catch(() => {});
  }
  const { code } = await end;
  if (code !== 0) {
    rmSync(unfinished, { recursive: true, force: true });
    const reason = reasonFor(layout, logStart);
    throw cannotStart(reason.kind === 'other' ? reason.clause : 'its port was taken', layout);
  }
  rmSync(layout.data, { recursive: true, force: true });
  renameSync(unfinished, layout.data);
  return true;
}

async function* bootstrapText() {
  yield 'create database if not exists mysql;\nuse mysql;\n';
  // The server's own administrator is this system account over the socket, without a password that could leak.
  yield `set @auth_root_socket='${systemAccount()}';\n`;
  for (const file of systemTableFiles()) {
    yield* createReadStream(file);
    yield '\n';
  }
}

function systemAccount() {
  try {
    return os.userInfo().username.replace(/[^\w.-]/g, '');
  } catch {
    // An account number without a name, as in some containers; nobody then administers by the socket.
    return 'root';
  }
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
 * @returns {Promise<{ kind: 'runs', child: ChildProcess } | ReturnType<typeof reasonIn>>}
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
