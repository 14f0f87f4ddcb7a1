// @ts-check
import { createHash } from 'node:crypto';
import { readFileSync, realpathSync } from 'node:fs';
import net from 'node:net';
import { setTimeout as wait } from 'node:timers/promises';
import { isStopping } from './shutdown.mjs';

/**
 * Locks that a killed process cannot leave behind: each is a name in Linux's abstract socket namespace (unix(7)), which
 * the kernel frees with the process. There is no file, so nothing to grow stale. Whoever finds a name taken connects to
 * it and is told by whom. Elsewhere than on Linux there is no such namespace and no lock is taken; the private database
 * then still refuses a second server by its own locks.
 *
 * @typedef {{ readonly pid: number, readonly command: string, readonly stopping: boolean }} Holder
 * @typedef {{ readonly release: () => Promise<void> }} Lock
 */

const kernelHasNames = process.platform === 'linux';

/**
 * Names are padded to the full length of sun_path: Node 20 pads them with zeros, later ones do not pad, and the two
 * would otherwise not exclude each other.
 */
const fullLength = 107;

/**
 * @param {string} purpose
 * @param {string} folder what the lock is about; the same folder by any path is the same lock
 * @returns {string}
 */
function lockName(purpose, folder) {
  const place = createHash('sha256').update(realpathSync(folder)).digest('hex').slice(0, 32);
  return `ohmstead.${place}.${purpose}.`.padEnd(fullLength, '-');
}

/**
 * @param {string} name
 * @param {string} command
 * @returns {Promise<Lock | null>} null when another process has it
 */
function take(name, command) {
  return new Promise((resolve, reject) => {
    const server = net.createServer((asker) => {
      asker.on('error', () => {});
      asker.end(JSON.stringify({ pid: process.pid, command, stopping: isStopping() }));
    });
    server.once('error', (error) => {
      if (/** @type {NodeJS.ErrnoException} */ (error).code === 'EADDRINUSE') resolve(null);
      else reject(error);
    });
    server.listen({ path: `\0${name}` }, () => {
      server.unref();
      resolve({ release: () => new Promise((done) => server.close(() => done())) });
    });
  });
}

/**
 * @param {string} name
 * @returns {Promise<Holder | null>} null when nobody has it, or its holder does not say who it is
 */
function askHolder(name) {
  return new Promise((resolve) => {
    let text = '';
    const socket = net.connect({ path: `\0${name}` });
    socket.setTimeout(2000, () => socket.destroy());
    socket.setEncoding('utf8');
    socket.on('data', (part) => (text += part));
    socket.on('error', () => {});
    socket.on('close', () => {
      try {
        resolve(JSON.parse(text));
      } catch {
        resolve(null);
      }
    });
  });
}

/**
 * Takes a lock, waiting for one that its holder is about to give back.
 *
 * @param {string} purpose
 * @param {string} folder
 * @param {object} how
 * @param {string} how.command what the person started, such as 'npm start'
 * @param {number} how.waitMs how long to wait for a holder that is not stopping
 * @param {number} [how.stoppingWaitMs] how long for one that is
 * @param {(holder: Holder) => void} [how.onWait] called once, when there is something to wait for
 * @returns {Promise<{ readonly lock: Lock } | { readonly holder: Holder | null }>}
 */
export async function takeLock(purpose, folder, { command, waitMs, stoppingWaitMs = 30_000, onWait }) {
  if (!kernelHasNames) return { lock: { release: async () => {} } };
  const name = lockName(purpose, folder);
  const start = performance.now();
  let told = false;
  for (;;) {
    const lock = await take(name, command);
    if (lock !== null) return { lock };
    const holder = await askHolder(name);
    const waited = performance.now() - start;
    if (waited > (holder?.stopping === true ? Math.max(stoppingWaitMs, waitMs) : waitMs)) return { holder };
    if (!told && holder !== null) {
      told = true;
      onWait?.(holder);
    }
    await wait(100);
  }
}

/**
 * Says to other processes that this one uses something which may be shared, until it ends.
 *
 * @param {string} purpose
 * @param {string} folder
 * @param {string} command
 */
export async function markInUse(purpose, folder, command) {
  if (kernelHasNames) await take(lockName(`${purpose}.${process.pid}`, folder), command);
}

/**
 * The other processes that said so.
 *
 * @param {string} purpose
 * @param {string} folder
 * @returns {readonly number[]} their process numbers
 */
export function usersOf(purpose, folder) {
  if (!kernelHasNames) return [];
  const prefix = lockName(purpose, folder).replace(/-*$/, '');
  const pids = [];
  for (const line of readFileSync('/proc/net/unix', 'utf8').split('\n')) {
    const at = line.indexOf(`@${prefix}`);
    const pid = at < 0 ? NaN : Number.parseInt(line.slice(at + 1 + prefix.length), 10);
    if (Number.isInteger(pid) && pid !== process.pid) pids.push(pid);
  }
  return [...new Set(pids)];
}
