// @ts-check
import { spawn } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import { setTimeout as wait } from 'node:timers/promises';
import { isStopping, stopLater } from './shutdown.mjs';

/** @typedef {import('node:child_process').ChildProcess} ChildProcess */
/** @typedef {Readonly<Record<string, string | undefined>>} Environment */
/** @typedef {{ readonly code: number | null, readonly signal: NodeJS.Signals | null }} Ending */

const setpriv = '/usr/bin/setpriv';

/**
 * What the kernel says of a running process, or null when there is none (a dead one that nobody has collected counts
 * as none: in a container without an init it stays listed for ever).
 *
 * @param {number} pid
 * @returns {{ readonly name: string, readonly command: string } | null}
 */
export function processAt(pid) {
  if (!Number.isInteger(pid) || pid <= 0) return null;
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    const state = stat.slice(stat.lastIndexOf(')') + 2)[0];
    if (state === 'Z' || state === 'X') return null;
    return {
      name: readFileSync(`/proc/${pid}/comm`, 'utf8').trim(),
      command: readFileSync(`/proc/${pid}/cmdline`, 'utf8').split('\0').join(' ').trim(),
    };
  } catch {
    return null;
  }
}

/**
 * The process number in a file, if a process of that name and with that text in its command line runs under it now.
 * A number that has since gone to another program is not trusted.
 *
 * @param {string} file
 * @param {{ readonly name: string, readonly commandIncludes: string }} expected
 * @returns {number | null}
 */
export function livePidIn(file, expected) {
  let pid;
  try {
    pid = Number.parseInt(readFileSync(file, 'utf8'), 10);
  } catch {
    return null;
  }
  const found = processAt(pid);
  if (found === null || found.name !== expected.name || !found.command.includes(expected.commandIncludes)) return null;
  return pid;
}

/**
 * Starts a program in a session of its own, so that a Ctrl-C in the terminal reaches only this process, which then
 * stops the others in order. The kernel sends it `deathSignal` if this process dies without having stopped it.
 *
 * @param {string} command
 * @param {readonly string[]} args
 * @param {object} options
 * @param {string} options.cwd
 * @param {Environment} options.env
 * @param {import('node:child_process').StdioOptions} options.stdio
 * @param {'TERM' | 'KILL' | 'NONE'} [options.deathSignal] NONE for a program that has to finish what it does
 * @returns {ChildProcess}
 */
export function launch(command, args, { cwd, env, stdio, deathSignal = 'TERM' }) {
  if (isStopping()) throw new Error(`${command} is not started any more: everything is being stopped`);
  const bound = deathSignal !== 'NONE' && existsSync(setpriv);
  return spawn(
    bound ? setpriv : command,
    bound ? ['--pdeathsig', deathSignal, '--', command, ...args] : [...args],
    { cwd, env: /** @type {NodeJS.ProcessEnv} */ (env), stdio, detached: true },
  );
}

/**
 * Resolves when the program has ended. A program that cannot be started at all ends with code 127, as in a shell.
 *
 * @param {ChildProcess} child
 * @returns {Promise<Ending>}
 */
export function ended(child) {
  return new Promise((resolve) => {
    if (child.exitCode !== null || child.signalCode !== null) {
      resolve({ code: child.exitCode, signal: child.signalCode });
      return;
    }
    child.once('exit', (code, signal) => resolve({ code, signal }));
    child.once('error', () => resolve({ code: 127, signal: null }));
  });
}

/**
 * Signals a program and all that it started in its session; nothing happens if they are gone.
 *
 * @param {number | undefined} pid
 * @param {NodeJS.Signals} signal
 */
export function signalGroup(pid, signal) {
  if (pid === undefined) return;
  try {
    process.kill(-pid, signal);
  } catch {
    // Gone already, which is what was wanted.
  }
}

/**
 * Asks a program to end and kills it when it has not after `graceMs`.
 *
 * @param {ChildProcess} child
 * @param {number} graceMs
 */
export async function stopChild(child, graceMs) {
  const end = ended(child);
  signalGroup(child.pid, 'SIGTERM');
  const late = await Promise.race([end.then(() => false), wait(graceMs, true, { ref: false })]);
  if (late) signalGroup(child.pid, 'SIGKILL');
  await end;
  // Whatever the program left in its session (a worker that did not hear of the end) goes with it.
  signalGroup(child.pid, 'SIGKILL');
}

/**
 * Ends a process that is not a child of this one, the same way.
 *
 * @param {number} pid
 * @param {number} graceMs
 */
export async function stopPid(pid, graceMs) {
  for (const signal of /** @type {const} */ (['SIGTERM', 'SIGKILL'])) {
    try {
      process.kill(pid, signal);
    } catch {
      return;
    }
    const until = performance.now() + graceMs;
    while (processAt(pid) !== null && performance.now() < until) await wait(50);
    if (processAt(pid) === null) return;
  }
}

/**
 * Runs a program to its end. It is stopped with everything else when a stop is asked for meanwhile.
 *
 * @param {string} command
 * @param {readonly string[]} args
 * @param {object} options
 * @param {string} options.cwd
 * @param {Environment} options.env
 * @param {import('node:child_process').StdioOptions} [options.stdio]
 * @returns {Promise<Ending>}
 */
export async function run(command, args, { cwd, env, stdio = ['ignore', 'inherit', 'inherit'] }) {
  const child = launch(command, args, { cwd, env, stdio });
  const forget = stopLater({
    stop: () => stopChild(child, 5000),
    kill: () => signalGroup(child.pid, 'SIGKILL'),
  });
  const ending = await ended(child);
  forget();
  return ending;
}
