import { describe, expect, it } from 'vitest';
import { solve } from '@/solver';
import { solved } from '../solver/support/expect';
import { network } from '../solver/support/networks';
import { Random } from '../solver/support/random';
import { solveExactly } from './support/exact-solver';
import type { LinkedKind } from './support/random-elements';
import { LINKED_KINDS, nodesOf, portCount, randomLinkedNetwork } from './support/random-elements';

/**
 * Random networks of every kind of element against an independent dense solution with 64-digit numbers (mathjs), from
 * the exact element values [computed]. An error is measured in units of ε·(1 + condition), the condition being
 * Σ|c/H·∂H/∂c| over all coefficients that the values give.
 */
const FREQUENCY = 1000;

/** Zero but for the rounding of the 64 digits. */
const NOTHING = 1e-40;

/** The largest error of node voltages and of currents. */
function worstError(kinds: (random: Random) => readonly LinkedKind[], seeds: readonly [number, number]): { worst: number; at: string; compared: number } {
  const found = { worst: 0, at: '', compared: 0 };
  for (let seed = seeds[0]; seed <= seeds[1]; seed++) {
    const random = new Random(seed);
    const elements = randomLinkedNetwork(random, kinds(random), FREQUENCY);
    const list = network(...elements);
    const exact = solveExactly(list, FREQUENCY);
    const solution = solved(solve(list, { frequency: FREQUENCY }));
    expect(solution.problems, `seed ${seed}`).toEqual([]);
    const compare = (name: string, value: { re: number; im: number } | undefined, output: ReturnType<typeof exact.voltage>): void => {
      if (value === undefined) throw new Error(`seed ${seed}: no ${name}`);
      if (Math.hypot(output.re, output.im) < NOTHING) return;
      found.compared += 1;
      const error = output.errorOf(value) / (Number.EPSILON * (1 + output.condition));
      if (error > found.worst) Object.assign(found, { worst: error, at: `seed ${seed}, ${name}` });
    };
    for (const node of nodesOf(elements)) compare(`voltage of ${node}`, solution.voltage(node), exact.voltage(node));
    for (const element of elements) {
      for (let port = 0; port < portCount(element); port++) {
        compare(`current of ${element.id}, port ${port}`, solution.current(element.id, port), exact.current(element.id, port));
      }
    }
  }
  return found;
}

describe('random networks of every kind against 64 digits', () => {
  it.each(LINKED_KINDS)('with one or two of kind %s', (kind) => {
    const { worst, at, compared } = worstError((random) => (random.next() < 0.5 ? [kind] : [kind, kind]), [1, 25]);
    expect(compared).toBeGreaterThan(150);
    expect(worst, at).toBeLessThanOrEqual(10);
  });

  it('with four of any kinds', () => {
    const { worst, at, compared } = worstError((random) => [1, 2, 3, 4].map(() => random.pick(LINKED_KINDS)), [101, 160]);
    expect(compared).toBeGreaterThan(600);
    expect(worst, at).toBeLessThanOrEqual(10);
  });
});
