// @ts-check
import { closeSync, mkdirSync, openSync, rmSync, statSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { tailOf } from './logs.mjs';
import { root, shown } from './paths.mjs';
import { run } from './processes.mjs';
import { Failure, say, step } from './say.mjs';
import { hashOf, readStamp } from './stamps.mjs';

/** @typedef {import('./paths.mjs').Layout} Layout */

/** tsx is loaded into this very Node; `react-server` is the condition under which the package server-only is empty. */
export const typescript = ['--conditions=react-server', '--import', 'tsx'];

/** What decides whether a database is prepared. */
const sources = ['db/migrations', 'db/migrate.ts', 'db/seeds', 'scripts/prepare-database.ts'];

/**
 * The stamp stands in the data directory and names the inode of the database's own folder: a data directory that was
 * removed, or a database that was dropped and made anew, is not taken for a prepared one.
 *
 * @param {Layout} layout
 * @param {string} database
 */
function stampOf(layout, database) {
  return path.join(layout.data, `ohmstead-prepared.${database}`);
}

/**
 * @param {Layout} layout
 * @param {string} database
 */
function expectedStamp(layout, database) {
  return `${hashOf(root, sources)} ${statSync(path.join(layout.data, database)).ino}`;
}

/**
 * Forgets that a database is prepared, for whoever changes it otherwise.
 *
 * @param {Layout} layout
 * @param {string} database
 */
export function forgetPrepared(layout, database) {
  rmSync(stampOf(layout, database), { force: true });
}

/**
 * Runs the migrations that are open and lays the demonstration data if that was never done.
 *
 * @param {object} what
 * @param {import('./processes.mjs').Environment} what.env with DATABASE_URL
 * @param {Layout} what.layout
 * @param {string | null} what.stampFor name of the private database; null where a stamp proves nothing
 */
export async function prepareDatabase({ env, layout, stampFor }) {
  if (stampFor !== null && readStamp(stampOf(layout, stampFor)) === expectedStamp(layout, stampFor)) {
    say('✓ The database is prepared');
    return;
  }
  mkdirSync(layout.logs, { recursive: true, mode: 0o700 });
  const log = path.join(layout.logs, 'prepare.log');
  await step(
    'Running the migrations and laying the demonstration data',
    async () => {
      const handle = openSync(log, 'w', 0o600);
      const { code } = await run(process.execPath, [...typescript, 'scripts/prepare-database.ts'], {
        cwd: root,
        env,
        stdio: ['ignore', handle, handle],
      });
      closeSync(handle);
      const text = tailOf(log).trim();
      if (code !== 0) {
        const failed = text.split('\n').findLast((line) => line.startsWith('failed: '))?.slice('failed: '.length);
        // The driver puts numbers of its own in front.
        const reason = (failed ?? text.split('\n').at(-1) ?? '').replace(/^\(conn:[^)]*\) /, '');
        throw new Failure(`The database could not be prepared: ${reason || 'no reason was given'} (the whole text is in ${shown(log)}).`);
      }
      if (stampFor !== null) writeFileSync(stampOf(layout, stampFor), `${expectedStamp(layout, stampFor)}\n`);
      return text;
    },
    (text) => `The database is prepared: ${text.split('\n').slice(-2).join('; ')}`,
  );
}
