import { describe, expect, it } from 'vitest';
import type { ElementList, SourceValue, Superposition } from '@/solver';
import { sourceFrequencies, superpose, valueAt } from '@/solver';

const source = (id: string, nodes: readonly [string, string], value: SourceValue) =>
  ({ id, kind: 'voltageSource', nodes, value }) as const;

/** A direct value, 50 Hz and its third, in series across 10 Ω. */
const list: ElementList = {
  version: 1,
  elements: [
    source('VS1', ['a', '0'], { rms: 3, phase: 180, frequency: 0 }),
    source('VS2', ['b', 'a'], { rms: 12, phase: 0, frequency: null }),
    source('VS3', ['c', 'b'], { rms: 4, phase: -90, frequency: 150 }),
    { id: 'R1', kind: 'resistor', nodes: ['c', '0'], resistance: 10 },
  ],
};

function superposed(of: ElementList, operatingFrequency: number): Superposition {
  const answer = superpose(of, { operatingFrequency });
  if (!answer.ok) throw new Error(answer.message);
  return answer;
}

describe('sources of several frequencies at once', () => {
  const all = superposed(list, 50);

  it('are solved at each of their frequencies, once each', () => {
    expect(all.frequencies).toEqual([0, 50, 150]);
    expect(sourceFrequencies(list, 150)).toEqual([0, 150]);
    expect(sourceFrequencies(list, 150 * (1 + 1e-14))).toHaveLength(2);
  });

  it('give the root of the sum of squares, which is 13 for 3, 12 and 4', () => {
    expect(all.voltage('c')?.rms).toBeCloseTo(13, 14);
    expect(all.current('R1')?.rms).toBeCloseTo(1.3, 14);
    expect(all.apparentPower('R1')).toBeCloseTo(16.9, 13);
  });

  it('add up their mean powers, and balance', () => {
    expect(all.activePower('R1')).toBeCloseTo(16.9, 13);
    const sum = ['VS1', 'VS2', 'VS3', 'R1'].reduce((total, id) => total + (all.activePower(id) ?? NaN), 0);
    expect(Math.abs(sum)).toBeLessThanOrEqual(1e-14 * 16.9);
    expect(all.activePower('VS2')).toBeCloseTo(-14.4, 13);
  });

  it('add up in time to −3 + 12√2·cos(2π·50t) + 4√2·sin(2π·150t)', () => {
    const voltage = all.voltage('c');
    if (voltage === undefined) throw new Error('not determined');
    for (const time of [0, 1e-3, 3.3e-3, 1.2345, 1e6 + 0.002]) {
      const turns = (frequency: number): number => 2 * Math.PI * ((frequency * time) % 1);
      const expected = -3 + 12 * Math.SQRT2 * Math.cos(turns(50)) + 4 * Math.SQRT2 * Math.sin(turns(150));
      expect(Math.abs(valueAt(voltage, time) - expected)).toBeLessThanOrEqual(1e-12);
    }
  });

  it('say at which frequency something stands in the way', () => {
    const withCapacitor: ElementList = {
      version: 1,
      elements: [...list.elements, { id: 'C1', kind: 'capacitor', nodes: ['c', 'd'], capacitance: 1e-6 }],
    };
    const answer = superposed(withCapacitor, 50);
    expect(answer.problems.map(({ frequency, problem: { kind, nodes } }) => [frequency, kind, nodes])).toEqual([
      [0, 'floatingNode', ['d']],
    ]);
    expect(answer.voltage('d')).toBeUndefined();
    expect(answer.voltage('c')?.rms).toBeCloseTo(13, 14);
  });

  it('are the operating frequency alone where no source delivers anything', () => {
    expect(sourceFrequencies({ version: 1, elements: [] }, 7)).toEqual([7]);
  });
});
