import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseSheetFile, writeSheetFile } from '@/canvas/document/export-file';
import { MAX_DOCUMENT_CHARACTERS } from '@/canvas/document/limits';
import { anySheet } from '../../support/arbitrary-sheets';
import { dividerSheet } from '../../support/sample-sheets';

const GOOD = writeSheetFile({ name: 'Divider', document: dividerSheet() });

function refusal(text: string): string {
  const result = parseSheetFile(text);
  if (result.ok) throw new Error('this should have been refused');
  return result.message;
}

function changed(by: object): string {
  return JSON.stringify({ ...(JSON.parse(GOOD) as object), ...by });
}

describe('a sheet file', () => {
  it('imports as what was exported', () => {
    fc.assert(
      fc.property(anySheet(), fc.string({ minLength: 1, maxLength: 60 }).filter((name) => name.trim() === name && name !== ''), (document, name) => {
        expect(parseSheetFile(writeSheetFile({ name, document }))).toEqual({ ok: true, name, document });
      }),
    );
  });

  it('is lines of JSON that end with a line, so that two can be compared', () => {
    expect(GOOD.split('\n').length).toBeGreaterThan(50);
    expect(GOOD.endsWith('}\n')).toBe(true);
  });

  it('is read with a byte-order mark in front', () => {
    expect(parseSheetFile(`\uFEFF${GOOD}`).ok).toBe(true);
  });

  it('is mended like any document that comes in', () => {
    const document = dividerSheet();
    const broken = { ...document, wires: [...document.wires, ...document.wires] };
    expect(parseSheetFile(writeSheetFile({ name: 'Twice', document: broken }))).toEqual({ ok: true, name: 'Twice', document });
  });
});

describe('what is no sheet file', () => {
  it('says that it is broken, foreign, newer or too large', () => {
    expect(refusal('')).toContain('not JSON');
    expect(refusal(GOOD.slice(0, 300))).toContain('cut short');
    expect(refusal('{"hello":"world"}')).toContain('not a sheet file');
    expect(refusal('[]')).toContain('not a sheet file');
    expect(refusal('null')).toContain('not a sheet file');
    expect(refusal(changed({ format: 'something-else' }))).toContain('not a sheet file');
    expect(refusal(changed({ fileVersion: 9 }))).toContain('newer version');
    expect(refusal(GOOD.padEnd(MAX_DOCUMENT_CHARACTERS + 1))).toContain('too large');
  });

  it('says what is wrong in the document', () => {
    expect(refusal(changed({ document: { ...dividerSheet(), version: 3 } }))).toContain('newer version');
    expect(refusal(changed({ document: null }))).toContain('not a sheet document');
    expect(refusal(changed({ document: undefined }))).toContain('not a sheet file');
    expect(refusal(changed({ document: { ...dividerSheet(), band: 5 } }))).toContain('band');
  });

  it.each([{ name: '' }, { name: '   ' }, { name: 5 }, { name: 'x'.repeat(121) }, { fileVersion: 0 }, { fileVersion: '1' }, { fileVersion: 1.5 }])(
    'is refused: %j',
    (by) => {
      refusal(changed(by));
    },
  );

  it('never throws', () => {
    fc.assert(
      fc.property(fc.json(), (text) => {
        expect(parseSheetFile(text).ok).toBe(false);
      }),
    );
    expect(parseSheetFile('{"a":'.repeat(100_000)).ok).toBe(false);
  });

  it('is known for too large before it is read', () => {
    const started = performance.now();
    refusal('{'.repeat(MAX_DOCUMENT_CHARACTERS + 1));
    expect(performance.now() - started).toBeLessThan(1000);
  });
});
