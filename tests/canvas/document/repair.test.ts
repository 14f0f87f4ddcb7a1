import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { designatorsOf } from '@/canvas/document/lookup';
import { repair } from '@/canvas/document/repair';
import type { Part, SheetDocument } from '@/canvas/document/types';
import { anySheet } from '../../support/arbitrary-sheets';
import { dividerSheet } from '../../support/sample-sheets';

function change(sheet: SheetDocument, id: string, by: Partial<Part>): SheetDocument {
  return { ...sheet, parts: sheet.parts.map((part) => (part.id === id ? { ...part, ...by } : part)) };
}

function partOf(sheet: SheetDocument, id: string): Part {
  const found = sheet.parts.find((part) => part.id === id);
  if (!found) throw new Error(`${id} is not on the sheet`);
  return found;
}

describe('mending a document', () => {
  it('leaves a good one alone, and one that it mended too', () => {
    fc.assert(
      fc.property(anySheet(), (sheet) => {
        expect(repair(sheet)).toEqual(sheet);
      }),
    );
    const broken = change(dividerSheet(), 'resistor-2', { designator: 'R1', values: {} });
    expect(repair(repair(broken))).toEqual(repair(broken));
  });

  it('keeps the first of two parts or wires with one id', () => {
    const sheet = dividerSheet();
    const twin = { ...partOf(sheet, 'resistor-1'), at: { x: 900, y: 900 } };
    const mended = repair({ ...sheet, parts: [...sheet.parts, twin], wires: [...sheet.wires, ...sheet.wires] });
    expect(mended).toEqual(sheet);
  });

  it('gives the later of two equal designators the first free one, and takes none from a part that is right', () => {
    const mended = repair(change(dividerSheet(), 'resistor-1', { designator: 'R2' }));
    expect(partOf(mended, 'resistor-1').designator).toBe('R2');
    expect(partOf(mended, 'resistor-2').designator).toBe('R1');
  });

  it('gives a designator where one is missing or cannot be one, and takes it where there is none to be', () => {
    expect(partOf(repair(change(dividerSheet(), 'resistor-1', { designator: '' })), 'resistor-1').designator).toBe('R1');
    expect(partOf(repair(change(dividerSheet(), 'resistor-1', { designator: '1R' })), 'resistor-1').designator).toBe('R1');
    expect(partOf(repair(change(dividerSheet(), 'junction-1', { designator: 'J1' })), 'junction-1').designator).toBe('');
  });

  it('completes missing fields, drops unknown ones, and puts back a choice that does not exist', () => {
    const source = partOf(dividerSheet(), 'voltageSource-1');
    const mended = repair(change(dividerSheet(), source.id, { values: { amplitude: '5 V', measure: 'average', colour: 'red' } }));
    expect(partOf(mended, source.id).values).toEqual({ amplitude: '5 V', measure: 'rms', wave: 'cosine', phase: '0', frequency: '' });
  });

  it('keeps a value that cannot be read: it is shown and named, never silently replaced', () => {
    const mended = repair(change(dividerSheet(), 'resistor-1', { values: { resistance: 'four k seven' } }));
    expect(partOf(mended, 'resistor-1').values).toEqual({ resistance: 'four k seven' });
  });

  it('drops wires that end on nothing, or begin and end on one pin', () => {
    const sheet = dividerSheet();
    const loose = { id: 'l1', from: { part: 'resistor-1', pin: 'z' }, to: { part: 'resistor-2', pin: 'a' }, corners: [] };
    const gone = { id: 'l2', from: { part: 'no such part', pin: 'a' }, to: { part: 'resistor-2', pin: 'a' }, corners: [] };
    const self = { id: 'l3', from: { part: 'resistor-2', pin: 'a' }, to: { part: 'resistor-2', pin: 'a' }, corners: [] };
    expect(repair({ ...sheet, wires: [...sheet.wires, loose, gone, self] })).toEqual(sheet);
  });

  it.each(['', '0', ' ', 'a b', 'x'.repeat(17), '<i>'])('gives a node name that cannot be one (%j) a free one', (name) => {
    const mended = repair(change(dividerSheet(), 'nodeName-1', { values: { name } }));
    expect(partOf(mended, 'nodeName-1').values['name']).toMatch(/^[\p{L}\p{N}]{1,16}$/u);
    expect(partOf(mended, 'nodeName-1').values['name']).not.toBe('0');
  });

  it('does not join two nodes by giving both the same name', () => {
    const sheet = dividerSheet();
    const second: Part = { ...partOf(sheet, 'nodeName-1'), id: 'second', at: { x: 300, y: 200 }, values: { name: '' } };
    const third: Part = { ...second, id: 'third', at: { x: 200, y: 290 }, values: {} };
    const names = repair({ ...sheet, parts: [...sheet.parts, second, third] }).parts.flatMap(({ kind, values }) => (kind === 'nodeName' ? [values['name']] : []));
    expect(new Set(names).size).toBe(3);
    expect(names[0]).toBe('out');
  });

  it('always ends with unique ids, unique designators, and wires that end on pins', () => {
    fc.assert(
      fc.property(anySheet(), fc.array(fc.constantFrom('R1', 'R2', 'C1', '', '?'), { minLength: 12, maxLength: 12 }), (sheet, marks) => {
        const parts = sheet.parts.map((part, index) => ({ ...part, id: `p${index % 7}`, designator: marks[index] ?? '' }));
        const mended = repair({ ...sheet, parts });
        expect(new Set(mended.parts.map(({ id }) => id)).size).toBe(mended.parts.length);
        const designated = mended.parts.filter(({ designator }) => designator !== '');
        expect(designatorsOf(mended).size).toBe(designated.length);
        expect(repair(mended)).toEqual(mended);
      }),
    );
  });
});
