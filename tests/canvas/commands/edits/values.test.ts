import { describe, expect, it } from 'vitest';
import { setDesignator, setValues } from '@/canvas/commands/edits/values';
import { dividerSheet } from '../../../support/sample-sheets';

describe('giving values', () => {
  const values = (id: string, given: Readonly<Record<string, string>>) => setValues(dividerSheet(), id, given);

  it('takes what can be read, as it was typed, without the spaces around it', () => {
    const result = values('resistor-1', { resistance: ' 4k7 ' });
    expect(result.ok && result.document.parts.find(({ id }) => id === 'resistor-1')?.values).toEqual({ resistance: '4k7' });
  });

  it.each<[string, Record<string, string>]>([
    ['resistor-1', { resistance: 'many' }],
    ['resistor-1', { resistance: '5 V' }],
    ['resistor-1', { resistance: '' }],
    ['resistor-1', { capacitance: '5n' }],
    ['voltageSource-1', { frequency: '-50 Hz' }],
    ['voltageSource-1', { measure: 'mean' }],
    ['voltageSource-1', { phase: 'late' }],
    ['voltageSource-1', { amplitude: '5', phase: 'late' }],
    ['nodeName-1', { name: '0' }],
    ['nodeName-1', { name: 'a b' }],
    ['nodeName-1', { name: '' }],
    ['gone', { resistance: '1k' }],
    ['resistor-1', { constructor: '1' }],
  ])('refuses, with a sentence, and the old value stays: %s %j', (id, given) => {
    const result = values(id, given);
    expect(result).toMatchObject({ ok: false, message: expect.stringMatching(/^.{10,}\.$/) });
  });

  it('takes frequencies in hertz and in radians a second, and none for the operating one', () => {
    for (const frequency of ['50', '50 Hz', '314.16 rad/s', '0 Hz', '']) expect(values('voltageSource-1', { frequency }).ok).toBe(true);
  });

  it('is no edit when nothing changes', () => {
    const sheet = dividerSheet();
    expect(setValues(sheet, 'resistor-1', { resistance: '1k' })).toEqual({ ok: true, document: sheet });
    const result = setValues(sheet, 'resistor-1', { resistance: ' 1k' });
    expect(result.ok && result.document).toBe(sheet);
  });
});

describe('giving a designator', () => {
  it('takes one that is free', () => {
    const result = setDesignator(dividerSheet(), 'resistor-1', ' Rlimit ');
    expect(result.ok && result.document.parts.find(({ id }) => id === 'resistor-1')?.designator).toBe('Rlimit');
  });

  it.each([
    ['resistor-1', 'R2'],
    ['resistor-1', ''],
    ['resistor-1', '1R'],
    ['resistor-1', 'R 1'],
    ['resistor-1', 'R123456789012345678'],
    ['junction-1', 'J1'],
    ['gone', 'R9'],
  ])('refuses %s %j with a sentence', (id, wanted) => {
    expect(setDesignator(dividerSheet(), id, wanted)).toMatchObject({ ok: false, message: expect.stringMatching(/\.$/) });
  });
});
