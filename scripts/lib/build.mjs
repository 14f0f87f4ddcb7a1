// @ts-check
import { closeSync, existsSync, mkdirSync, openSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { markInUse, takeLock, usersOf } from './lock.mjs';
import { tailOf } from './logs.mjs';
import { root, shown } from './paths.mjs';
import { run } from './processes.mjs';
import { Failure, say, step } from './say.mjs';
import { hashOf, readStamp } from './stamps.mjs';

export const nextProgram = path.join(root, 'node_modules/next/dist/bin/next');

const output = path.join(root, '.next');
const stamp = path.join(output, 'ohmstead-build');

/**
 * What at the root does not go into a build. All else does, so that a new folder cannot be forgotten: too much here
 * costs a build, too little would serve yesterday's. Names with a dot in front are configuration of tools, or `.env`,
 * which is read when serving.
 */
const notBuilt = new Set([
  'README.md',
  'DEVELOPERS.md',
  'coverage',
  'docs',
  'next-env.d.ts',
  'node_modules',
  'playwright-report',
  'playwright.config.ts',
  'scripts',
  'test-results',
  'tests',
  'vitest.config.mts',
]);

/** @returns {string} of everything that decides what a build is */
export function sourcesHash() {
  const entries = readdirSync(root).filter((name) => !name.startsWith('.') && !notBuilt.has(name));
  return `${hashOf(root, entries, (file) => file.endsWith('.tsbuildinfo'))} node ${process.versions.node.split('.')[0]}`;
}

/**
 * Makes the build if the one there is not that of the sources. The stamp goes first and comes last, so that a build
 * that was broken off is none. A build that another run is serving is not replaced under it.
 *
 * @param {object} how
 * @param {string} how.command what the person started
 * @param {string} how.logs folder for the build's output
 * @param {boolean} how.serve whether this process will serve the build; nobody replaces it then until it ends
 */
export async function ensureBuild({ command, logs, serve }) {
  const taken = await takeLock('build', root, {
    command,
    waitMs: 15 * 60_000,
    onWait: (holder) => say(`· Waiting for the build of another run (${holder.command}, process ${holder.pid}) …`),
  });
  if (!('lock' in taken)) throw new Failure('Another run has been building for a quarter of an hour; stop it and run this again.');
  try {
    const hash = sourcesHash();
    if (isBuilt(hash)) {
      say('✓ The build is that of the sources');
    } else {
      const [server] = usersOf('serving', root);
      if (server !== undefined) {
        throw new Failure(
          `The sources have changed since the build that process ${server} is serving; stop that one (Ctrl-C there), then run this again.`,
        );
      }
      await build(hash, logs);
    }
    if (serve) await markInUse('serving', root, command);
  } finally {
    await taken.lock.release();
  }
}

/** @param {string} hash */
function isBuilt(hash) {
  return readStamp(stamp) === hash && existsSync(path.join(output, 'BUILD_ID'));
}

/**
 * @param {string} hash
 * @param {string} logs
 */
async function build(hash, logs) {
  mkdirSync(logs, { recursive: true, mode: 0o700 });
  const log = path.join(logs, 'build.log');
  await step(
    'Building the application',
    async () => {
      rmSync(stamp, { force: true });
      const handle = openSync(log, 'w');
      const { code } = await run(process.execPath, [nextProgram, 'build'], {
        cwd: root,
        env: buildEnvironment(process.env),
        stdio: ['ignore', handle, handle],
      });
      closeSync(handle);
      if (code !== 0) throw new Failure(failureSentence(tailOf(log), shown(log)));
      writeFileSync(stamp, `${hash}\n`);
    },
    () => 'The application is built',
  );
}

/**
 * A build is the same whoever makes it: it is not shown the database or any secret.
 *
 * @param {import('./processes.mjs').Environment} env
 * @returns {import('./processes.mjs').Environment}
 */
export function buildEnvironment(env) {
  const { DATABASE_URL: _database, NEXTAUTH_SECRET: _secret, NEXTAUTH_URL: _url, ...rest } = env;
  return { ...rest, NODE_ENV: 'production', NEXT_TELEMETRY_DISABLED: '1' };
}

/**
 * @param {string} text what the build printed
 * @param {string} log where the whole of it is
 */
export function failureSentence(text, log) {
  if (/ENOSPC|No space left on device/i.test(text)) {
    return 'The disk became full while the application was built; free some space and run this again.';
  }
  if (/heap out of memory|SIGKILL/.test(text)) {
    return `The build ran out of memory; it needs about 1.5 GB free. The whole text is in ${log}.`;
  }
  // The end of what a build prints is where it says what is wrong.
  const end = text.trimEnd().split('\n').slice(-25).join('\n');
  return `The build failed; its last lines are below, and the whole text is in ${log}.\n${end}`;
}
