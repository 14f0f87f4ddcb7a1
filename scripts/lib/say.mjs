// @ts-check
import { isStopping } from './shutdown.mjs';

/** A failure that was foreseen: its message is the one sentence that the person reads. */
export class Failure extends Error {
  /** @override */
  name = 'Failure';
}

/** @type {NodeJS.WriteStream} */
let out = process.stdout;

/** Sends what is said to standard error, for a command whose standard output is data. */
export function sayOnStandardError() {
  out = process.stderr;
}

// A reader that went away (`npm start | head`) must not take the servers down unstopped.
for (const stream of [process.stdout, process.stderr]) stream.on('error', () => {});

/** @param {string} [text] */
export function say(text = '') {
  out.write(`${text}\n`);
}

/**
 * A time as a person reads it: tenths of a second, from a minute on minutes and seconds.
 *
 * @param {number} milliseconds
 */
export function duration(milliseconds) {
  const seconds = milliseconds / 1000;
  if (seconds < 59.95) return `${seconds.toFixed(1)} s`;
  const whole = Math.round(seconds);
  return `${Math.floor(whole / 60)} min ${whole % 60} s`;
}

/**
 * Says what is being done, does it, and says that it is done and how long it took.
 *
 * @template T
 * @param {string} doing such as 'Starting the database'
 * @param {() => Promise<T>} work
 * @param {(result: T) => string} done such as 'The database answers'
 * @returns {Promise<T>}
 */
export async function step(doing, work, done) {
  const start = performance.now();
  say(`· ${doing} …`);
  const result = await work();
  say(`✓ ${done(result)} (${duration(performance.now() - start)})`);
  return result;
}

/**
 * The sentence for any error: its own for a foreseen one, the usual causes in words, and the bare message with the
 * way to the whole for the rest.
 *
 * @param {unknown} error
 * @returns {string}
 */
export function sentenceOf(error) {
  if (error instanceof Failure) return error.message;
  const { code, path: where, message } = /** @type {NodeJS.ErrnoException} */ (
    error instanceof Error ? error : new Error(String(error))
  );
  const at = where === undefined ? '' : ` (at ${where})`;
  switch (code) {
    case 'ENOSPC':
    case 'EDQUOT':
      return `The disk is full${at}; free some space and run this again.`;
    case 'EACCES':
    case 'EPERM':
      return `This account may not write what it has to${at}; run as the account that owns the project folder.`;
    case 'EROFS':
      return `The project folder cannot be written${at}; copy the project to a disk that can be.`;
    default:
      return `Something unforeseen stopped this: ${message} (OHMSTEAD_DEBUG=1 shows where).`;
  }
}

/**
 * Says why a command ends early. Nothing is said while the person is stopping it: what fails then fails because of that.
 *
 * @param {unknown} error
 */
export function sayFailure(error) {
  if (isStopping()) return;
  process.stderr.write(`✗ ${sentenceOf(error)}\n`);
  if (process.env.OHMSTEAD_DEBUG === '1' && error instanceof Error) process.stderr.write(`${error.stack}\n`);
}
