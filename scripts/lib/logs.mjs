// @ts-check
import { closeSync, existsSync, fstatSync, openSync, readSync, renameSync, rmSync, statSync } from 'node:fs';

/** A log larger than this is put aside at the next start; one older is kept. */
const largestLog = 8 * 1024 * 1024;

/** @param {string} file */
export function rotate(file) {
  if (!existsSync(file) || statSync(file).size < largestLog) return;
  rmSync(`${file}.1`, { force: true });
  renameSync(file, `${file}.1`);
}

/**
 * @param {string} file
 * @returns {number} its size in bytes, 0 when there is none
 */
export function sizeOf(file) {
  return existsSync(file) ? statSync(file).size : 0;
}

/**
 * The end of a file, at most 64 KiB of it.
 *
 * @param {string} file
 * @param {number} [from] byte from which on it is wanted
 * @returns {string}
 */
export function tailOf(file, from = 0) {
  if (!existsSync(file)) return '';
  const handle = openSync(file, 'r');
  try {
    const { size } = fstatSync(handle);
    const start = Math.max(from > size ? 0 : from, size - 65_536);
    const bytes = Buffer.alloc(size - start);
    readSync(handle, bytes, 0, bytes.length, start);
    return bytes.toString('utf8');
  } finally {
    closeSync(handle);
  }
}
