import { describe, expect, it } from 'vitest';
import type { SweepOutput } from '@/solver';
import { solve, sweep } from '@/solver';
import { solveExactly } from '../reference/support/exact-solver';
import { solved } from './support/expect';
import { network } from './support/networks';
import { Random } from './support/random';
import { randomElements } from './support/random-networks';

const FREQUENCY = 1000;
const PATIENCE = 300_000;

/** A quantity below this is zero but for the rounding of the exact solution's 64 digits. */
const ZERO = 1e-40;

describe('a sweep against exact arithmetic', () => {
  it(
    'has node voltages right to 10·ε·(1 + condition) over 24 decades of impedance, singly and all at once',
    () => {
      let worst = 0;
      let compared = 0;
      for (let seed = 1001; seed <= 1300; seed++) {
        const random = new Random(seed);
        const elements = randomElements(random, { nodes: [3, 7], decades: 12, frequency: FREQUENCY });
        const list = network(...elements);
        const exact = solveExactly(list, FREQUENCY);
        const nodes = [...new Set(elements.flatMap((element) => element.nodes))].filter((node) => node !== '0');
        const all = nodes.map((node): SweepOutput => ({ quantity: 'voltage', node }));
        const one = random.whole(0, nodes.length - 1);
        for (const outputs of [all, all.slice(one, one + 1)]) {
          const result = sweep(list, { frequencies: [FREQUENCY], outputs });
          if (!result.ok) throw new Error(`seed ${seed}: ${result.message}`);
          for (const { output, re, im, determined } of result.traces) {
            expect(determined[0], `seed ${seed}`).toBe(1);
            if (output.quantity !== 'voltage') continue;
            const right = exact.voltage(output.node);
            if (Math.hypot(right.re, right.im) < ZERO) continue;
            const error = right.errorOf({ re: re[0] ?? NaN, im: im[0] ?? NaN });
            worst = Math.max(worst, error / (Number.EPSILON * (1 + right.condition)));
            compared += 1;
          }
        }
      }
      expect(compared).toBeGreaterThan(1500);
      expect(worst).toBeLessThanOrEqual(10);
    },
    PATIENCE,
  );

  it.each([
    { floating: false, measure: 'of each current', bound: 10 },
    // Where two sources' trees meet, a current may be a small difference that only the sum of all of them rounds like.
    { floating: true, measure: 'of the largest current', bound: 50 },
  ])(
    'has element currents right to $bound·ε·(1 + condition) $measure, floating sources: $floating',
    ({ floating, bound }) => {
      let worst = 0;
      let compared = 0;
      for (let seed = 2001; seed <= 2060; seed++) {
        const recipe = { nodes: [3, 6], decades: 2, frequency: FREQUENCY, floatingSource: floating, currentSource: seed % 3 === 0 } as const;
        const elements = randomElements(new Random(seed), recipe);
        const list = network(...elements);
        const exact = solveExactly(list, FREQUENCY);
        const outputs = elements.map(({ id }): SweepOutput => ({ quantity: 'current', element: id }));
        const result = sweep(list, { frequencies: [FREQUENCY], outputs });
        if (!result.ok) throw new Error(`seed ${seed}: ${result.message}`);
        const rights = elements.map(({ id }) => exact.current(id));
        const largest = Math.max(...rights.map(({ re, im }) => Math.hypot(re, im)));
        for (const [place, { re, im }] of result.traces.entries()) {
          const right = rights[place];
          const size = Math.hypot(right?.re ?? 0, right?.im ?? 0);
          if (right === undefined || size < ZERO) continue;
          const error = right.errorOf({ re: re[0] ?? NaN, im: im[0] ?? NaN }) * (floating ? size / largest : 1);
          worst = Math.max(worst, error / (Number.EPSILON * (1 + right.condition)));
          compared += 1;
        }
      }
      expect(compared).toBeGreaterThan(400);
      expect(worst).toBeLessThanOrEqual(bound);
    },
    PATIENCE,
  );
});

describe('a sweep against solve', () => {
  it('agrees at every frequency, to rounding times the condition', () => {
    let worst = 0;
    let compared = 0;
    for (let seed = 1; seed <= 120; seed++) {
      const random = new Random(seed);
      const recipe = { nodes: [2, 12], decades: 2, frequency: FREQUENCY, floatingSource: seed % 3 === 0, currentSource: seed % 4 === 0 } as const;
      const elements = randomElements(random, recipe);
      const list = network(...elements);
      const frequencies = Array.from({ length: 13 }, () => 10 ** random.between(1, 5));
      const nodes = [...new Set(elements.flatMap((element) => element.nodes))].filter((node) => node !== '0');
      const outputs: SweepOutput[] = [
        ...nodes.map((node): SweepOutput => ({ quantity: 'voltage', node })),
        ...elements.map(({ id }): SweepOutput => ({ quantity: 'current', element: id })),
        ...elements.map(({ id }): SweepOutput => ({ quantity: 'elementVoltage', element: id })),
        ...elements.map(({ id }): SweepOutput => ({ quantity: 'power', element: id })),
      ];
      const result = sweep(list, { frequencies, outputs });
      if (!result.ok) throw new Error(`seed ${seed}: ${result.message}`);
      for (const [place, frequency] of frequencies.entries()) {
        const solution = solved(solve(list, { frequency }));
        const condition = solution.condition ?? Infinity;
        const largest = { voltage: 0, current: 0 };
        for (const { id } of elements) {
          largest.voltage = Math.max(largest.voltage, solution.elementVoltage(id)?.abs() ?? 0);
          largest.current = Math.max(largest.current, solution.current(id)?.abs() ?? 0);
        }
        for (const { output, re, im, determined } of result.traces) {
          expect(determined[place]).toBe(1);
          const [value, size] =
            output.quantity === 'voltage'
              ? [solution.voltage(output.node), largest.voltage]
              : output.quantity === 'current'
                ? [solution.current(output.element), largest.current]
                : output.quantity === 'elementVoltage'
                  ? [solution.elementVoltage(output.element), largest.voltage]
                  : output.quantity === 'power'
                    ? [solution.power(output.element), largest.voltage * largest.current]
                    : [undefined, 0];
          const off = Math.hypot((re[place] ?? NaN) - (value?.re ?? NaN), (im[place] ?? NaN) - (value?.im ?? NaN));
          compared += 1;
          if (off !== 0) worst = Math.max(worst, off / (size * Number.EPSILON * (1 + condition)));
        }
      }
    }
    expect(compared).toBeGreaterThan(50_000);
    expect(worst).toBeLessThanOrEqual(50);
  });
});
