// @ts-check
import { existsSync, mkdirSync, statfsSync } from 'node:fs';
import path from 'node:path';
import { ensurePrograms } from './debian.mjs';
import { takeLock } from './lock.mjs';
import { ensurePackages } from './packages.mjs';
import { root, shown } from './paths.mjs';
import { Failure, say } from './say.mjs';

/** @typedef {import('./paths.mjs').Layout} Layout */

const mega = 1_000_000;

/**
 * Free space, in bytes, below which a run is not begun: what MariaDB and the build write in a run, and what the packages,
 * a build and a new data directory take where they are missing.
 */
const needed = { always: 200 * mega, packages: 900 * mega, build: 400 * mega, data: 200 * mega };

/**
 * Makes the state folder and takes it for this run. Two runs on one folder would share a database that the first to
 * end stops.
 *
 * @param {Layout} layout
 * @param {string} command
 */
export async function claimState(layout, command) {
  mkdirSync(layout.dir, { recursive: true, mode: 0o700 });
  const taken = await takeLock('state', layout.dir, {
    command,
    // Long enough for a run whose npm was killed to notice that it is alone.
    waitMs: 3000,
    onWait: (holder) => say(`· Waiting for ${holder.command} (process ${holder.pid}) to end …`),
  });
  if ('lock' in taken) return;
  const { holder } = taken;
  const who = holder === null ? 'Another run' : `${holder.command} (process ${holder.pid})`;
  throw new Failure(
    `${who} already runs here, on ${shown(layout.dir)}; stop it with Ctrl-C there, or give this one a folder of its own: OHMSTEAD_STATE=.local/second ${command}`,
  );
}

/** @param {Layout} layout */
export function requireSpace(layout) {
  const missing = (/** @type {string} */ place, /** @type {number} */ size) => (existsSync(place) ? 0 : size);
  const bytes =
    needed.always +
    missing(path.join(root, 'node_modules/.package-lock.json'), needed.packages) +
    missing(path.join(root, '.next/BUILD_ID'), needed.build) +
    missing(layout.data, needed.data);
  const { bavail, bsize } = statfsSync(layout.dir);
  const free = Number(bavail) * Number(bsize);
  if (free >= bytes) return;
  throw new Failure(
    `The disk of ${layout.dir} has ${Math.floor(free / mega)} MB free, and this needs ${Math.ceil(bytes / mega)} MB; free some space and run this again.`,
  );
}

/**
 * Everything that has to be installed: the system's programs, then the packages. One run at a time does this in a
 * project folder; a second waits and then finds it done.
 *
 * @param {object} wanted
 * @param {readonly import('./debian.mjs').Need[]} wanted.programs
 * @param {Layout} wanted.layout
 * @param {string} wanted.command
 */
export async function install({ programs, layout, command }) {
  const taken = await takeLock('install', root, {
    command,
    waitMs: 20 * 60_000,
    onWait: (holder) => say(`· Waiting for the installation of another run (${holder.command}, process ${holder.pid}) …`),
  });
  if (!('lock' in taken)) throw new Failure('Another run has been installing for 20 minutes; stop it and run this again.');
  try {
    await ensurePrograms(programs, layout.logs);
    await ensurePackages(layout.logs);
  } finally {
    await taken.lock.release();
  }
}
