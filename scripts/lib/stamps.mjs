// @ts-check
import { createHash } from 'node:crypto';
import { existsSync, readFileSync, readdirSync, statSync } from 'node:fs';
import path from 'node:path';

/**
 * A hash over names and contents of files, the same wherever the project lies and whenever they were written.
 *
 * @param {string} base
 * @param {readonly string[]} entries files and folders under `base`; what is not there counts as not there
 * @param {(relative: string) => boolean} [leaveOut]
 * @returns {string} 64 hexadecimal digits
 */
export function hashOf(base, entries, leaveOut = () => false) {
  const hash = createHash('sha256');
  for (const file of entries.flatMap((entry) => filesUnder(base, entry, leaveOut)).sort()) {
    const content = readFileSync(path.join(base, file));
    hash.update(`${file}\0${content.length}\0`).update(content);
  }
  return hash.digest('hex');
}

/**
 * @param {string} base
 * @param {string} relative
 * @param {(relative: string) => boolean} leaveOut
 * @returns {string[]} paths from `base`, with forward slashes
 */
function filesUnder(base, relative, leaveOut) {
  const file = path.join(base, relative);
  if (leaveOut(relative) || !existsSync(file)) return [];
  const stat = statSync(file);
  if (stat.isFile()) return [relative];
  if (!stat.isDirectory()) return [];
  return readdirSync(file).flatMap((name) => filesUnder(base, relative === '.' ? name : `${relative}/${name}`, leaveOut));
}

/**
 * @param {string} file
 * @returns {string | null} what the stamp says, null when there is none
 */
export function readStamp(file) {
  try {
    return readFileSync(file, 'utf8').trim();
  } catch {
    return null;
  }
}
