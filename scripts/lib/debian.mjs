// @ts-check
import { existsSync, mkdirSync, openSync, closeSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { tailOf } from './logs.mjs';
import { findProgram, mariadbPackage } from './mariadb-programs.mjs';
import { root, shown } from './paths.mjs';
import { ended, launch } from './processes.mjs';
import { Failure, step } from './say.mjs';

/** @typedef {{ readonly program: string, readonly package: string, readonly what: string }} Need */

/** @type {Need} */
export const mariadb = { program: 'mariadbd', package: mariadbPackage, what: "MariaDB's server program" };
/** @type {Need} */
export const chromium = { program: 'chromium', package: 'chromium', what: 'the browser for the tests' };

/**
 * Installs the Debian packages of the programs that are missing, and says which.
 *
 * @param {readonly Need[]} needs
 * @param {string} logs folder for apt's output
 * @throws {Failure} with what to install by hand when this account or this system does not let it
 */
export async function ensurePrograms(needs, logs) {
  const missing = needs.filter((need) => findProgram(need.program) === null);
  if (missing.length === 0) return;
  const packages = missing.map((need) => need.package);
  const list = missing.map((need) => `${need.package} (${need.what})`).join(' and ');
  const prefix = await rightToInstall(packages, list);

  mkdirSync(logs, { recursive: true, mode: 0o700 });
  const log = path.join(logs, 'apt.log');
  await step(
    `Installing the Debian packages ${packages.join(', ')}`,
    async () => {
      const handle = openSync(log, 'w');
      try {
        const installed = async () => (await apt(prefix, ['install', ...packages], handle)) === 0;
        // The lists may be absent or name versions that the archive no longer has: renew them only then.
        if (!(await installed())) {
          await apt(prefix, ['update'], handle);
          if (!(await installed())) throw new Failure(failureSentence(tailOf(log), packages, shown(log)));
        }
      } finally {
        closeSync(handle);
      }
      const absent = missing.find((need) => findProgram(need.program) === null);
      if (absent !== undefined) {
        throw new Failure(
          `The package ${absent.package} was installed, but no program ${absent.program} came with it; install ${absent.what} by hand.`,
        );
      }
    },
    () => `Installed ${list}`,
  );
}

/**
 * The words to put before apt-get: none as root, sudo where it asks for no password.
 *
 * @param {readonly string[]} packages
 * @param {string} list
 * @returns {Promise<readonly string[]>}
 */
async function rightToInstall(packages, list) {
  const osRelease = existsSync('/etc/os-release') ? readFileSync('/etc/os-release', 'utf8') : '';
  if (!isDebian(osRelease) || findProgram('apt-get') === null) {
    throw new Failure(`Ohmstead needs ${list}, and this is not Debian; install what your system calls it, then run this again.`);
  }
  if (process.getuid?.() === 0) return [];
  const sudo = findProgram('sudo');
  if (sudo !== null) {
    const child = launch(sudo, ['-n', 'true'], { cwd: root, env: process.env, stdio: 'ignore' });
    if ((await ended(child)).code === 0) return [sudo, '-n'];
  }
  throw new Failure(
    `Ohmstead needs ${list}, and this account may not install it; as root, run: apt-get install ${packages.join(' ')}`,
  );
}

/**
 * @param {string} osRelease text of /etc/os-release
 * @returns {boolean} whether it is Debian or made from it
 */
export function isDebian(osRelease) {
  return /^ID(_LIKE)?=.*\bdebian\b/m.test(osRelease);
}

/**
 * apt-get is not stopped with everything else: interrupted in the middle it leaves the system's packages half set up.
 *
 * @param {readonly string[]} prefix
 * @param {readonly string[]} args
 * @param {number} log
 */
async function apt(prefix, args, log) {
  const options = ['-y', '-q', '--no-install-recommends', '-o', 'DPkg::Lock::Timeout=300'];
  const command = [...prefix, 'env', 'DEBIAN_FRONTEND=noninteractive', 'LC_ALL=C.UTF-8', 'apt-get', ...options, ...args];
  const [program = 'apt-get', ...rest] = command;
  const child = launch(program, rest, { cwd: '/', env: process.env, stdio: ['ignore', log, log], deathSignal: 'NONE' });
  return (await ended(child)).code;
}

/**
 * @param {string} output
 * @param {readonly string[]} packages
 * @param {string} log
 */
export function failureSentence(output, packages, log) {
  const names = packages.join(' ');
  if (/No space left on device|don't have enough free space/i.test(output)) {
    return `The disk is full: ${names} could not be installed; free some space and run this again.`;
  }
  if (/Could not get lock|Unable to acquire the dpkg/i.test(output)) {
    return `Another program is installing packages; when it has finished, run this again (wanted: ${names}).`;
  }
  if (/Temporary failure resolving|Could not resolve|Could not connect|Connection failed|Network is unreachable/i.test(output)) {
    return `Debian's archive could not be reached, so ${names} could not be installed; check the network and run this again.`;
  }
  const reason = output.split('\n').findLast((line) => line.startsWith('E: '));
  return `apt-get could not install ${names}: ${reason?.slice(3) ?? 'it gave no reason'} (the whole text is in ${log}).`;
}
