// @ts-check
import { say, sayFailure, Failure } from './say.mjs';
import { isStopping, stopAll, stopLater } from './shutdown.mjs';

/**
 * @typedef {object} Server
 * @property {Promise<import('./processes.mjs').Ending>} exited
 * @property {() => Promise<void>} stop
 * @property {() => void} kill
 */

/** A server that ends more often than this within a minute is not started again: it would only end again. */
const mostRestarts = 5;

/**
 * Which of the endings at these times is one too many.
 *
 * @param {readonly number[]} times in milliseconds, the newest last
 * @returns {boolean}
 */
export function endsTooOften(times) {
  const newest = times.at(-1) ?? 0;
  return times.filter((time) => newest - time < 60_000).length > mostRestarts;
}

/**
 * Keeps a server running until everything is stopped: one that ends unasked is started again, and the person is told.
 *
 * @param {object} wanted
 * @param {string} wanted.what its name at the start of a sentence
 * @param {Server} wanted.first
 * @param {() => Promise<Server>} wanted.startAgain
 */
export function keepRunning({ what, first, startAgain }) {
  let server = first;
  /** @type {number[]} */
  const endings = [];
  /** @type {Promise<void>} */
  let restarting = Promise.resolve();

  stopLater({
    stop: async () => {
      await restarting.catch(() => {});
      await server.stop();
    },
    kill: () => server.kill(),
  });

  const restart = async () => {
    endings.push(performance.now());
    if (endsTooOften(endings)) throw new Failure(`${what} keeps ending by itself; see the log in the state folder.`);
    say(`· ${what} ended by itself; starting it again …`);
    server = await startAgain();
    say(`✓ ${what} runs again`);
    watch();
  };

  const watch = () => {
    void server.exited.then(() => {
      if (isStopping()) return;
      restarting = restart();
      restarting.catch(async (error) => {
        if (isStopping()) return;
        sayFailure(error);
        await stopAll();
        process.exit(1);
      });
    });
  };
  watch();
}
