// @ts-check
import { say, sayFailure } from './say.mjs';
import { isStopping, stopAll, stopOnSignals } from './shutdown.mjs';

/**
 * Runs a command: its failure is said in one sentence, and everything that it started is stopped however it ends.
 *
 * @param {object} what
 * @param {() => Promise<number | 'serving'>} what.main gives the exit code, or 'serving' to go on until a signal comes
 * @param {number} what.exitCodeOnSignal after an orderly stop that was asked for
 */
export async function runCommand({ main, exitCodeOnSignal }) {
  stopOnSignals({ exitCode: exitCodeOnSignal, onStop: () => say('\n· Stopping what was started …') });
  try {
    const result = await main();
    if (result === 'serving' || isStopping()) return;
    await stopAll();
    process.exit(result);
  } catch (error) {
    // What fails because it is being stopped is no failure; the signal's handler ends this process.
    if (isStopping()) return;
    sayFailure(error);
    await stopAll();
    process.exit(1);
  }
}
