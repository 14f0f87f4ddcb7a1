// @ts-check
import { readFileSync } from 'node:fs';
import net from 'node:net';
import { Failure } from './say.mjs';

/**
 * Whether a server could listen there now.
 *
 * @param {string} host
 * @param {number} port
 * @returns {Promise<'free' | 'taken' | 'forbidden' | 'no such host'>}
 */
export function portState(host, port) {
  return new Promise((resolve, reject) => {
    const server = net.createServer();
    server.once('error', (error) => {
      switch (/** @type {NodeJS.ErrnoException} */ (error).code) {
        case 'EADDRINUSE':
          return resolve('taken');
        case 'EACCES':
          return resolve('forbidden');
        case 'EADDRNOTAVAIL':
        case 'ENOTFOUND':
        case 'EAI_AGAIN':
          return resolve('no such host');
        default:
          return reject(error);
      }
    });
    server.listen({ host, port, exclusive: true }, () => server.close(() => resolve('free')));
  });
}

/**
 * Whether something answers there. A program that listens on ::1 alone leaves 127.0.0.1 free to bind, and a browser
 * that is sent to localhost reaches that program instead.
 *
 * @param {string} host
 * @param {number} port
 * @returns {Promise<boolean>}
 */
function answers(host, port) {
  return new Promise((resolve) => {
    const socket = net.connect({ host, port });
    socket.setTimeout(1000, () => socket.destroy());
    socket.once('connect', () => {
      socket.destroy();
      resolve(true);
    });
    socket.once('error', () => resolve(false));
    socket.once('close', () => resolve(false));
  });
}

/**
 * The sentence for a port that cannot be had.
 *
 * @param {number} port
 * @param {number} other one to offer
 * @param {string} command what the person started, such as 'npm start'
 */
export function takenPortSentence(port, other, command) {
  return `Port ${port} is taken by another program; stop that one, or choose another port: PORT=${other} ${command}`;
}

/**
 * Makes sure, before anything long is done, that the web server will get its port.
 *
 * @param {string} host
 * @param {number} port
 * @param {string} command
 */
export async function requirePort(host, port, command) {
  const state = await portState(host, port);
  if (state === 'no such host') {
    throw new Failure(`HOST=${host} is no address of this machine; use 127.0.0.1 for this machine only, or 0.0.0.0 for all.`);
  }
  if (state === 'forbidden') {
    throw new Failure(`This account may not serve on port ${port}; choose one above 1023, such as PORT=3000 ${command}`);
  }
  const local = host === '127.0.0.1' || host === 'localhost';
  if (state === 'taken' || (local && (await answers('::1', port)))) {
    throw new Failure(takenPortSentence(port, await freePort(host, Math.min(port + 1, 65_535)), command));
  }
}

/**
 * A free port: the first of the hundred from `preferred` on, else one that the system gives.
 *
 * @param {string} host
 * @param {number} preferred
 * @param {ReadonlySet<number>} [not] ports that proved taken after all
 * @returns {Promise<number>}
 */
export async function freePort(host, preferred, not = new Set()) {
  for (let port = preferred; port < Math.min(preferred + 100, 65_536); port += 1) {
    if (!not.has(port) && (await portState(host, port)) === 'free') return port;
  }
  return new Promise((resolve, reject) => {
    const server = net.createServer();
    server.once('error', reject);
    server.listen({ host, port: 0 }, () => {
      const address = server.address();
      server.close(() => resolve(typeof address === 'object' && address !== null ? address.port : 0));
    });
  });
}

/**
 * A port number in a file, or null when it holds none.
 *
 * @param {string} file
 * @returns {number | null}
 */
export function rememberedPort(file) {
  try {
    const port = Number(readFileSync(file, 'utf8').trim());
    return Number.isInteger(port) && port > 0 && port < 65_536 ? port : null;
  } catch {
    return null;
  }
}
