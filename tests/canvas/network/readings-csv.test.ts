import { describe, expect, it } from 'vitest';
import { readingsCsv } from '@/canvas/network/readings-csv';
import { readNetwork } from '@/canvas/network/readings';
import type { SheetDocument } from '@/canvas/document/types';
import { SheetBuilder } from '../../support/sheet-builder';
import { dividerSheet } from '../../support/sample-sheets';

function csvOf(document: SheetDocument, filter?: string): readonly string[] {
  const text = readingsCsv(document, readNetwork(document), filter);
  expect(text.endsWith('\r\n')).toBe(true);
  expect(text.replace(/\r\n/g, '')).not.toMatch(/[\r\n]/);
  return text.slice(0, -2).split('\r\n');
}

/** A divider whose middle node has the name, which decides nothing else. */
function named(name: string): SheetDocument {
  const document = dividerSheet();
  return {
    ...document,
    parts: document.parts.map((part) => (part.kind === 'nodeName' ? { ...part, values: { name } } : part)),
  };
}

describe('readings as comma-separated values', () => {
  it('have a line for each quantity of each part and for each node', () => {
    const [head, ...lines] = csvOf(dividerSheet());
    expect(head).toBe('kind,name,quantity,real,imaginary,magnitude,angle_deg,unit,convention,frequency_Hz');
    expect(lines.map((line) => line.split(',').slice(0, 3).join(' '))).toEqual([
      ...['R1', 'R2', 'VS1'].map((name) => `part ${name} current`),
      ...['R1', 'R2', 'VS1'].map((name) => `part ${name} voltage`),
      ...['R1', 'R2', 'VS1'].map((name) => `part ${name} complex power`),
      'node 0 voltage',
      'node 1 voltage',
      'node out voltage',
    ]);
    expect(lines[0]).toBe('part,R1,current,0.0005,0,0.0005,0,A,rms,1000');
  });

  it('are in the convention: peak for voltages and currents, and never for powers', () => {
    const peak = csvOf(dividerSheet({ convention: { amplitude: 'peak', form: 'polar' } }));
    const cells = (start: string) => peak.find((line) => line.startsWith(start))?.split(',') ?? [];
    expect(Number(cells('node,1,')[3])).toBeCloseTo(Math.SQRT2, 14);
    expect(cells('node,1,')[8]).toBe('peak');
    expect(Number(cells('part,R1,complex power')[3])).toBeCloseTo(0.25e-3, 16);
    expect(cells('part,R1,complex power')[8]).toBe('rms');
  });

  it('are direct at 0 Hz, and not multiplied', () => {
    const direct = csvOf(dividerSheet({ operatingFrequency: '0 Hz', convention: { amplitude: 'peak', form: 'polar' } }));
    const cells = direct.find((line) => line.startsWith('node,1,'))?.split(',') ?? [];
    expect([cells[3], cells[8], cells[9]]).toEqual(['1', 'direct', '0']);
  });

  it.each([
    ['+5V', "'+5V"],
    ['-12', "'-12"],
  ])('defuse the name %s, which a spreadsheet would take for a formula', (name, cell) => {
    expect(csvOf(named(name)).some((line) => line.startsWith(`node,${cell},`))).toBe(true);
  });

  it('defuse and quote what a document from elsewhere may have for a name', () => {
    const evil = csvOf(named('=HYPERLINK("a","b")')).find((line) => line.includes('HYPERLINK'));
    expect(evil?.startsWith(`node,"'=HYPERLINK(""a"",""b"")",voltage,`)).toBe(true);
    expect(csvOf(named('@x')).some((line) => line.startsWith("node,'@x,"))).toBe(true);
  });

  it('leave what is not determined empty', () => {
    const sheet = new SheetBuilder();
    sheet.resistor(100, 100, 'nonsense');
    expect(csvOf(sheet.document())[1]).toBe('part,R1,current,,,,,A,rms,1000');
  });

  it('hold only the names asked for', () => {
    expect(csvOf(dividerSheet(), 'out').slice(1)).toHaveLength(1);
  });
});
