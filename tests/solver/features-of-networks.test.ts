import { describe, expect, it } from 'vitest';
import type { Element } from '@/solver';
import { solve } from '@/solver';
import { polesAndZeros } from '@/solver/analysis/poles-and-zeros';
import { levelCrossings } from '@/solver/features/crossings';
import { extremesOf } from '@/solver/features/extremes';
import { hintsOf } from '@/solver/features/hints';
import { loopMargins } from '@/solver/features/loop-margins';
import { networkResponse } from '@/solver/features/network-response';
import { notchesOf, passBand } from '@/solver/features/pass-band';
import type { Scan } from '@/solver/features/scan';
import { scanResponse } from '@/solver/features/scan';
import { capacitor, inductor, network, resistor, voltageSource } from './support/networks';
import { Random } from './support/random';
import { found, toNode } from './support/roots';

/** The voltage of a node by the steady state, looked at where poles and zeros say. */
function scanOf(elements: readonly Element[], node: string, low: number, high: number): Scan {
  const list = network(...elements);
  const scan = scanResponse(
    {
      evaluate: (frequency) => {
        const solution = solve(list, { frequency });
        return solution.ok ? solution.voltage(node) : undefined;
      },
    },
    { low, high, perDecade: 20, hints: hintsOf(found(polesAndZeros(list, toNode(node)))) },
  );
  if (!scan.ok) throw new Error(scan.message);
  return scan;
}

describe('a quartz resonator of 6 MHz between 22 Ω', () => {
  // C₁ 12 fF, L₁ 58.635 mH, 22 Ω, C₀ 3.2 pF: Q = √(L/C)/R = 100 477 [computed], f_p = f_s·√(1 + C₁/C₀).
  const [l, c, r] = [58.635e-3, 12e-15, 22];
  const series = 1 / (2 * Math.PI * Math.sqrt(l * c));
  const crystal = [inductor('L1', 's', 'a', l), capacitor('C1', 'a', 'b', c), resistor('R1', 'b', 'out', r)];

  it('has, short-circuited, the quality 100 477 between its half-power points', () => {
    const scan = scanOf([voltageSource('V1', 's', '0', 1), ...crystal, resistor('RL', 'out', '0', 1e-6)], 'out', 1e5, 1e8);
    const band = passBand(scan);
    expect(Math.abs((band?.q ?? 0) - 100_477)).toBeLessThanOrEqual(0.5);
    expect(Math.abs((band?.peak.frequency ?? 0) / series - 1)).toBeLessThanOrEqual(1e-13);
  });

  it('passes at series resonance and blocks at parallel resonance, 0.19 % above', () => {
    const scan = scanOf([voltageSource('V1', 's', '0', 1), ...crystal, capacitor('C0', 's', 'out', 3.2e-12), resistor('RL', 'out', '0', 22)], 'out', 1e5, 1e7);
    const [peak] = extremesOf(scan).filter(({ kind }) => kind === 'maximum');
    const [notch] = notchesOf(scan, { reference: { to: 'maximum' } }).filter(({ frequency }) => frequency > series);
    // A damping of 1/2Q beside a neighbour at the relative distance d moves an extreme by (1/2Q)²/d.
    const distance = Math.sqrt(1 + 12 / 3200) - 1;
    const shift = (1 / (2 * 100_477)) ** 2 / distance;
    expect(Math.abs((peak?.frequency ?? 0) / series - 1)).toBeLessThanOrEqual(10 * shift);
    expect(Math.abs((notch?.frequency ?? 0) / (series * (1 + distance)) - 1)).toBeLessThanOrEqual(1.1 * shift);
    expect(notch?.depth ?? 0).toBeGreaterThan(60);
  });
});

describe('random resonances behind a divider', () => {
  it('are found with their peaks and widths, of any quality to 10 000, on a grid of 20 points a decade', () => {
    const random = new Random(41);
    for (let round = 0; round < 40; round++) {
      const q = 10 ** random.between(0.2, 4);
      const f0 = 10 ** random.between(3, 5);
      const l = 10 ** random.between(-4, -2);
      const c = 1 / ((2 * Math.PI * f0) ** 2 * l);
      const r = Math.sqrt(l / c) / q;
      const scan = scanOf([voltageSource('V1', 's', '0', 1), inductor('L1', 's', 'a', l), capacitor('C1', 'a', 'out', c), resistor('R1', 'out', '0', r)], 'out', 100, 1e6);
      const [peak, ...more] = extremesOf(scan);
      expect(more).toEqual([]);
      expect(Math.abs((peak?.frequency ?? 0) / f0 - 1)).toBeLessThanOrEqual(1e-11);
      expect(Math.abs((passBand(scan)?.q ?? 0) / q - 1)).toBeLessThanOrEqual(1e-15 * q * q + 1e-11);
    }
  });
});

describe('an all-pass', () => {
  it('passes no level where its magnitude is off it by rounding alone', () => {
    const list = network(
      voltageSource('V1', 'in', '0', 1),
      resistor('R1', 'in', 'm', 1e4),
      resistor('R2', 'm', 'out', 1e4),
      resistor('R3', 'in', 'p', 1e4),
      capacitor('C1', 'p', '0', 1e-9),
      { id: 'U1', kind: 'operationalAmplifier', nodes: ['p', 'm', 'out'] },
    );
    const response = networkResponse(list, { quantity: 'voltage', node: 'out' });
    if (!response.ok) throw new Error(response.message);
    const scan = scanResponse(response, { low: 1, high: 1e6 });
    if (!scan.ok) throw new Error(scan.message);
    // Some of the points are a last bit above 1, and some below.
    const sizes = Array.from(scan.re, (re, k) => Math.hypot(re, scan.im[k] ?? 0));
    expect([sizes.some((size) => size > 1), sizes.some((size) => size < 1)]).toEqual([true, true]);
    expect(levelCrossings(scan, 0)).toEqual([]);
    expect(loopMargins(scan)).toMatchObject({ phase: [] });
  });
});
