// @ts-check
import { statfsSync } from 'node:fs';
import { tailOf } from './logs.mjs';
import { shown } from './paths.mjs';
import { Failure } from './say.mjs';

/** @typedef {import('./paths.mjs').Layout} Layout */

const diskFull = 'the disk is full; free some space and run this again';

/**
 * Why MariaDB ended, out of what it wrote to its error log: `port` when its port was taken meanwhile (which is tried
 * again with another), otherwise a clause that completes "MariaDB could not be started: …".
 *
 * @param {string} log
 * @returns {{ readonly kind: 'port' } | { readonly kind: 'other', readonly clause: string }}
 */
export function reasonIn(log) {
  if (/Can't start server: Bind on TCP\/IP port|Address already in use/i.test(log)) return { kind: 'port' };
  if (/No space left on device|Disk is full|Errcode: 28\b|errno:? 28\b|\berror:? (number )?28\b|Disk quota exceeded/i.test(log)) {
    return { kind: 'other', clause: diskFull };
  }
  if (/Unable to lock \S*ibdata1|Can't lock aria control file|Could not get an exclusive lock|another .* process/i.test(log)) {
    return { kind: 'other', clause: 'another MariaDB server is using the same data directory; stop that one first' };
  }
  if (/Permission denied|Errcode: 13\b|errno:? 13\b|\berror:? (number )?13\b/i.test(log)) {
    return {
      kind: 'other',
      clause: 'its files belong to another account; run as the account that first started Ohmstead here',
    };
  }
  // The first error is the cause; those after it only say what else could not be done then.
  const first = log.split('\n').find((line) => line.includes('[ERROR]'));
  if (first !== undefined) {
    return { kind: 'other', clause: first.replace(/^.*?\[ERROR\]\s*/, '').replace(/\.?\s*$/, '') };
  }
  return { kind: 'other', clause: 'it ended without giving a reason' };
}

/**
 * @param {Layout} layout
 * @param {number} logStart size of the log before the attempt
 * @returns {ReturnType<typeof reasonIn>}
 */
export function reasonFor(layout, logStart) {
  const reason = reasonIn(tailOf(layout.databaseLog, logStart));
  const { bavail, bsize } = statfsSync(layout.dir);
  // The log lies on the same disk, and a full one has no room for the line that would say so.
  const full = bavail * bsize < 4_000_000;
  return reason.kind === 'other' && full ? { kind: 'other', clause: diskFull } : reason;
}

/**
 * @param {string} clause
 * @param {Layout} layout
 */
export function cannotStart(clause, layout) {
  return new Failure(`MariaDB could not be started: ${clause} (its log is ${shown(layout.databaseLog)}).`);
}
