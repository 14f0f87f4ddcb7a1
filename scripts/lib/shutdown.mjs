// @ts-check
import { setTimeout as wait } from 'node:timers/promises';

/**
 * The order in which what was started is stopped: last started, first stopped.
 *
 * @typedef {{ readonly stop: () => Promise<void>, readonly kill: () => void }} Stoppable
 */

/** @type {Stoppable[]} */
const started = [];
let stopping = false;

/** True from the moment a stop was asked for. */
export function isStopping() {
  return stopping;
}

/**
 * Enters something that has to be stopped before this process ends.
 *
 * @param {Stoppable} thing
 * @returns {() => void} takes it off the list, for what has ended by itself
 */
export function stopLater(thing) {
  started.push(thing);
  return () => {
    const at = started.indexOf(thing);
    if (at >= 0) started.splice(at, 1);
  };
}

/** Stops all that is on the list, in reverse order; one that will not stop does not keep the others running. */
export async function stopAll() {
  stopping = true;
  for (let thing = started.pop(); thing !== undefined; thing = started.pop()) {
    await thing.stop().catch(thing.kill);
  }
}

function killAll() {
  for (const thing of started.splice(0).reverse()) thing.kill();
}

/**
 * npm passes an interrupt on to its script, which the terminal has interrupted already, so one Ctrl-C arrives twice.
 * Only a signal later than this is a second wish.
 */
const sameWishMs = 700;

/**
 * Stops everything in order on an interrupt, a termination, a hang-up, or when npm, which started this, is gone.
 * A second interrupt kills.
 *
 * @param {object} how
 * @param {number} how.exitCode of this process after an orderly stop
 * @param {() => void} [how.onStop] called once, at the first signal
 */
export function stopOnSignals({ exitCode, onStop }) {
  let firstAt = 0;
  /** @type {Stoppable[]} */
  let pending = [];

  const onSignal = () => {
    const now = performance.now();
    if (firstAt > 0) {
      if (now - firstAt < sameWishMs) return;
      for (const thing of pending) thing.kill();
      killAll();
      process.exit(1);
    }
    firstAt = now;
    pending = [...started].reverse();
    stopping = true;
    onStop?.();
    void stopAll().then(() => process.exit(exitCode));
  };

  for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) process.on(signal, onSignal);
  if (process.env.npm_lifecycle_event !== undefined) void watchParent(onSignal);
}

/**
 * npm killed hard leaves its script behind, holding ports that the person believes free.
 *
 * @param {() => void} gone
 */
async function watchParent(gone) {
  const parent = process.ppid;
  while (process.ppid === parent) await wait(500, undefined, { ref: false });
  gone();
}
