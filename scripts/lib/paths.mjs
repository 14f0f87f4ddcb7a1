// @ts-check
import { createHash } from 'node:crypto';
import os from 'node:os';
import path from 'node:path';
import { fileURLToPath } from 'node:url';

/** The project's root folder. */
export const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '../..');

/** The longest path, in bytes, that the kernel takes as the name of a local socket (sun_path less its zero). */
const longestSocketPath = 107;

/**
 * Everything that a run keeps, by name. All of it stands in one folder, so that a run with a folder of its own
 * (the tests', the benches') can never touch another's data.
 *
 * @typedef {object} Layout
 * @property {string} dir the state folder itself
 * @property {string} data MariaDB's data directory
 * @property {string} socket MariaDB's local socket
 * @property {string} databasePid the file in which MariaDB writes its process number
 * @property {string} databasePort the file that remembers MariaDB's port
 * @property {string} databaseLog MariaDB's error log
 * @property {string} webPid the file with the web server's process number
 * @property {string} webLog what the web server prints
 * @property {string} secrets the generated secrets
 * @property {string} logs the folder of logs
 */

/**
 * @param {string} dir absolute path of the state folder
 * @param {string} [temporary] where a socket goes whose path in the state folder would be too long
 * @returns {Layout}
 */
export function layoutOf(dir, temporary = os.tmpdir()) {
  const logs = path.join(dir, 'logs');
  return {
    dir,
    data: path.join(dir, 'db'),
    socket: socketPath(dir, temporary),
    databasePid: path.join(dir, 'db.pid'),
    databasePort: path.join(dir, 'db.port'),
    databaseLog: path.join(logs, 'mariadb.log'),
    webPid: path.join(dir, 'web.pid'),
    webLog: path.join(logs, 'web.log'),
    secrets: path.join(dir, 'secrets.json'),
    logs,
  };
}

/**
 * @param {string} dir
 * @param {string} temporary
 */
function socketPath(dir, temporary) {
  const inside = path.join(dir, 'db.sock');
  if (Buffer.byteLength(inside) <= longestSocketPath) return inside;
  const name = createHash('sha256').update(inside).digest('hex').slice(0, 24);
  return path.join(temporary, `ohmstead-${name}.sock`);
}

/**
 * A path as a person wants to read it: from the project's root where it lies inside it.
 *
 * @param {string} file
 */
export function shown(file) {
  const relative = path.relative(root, file);
  return relative.startsWith('..') || path.isAbsolute(relative) ? file : relative || '.';
}
