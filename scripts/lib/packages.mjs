// @ts-check
import { closeSync, mkdirSync, openSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { tailOf } from './logs.mjs';
import { root, shown } from './paths.mjs';
import { run } from './processes.mjs';
import { Failure, step } from './say.mjs';
import { readStamp } from './stamps.mjs';

/**
 * @typedef {{ readonly version?: string, readonly integrity?: string, readonly optional?: boolean, readonly link?: boolean }} LockEntry
 * @typedef {{ readonly packages?: Readonly<Record<string, LockEntry>> }} LockFile
 */

const modules = path.join(root, 'node_modules');
const nodeStamp = path.join(modules, '.ohmstead-node');
const nodeMajor = process.versions.node.split('.')[0] ?? '';

/**
 * Whether what npm says it installed is what the lock file asks for. npm writes its own record as the last act of an
 * installation, so one that was broken off has none. Packages that the lock file marks optional may be missing (they
 * are for other systems); nothing may be there in another version or besides.
 *
 * @param {LockFile} wanted package-lock.json
 * @param {LockFile} installed node_modules/.package-lock.json
 * @returns {boolean}
 */
export function corresponds(wanted, installed) {
  const want = wanted.packages ?? {};
  const have = installed.packages ?? {};
  for (const [place, entry] of Object.entries(have)) {
    const other = want[place];
    if (other === undefined || other.version !== entry.version || other.integrity !== entry.integrity) return false;
  }
  return Object.entries(want).every(([place, entry]) => place === '' || entry.optional === true || place in have);
}

/**
 * Runs `npm ci` when node_modules is not what the lock file says, or was installed for another release of Node.js.
 *
 * @param {string} logs folder for npm's output
 */
export async function ensurePackages(logs) {
  if (matches()) return;
  mkdirSync(logs, { recursive: true, mode: 0o700 });
  const log = path.join(logs, 'npm-ci.log');
  await step(
    'Installing the packages of package-lock.json (npm ci)',
    async () => {
      const handle = openSync(log, 'w');
      const [program, ...first] = npmCommand();
      // devDependencies are wanted whatever NODE_ENV says: the build needs them.
      const flags = ['ci', '--include=dev', '--include=optional', '--no-audit', '--no-fund', '--loglevel=error'];
      const { code } = await run(program, [...first, ...flags], {
        cwd: root,
        env: process.env,
        stdio: ['ignore', handle, handle],
      });
      closeSync(handle);
      if (code !== 0) throw new Failure(failureSentence(tailOf(log), shown(log)));
      writeFileSync(nodeStamp, `${nodeMajor}\n`);
    },
    () => 'The packages are installed',
  );
}

/**
 * Why `npm ci` failed, out of what it wrote.
 *
 * @param {string} output
 * @param {string} log where the whole of it is
 */
export function failureSentence(output, log) {
  if (/ENOSPC|no space left on device/i.test(output)) {
    return 'The disk became full while the packages were installed; free some space and run this again.';
  }
  if (/\b(ENOTFOUND|EAI_AGAIN|ECONNREFUSED|ECONNRESET|ETIMEDOUT|ENETUNREACH)\b/.test(output)) {
    return `The package registry could not be reached; check the network (or npm's registry setting) and run this again. The whole text is in ${log}.`;
  }
  const line = output
    .split('\n')
    .map((text) => text.replace(/^npm (error|ERR!)\s*/, '').trim())
    .find((text) => text !== '' && !/^code\b/.test(text));
  return `npm ci failed: ${line ?? 'it gave no reason'}. The whole text is in ${log}.`;
}

function matches() {
  const wanted = readJson(path.join(root, 'package-lock.json'));
  if (wanted === null) throw new Failure('package-lock.json is missing or damaged; restore it from version control.');
  const installed = readJson(path.join(modules, '.package-lock.json'));
  if (installed === null || !corresponds(wanted, installed)) return false;
  const major = readStamp(nodeStamp);
  if (major === null) writeFileSync(nodeStamp, `${nodeMajor}\n`);
  return major === null || major === nodeMajor;
}

/**
 * @param {string} file
 * @returns {LockFile | null}
 */
function readJson(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    return null;
  }
}

/**
 * The npm that runs this script, or the one of the shell.
 *
 * @returns {[string, ...string[]]}
 */
export function npmCommand() {
  const cli = process.env.npm_execpath;
  return cli !== undefined && /npm-cli\.c?js$/.test(cli) ? [process.execPath, cli] : ['npm'];
}
