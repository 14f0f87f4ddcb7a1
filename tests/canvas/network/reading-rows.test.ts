import { describe, expect, it } from 'vitest';
import { compareNames, filterRows, orderRows, readingRows, type ReadingRow } from '@/canvas/network/reading-rows';
import { readNetwork } from '@/canvas/network/readings';
import { SheetBuilder } from '../../support/sheet-builder';
import { dividerSheet } from '../../support/sample-sheets';

const POLAR = { amplitude: 'rms', form: 'polar' } as const;

function row(name: string, re: number | null, im = 0): ReadingRow {
  return { id: name, name, phasor: re === null ? null : { re, im } };
}

function names(rows: readonly ReadingRow[]): readonly string[] {
  return rows.map(({ name }) => name);
}

describe('the order of names', () => {
  it('counts numbers as people do', () => {
    expect(['R10', 'R2', 'C1', 'R1'].sort(compareNames)).toEqual(['C1', 'R1', 'R2', 'R10']);
  });
});

describe('the order of lines', () => {
  const rows = [row('R1', 0, -3), row('R2', null), row('R10', 1), row('R3', -2)];

  it('goes by name, either way', () => {
    expect(names(orderRows(rows, { by: 'name', descending: false }, 'current', POLAR))).toEqual(['R1', 'R2', 'R3', 'R10']);
    expect(names(orderRows(rows, { by: 'name', descending: true }, 'current', POLAR))).toEqual(['R10', 'R3', 'R2', 'R1']);
  });

  it('goes by magnitude and by angle, and what is not determined comes last either way', () => {
    expect(names(orderRows(rows, { by: 'first', descending: true }, 'current', POLAR))).toEqual(['R1', 'R3', 'R10', 'R2']);
    expect(names(orderRows(rows, { by: 'first', descending: false }, 'current', POLAR))).toEqual(['R10', 'R3', 'R1', 'R2']);
    expect(names(orderRows(rows, { by: 'second', descending: false }, 'current', POLAR))).toEqual(['R1', 'R10', 'R3', 'R2']);
  });

  it('goes by active and reactive power with their signs, and by the signed value at 0 Hz', () => {
    expect(names(orderRows(rows, { by: 'first', descending: false }, 'power', POLAR))).toEqual(['R3', 'R1', 'R10', 'R2']);
    expect(names(orderRows(rows, { by: 'second', descending: false }, 'power', POLAR))).toEqual(['R1', 'R3', 'R10', 'R2']);
    expect(names(orderRows(rows, { by: 'first', descending: false }, 'current', 'direct'))).toEqual(['R3', 'R1', 'R10', 'R2']);
  });

  it('does not let what rounding left of a power decide between zeros', () => {
    const lossless = [row('L1', 1e-18, 1), row('C1', -1e-18, -1), row('R1', 2)];
    expect(names(orderRows(lossless, { by: 'first', descending: true }, 'power', POLAR))).toEqual(['R1', 'C1', 'L1']);
  });
});

describe('filtering', () => {
  it('keeps names that hold the text, in either case, and all for an empty one', () => {
    const rows = [row('R1', 1), row('VS1', 1), row('out', 1)];
    expect(names(filterRows(rows, ' r1 '))).toEqual(['R1']);
    expect(names(filterRows(rows, 'S'))).toEqual(['VS1']);
    expect(filterRows(rows, '  ')).toBe(rows);
  });
});

describe('the lines of a sheet', () => {
  it('are every element, or every node that an element touches', () => {
    const document = dividerSheet();
    const readings = readNetwork(document);
    expect([...names(readingRows(document, readings, 'current'))].sort()).toEqual(['R1', 'R2', 'VS1']);
    expect([...names(readingRows(document, readings, 'node'))].sort()).toEqual(['0', '1', 'out']);
    const out = readingRows(document, readings, 'node').find(({ name }) => name === 'out');
    expect(out?.phasor?.re).toBeCloseTo(0.5, 14);
  });

  it('have no figures while the readings are withheld', () => {
    const sheet = new SheetBuilder();
    sheet.part('resistor', 100, 100, { values: { resistance: 'many' } });
    const document = sheet.document();
    const rows = readingRows(document, readNetwork(document), 'voltage');
    expect(rows).toEqual([{ id: 'resistor-1', name: 'R1', phasor: null }]);
  });
});
