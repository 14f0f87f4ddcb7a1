import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { solve, sweep, validateElementList } from '@/solver';
import type { ElementList } from '@/solver';
import { network, resistor, voltageSource } from './support/networks';

const R1 = { id: 'R1', kind: 'resistor', nodes: ['1', '0'], resistance: 50 };
const V1 = { id: 'V1', kind: 'voltageSource', nodes: ['1', '0'], value: { rms: 1, phase: 0, frequency: null } };

const REFUSED: readonly (readonly [string, unknown, RegExp])[] = [
  ['nothing', undefined, /object/],
  ['an array', [], /object/],
  ['a later version', { version: 2, elements: [] }, /version 1/],
  ['no elements', { version: 1 }, /array of elements/],
  ['an element that is none', { version: 1, elements: [7] }, /Element 1 .* not an object/],
  ['no id', { version: 1, elements: [{ ...R1, id: '' }] }, /Element 1 .* id/],
  ['an id twice', { version: 1, elements: [R1, R1] }, /R1 is given twice/],
  ['an unknown kind', { version: 1, elements: [{ ...R1, kind: 'memristor' }] }, /R1 has no known kind.*resistor/],
  ['a kind from the prototype', { version: 1, elements: [{ ...R1, kind: 'toString' }] }, /no known kind/],
  ['one node', { version: 1, elements: [{ ...R1, nodes: ['1'] }] }, /R1 needs two nodes/],
  ['a node that is a number', { version: 1, elements: [{ ...R1, nodes: ['1', 0] }] }, /R1 needs two nodes/],
  ['a very long node name', { version: 1, elements: [{ ...R1, nodes: ['1', 'x'.repeat(201)] }] }, /1 to 200/],
  ['no value', { version: 1, elements: [{ ...R1, resistance: undefined }] }, /R1 needs a finite number of ohms/],
  ['a value that is text', { version: 1, elements: [{ ...R1, resistance: '50' }] }, /finite number of ohms/],
  ['a value that is not finite', { version: 1, elements: [{ ...R1, resistance: Infinity }] }, /finite number of ohms/],
  ['a source without value', { version: 1, elements: [{ ...V1, value: null }] }, /V1 needs a value/],
  ['no rms', { version: 1, elements: [{ ...V1, value: { phase: 0, frequency: null } }] }, /rms/],
  ['no phase', { version: 1, elements: [{ ...V1, value: { rms: 1, frequency: null } }] }, /degrees/],
  [
    'a negative frequency',
    { version: 1, elements: [{ ...V1, value: { rms: 1, phase: 0, frequency: -1 } }] },
    /frequency/,
  ],
  ['no frequency', { version: 1, elements: [{ ...V1, value: { rms: 1, phase: 0 } }] }, /frequency/],
  ['too many elements', { version: 1, elements: Array.from({ length: 20_001 }, () => R1) }, /more than 20000/],
];

describe('validateElementList', () => {
  it('takes a valid list, and passes over fields that it does not know', () => {
    const result = validateElementList({ version: 1, elements: [{ ...R1, colour: 'red' }, V1], note: 'x' });
    expect(result.ok).toBe(true);
    if (result.ok) expect(result.list.elements.map(({ id }) => id)).toEqual(['R1', 'V1']);
  });

  it.each(REFUSED)('refuses %s in a sentence', (_, value, words) => {
    const result = validateElementList(value);
    expect(result.ok).toBe(false);
    if (!result.ok) expect(result.message).toMatch(words);
    expect(solve(value as ElementList, { frequency: 50 })).toMatchObject({ ok: false, kind: 'invalid' });
    expect(sweep(value as ElementList, { frequencies: [50], outputs: [] })).toMatchObject({
      ok: false,
      kind: 'invalid',
    });
  });

  it('never throws, whatever comes in', () => {
    fc.assert(
      fc.property(fc.anything(), (value) => typeof validateElementList(value).ok === 'boolean'),
      { seed: 20260105, numRuns: 500 },
    );
  });

  it.each([Number.NaN, Infinity, -1])('refuses a frequency of %d', (frequency) => {
    const list = network(voltageSource('V1', '1', '0', 1), resistor('R1', '1', '0', 50));
    expect(solve(list, { frequency })).toMatchObject({ ok: false, kind: 'invalid' });
    expect(sweep(list, { frequencies: [50, frequency], outputs: [] })).toMatchObject({ ok: false, kind: 'invalid' });
  });
});
