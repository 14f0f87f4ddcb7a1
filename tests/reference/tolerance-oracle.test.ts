import { describe, expect, it } from 'vitest';
import type { Element } from '@/solver';
import { ACTIVE_STARTERS } from './data/starters-active';
import { expectPrinted } from './support/expect-figure';
import { volts } from './support/figures';
import { crossing, readingOf } from './support/measure';

/**
 * The natural frequency of ST-07 with resistors of ± 1 % and capacitors of ± 5 %, found where the phase is −90°
 * [computed independently].
 */
const [SALLEN_KEY] = ACTIVE_STARTERS.filter(({ id }) => id === 'ST-07');
const ELEMENTS = SALLEN_KEY?.elements ?? [];
const TOLERANCE: Readonly<Record<string, number>> = { R1: 0.01, R2: 0.01, C1: 0.05, C2: 0.05 };

function scaled(element: Element, by: Readonly<Record<string, number>>): Element {
  const factor = by[element.id] ?? 1;
  if (element.kind === 'resistor') return { ...element, resistance: element.resistance * factor };
  if (element.kind === 'capacitor') return { ...element, capacitance: element.capacitance * factor };
  return element;
}

function naturalFrequency(by: Readonly<Record<string, number>>): number {
  const elements = ELEMENTS.map((element) => scaled(element, by));
  const response = readingOf(elements, { output: volts('out'), read: 'degrees' });
  return crossing((f) => response(f) + 90, 1000, 10e3);
}

/** (p/f₀)·∂f₀/∂p by a central difference that is exact to the sixth digit. */
function sensitivity(id: string): number {
  const step = 1e-4;
  const [up, down] = [naturalFrequency({ [id]: 1 + step }), naturalFrequency({ [id]: 1 - step })];
  return (up - down) / (2 * step * naturalFrequency({}));
}

describe('ST-07 within its tolerances', () => {
  it('has its extremes of −5.7049 % and +6.3264 % at vertices', () => {
    const names = Object.keys(TOLERANCE);
    const nominal = naturalFrequency({});
    const deviations = Array.from({ length: 16 }, (_, vertex) => {
      const factors = names.map((id, k) => [id, 1 + ((vertex >> k) % 2 === 0 ? 1 : -1) * (TOLERANCE[id] ?? 0)] as const);
      return 100 * (naturalFrequency(Object.fromEntries(factors)) / nominal - 1);
    });
    expectPrinted(Math.min(...deviations), { printed: '-5.7049' });
    expectPrinted(Math.max(...deviations), { printed: '6.3264' });
  });

  it('deviates by 6 % linearly, by 3.6056 % in the root of squares, with a σ of 2.0817 % for even spreads', () => {
    const shares = Object.entries(TOLERANCE).map(([id, tolerance]) => 100 * sensitivity(id) * tolerance);
    expectPrinted(
      shares.reduce((sum, share) => sum + Math.abs(share), 0),
      { printed: '6.0000' },
    );
    const root = Math.hypot(...shares);
    expectPrinted(root, { printed: '3.6056' });
    expectPrinted(root / Math.sqrt(3), { printed: '2.0817' });
    expect(shares.every((share) => share < 0)).toBe(true);
  });
});
