// @ts-check
import { closeSync, createReadStream, existsSync, mkdirSync, openSync, readdirSync, renameSync, rmSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { sizeOf } from './logs.mjs';
import { cannotStart, reasonFor } from './mariadb-log.mjs';
import { systemTableFiles } from './mariadb-programs.mjs';
import { shown } from './paths.mjs';
import { ended, launch } from './processes.mjs';
import { Failure } from './say.mjs';

/** @typedef {import('./paths.mjs').Layout} Layout */

/** MariaDB refuses to run as root unless told to; any other account it runs as is its own. */
export const asRoot = () => (process.getuid?.() === 0 ? ['--user=root'] : []);

/** The options that hold for making the data directory and for serving it. */
export const sizes = ['--innodb-buffer-pool-size=128M', '--innodb-log-file-size=32M'];

/**
 * Makes the data directory when there is none, beside its place and moved there when whole, so that a run that was
 * killed half-way leaves nothing that looks like one. The server is fed Debian's own SQL files directly: the script
 * that would do it breaks on spaces in paths and, as root, changes the owner of files of the system's MariaDB.
 *
 * @param {string} server
 * @param {Layout} layout
 * @returns {Promise<boolean>} whether it was made now
 */
export async function makeDataDirectory(server, layout) {
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
