import { describe, expect, it } from 'vitest';
import { solve } from '@/solver';
import { solved } from '../solver/support/expect';
import { network } from '../solver/support/networks';
import { CIRCUITS } from './data/circuits';
import type { ExactOutput } from './support/exact-solver';
import { solveExactly } from './support/exact-solver';
import { nodesOf, portCount } from './support/random-elements';
import type { Circuit } from './support/records';

/**
 * Every published network against the dense equations with 64 digits [computed]: all node voltages and all currents, in
 * units of ε·(1 + condition), the condition being Σ|c/H·∂H/∂c| over all values.
 */
const UNITS = 10;

/** Zero but for the rounding of the 64 digits. */
const NOTHING = 1e-40;

const MOST_FREQUENCIES = 3;

/** Frequencies that figures of the network are for, spread over them. */
function frequenciesOf({ figures }: Circuit): readonly number[] {
  const all = figures.flatMap((figure) => {
    if ('frequency' in figure && typeof figure.frequency === 'number') return [figure.frequency];
    return 'between' in figure ? [Math.sqrt(figure.between[0] * (figure.between[1] ?? 1))] : [];
  });
  const unique = [...new Set(all)].sort((a, b) => a - b);
  const step = Math.max(1, (unique.length - 1) / (MOST_FREQUENCIES - 1));
  return unique.filter((_, k) => unique.length <= MOST_FREQUENCIES || [0, 1, 2].some((n) => Math.round(n * step) === k));
}

function expectAlike(name: string, value: { re: number; im: number } | undefined, output: ExactOutput): void {
  expect(value, name).toBeDefined();
  if (value === undefined || Math.hypot(output.re, output.im) < NOTHING) return;
  expect(output.errorOf(value) / (Number.EPSILON * (1 + output.condition)), name).toBeLessThanOrEqual(UNITS);
}

const CASES = CIRCUITS.flatMap((circuit) => {
  const frequencies = frequenciesOf(circuit);
  const hasSource = circuit.elements.some(({ kind }) => kind === 'voltageSource' || kind === 'currentSource');
  return hasSource && frequencies.length > 0 ? [[circuit.id, circuit, frequencies] as const] : [];
});

describe('published networks against dense equations', () => {
  it('are nearly all compared', () => expect(CASES.length).toBeGreaterThan(90));

  it.each(CASES)('%s', (_id, { elements }, frequencies) => {
    const list = network(...elements);
    for (const frequency of frequencies) {
      const exact = solveExactly(list, frequency);
      const solution = solved(solve(list, { frequency }));
      expect(solution.problems).toEqual([]);
      for (const node of nodesOf(elements)) {
        expectAlike(`voltage of ${node} at ${frequency} Hz`, solution.voltage(node), exact.voltage(node));
      }
      for (const element of elements) {
        for (let port = 0; port < portCount(element); port++) {
          const name = `current of ${element.id}, port ${port}, at ${frequency} Hz`;
          expectAlike(name, solution.current(element.id, port), exact.current(element.id, port));
        }
      }
    }
  });
});
