import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { MAX_COORDINATE, MAX_DOCUMENT_CHARACTERS, MAX_PARTS, MAX_PURPOSE, MAX_TEXT } from '@/canvas/document/limits';
import { emptySheetDocument, parseSheetDocument, serializeSheetDocument, validateSheetDocument } from '@/canvas/document/schema';
import { anySheet } from '../../support/arbitrary-sheets';
import { dividerSheet, ladderSheet } from '../../support/sample-sheets';

function refusal(data: unknown): string {
  const result = validateSheetDocument(data);
  if (result.ok) throw new Error('this should have been refused');
  return result.message;
}

describe('the sheet document', () => {
  it('comes back from its text as it was', () => {
    fc.assert(
      fc.property(anySheet(), (sheet) => {
        expect(parseSheetDocument(serializeSheetDocument(sheet))).toEqual({ ok: true, document: sheet });
      }),
    );
  });

  it('has one text, whatever the order of its keys', () => {
    const sheet = dividerSheet();
    const shuffled = {
      wires: sheet.wires,
      parts: sheet.parts.map(({ values, kind, at, ...rest }) => ({ values, kind, at: { y: at.y, x: at.x }, ...rest })),
      convention: sheet.convention,
      band: { toHz: sheet.band.toHz, fromHz: sheet.band.fromHz },
      operatingFrequency: sheet.operatingFrequency,
      purpose: sheet.purpose,
      version: sheet.version,
    };
    expect(JSON.stringify(shuffled)).not.toBe(JSON.stringify(sheet));
    expect(serializeSheetDocument(shuffled)).toBe(serializeSheetDocument(sheet));
  });

  it('is accepted empty, and with 200 parts', () => {
    expect(validateSheetDocument(emptySheetDocument()).ok).toBe(true);
    expect(validateSheetDocument(ladderSheet(200)).ok).toBe(true);
  });

  it('does not change what was handed in', () => {
    const given = JSON.stringify({ ...dividerSheet(), wires: [{ id: 'w', from: { part: 'x', pin: 'a' }, to: { part: 'y', pin: 'a' }, corners: [] }] });
    const data: unknown = JSON.parse(given);
    validateSheetDocument(data);
    expect(JSON.stringify(data)).toBe(given);
  });
});

describe('what is no sheet document', () => {
  it('of a newer version is told apart from a broken one', () => {
    expect(refusal({ ...emptySheetDocument(), version: 2 })).toMatch(/newer version of Ohmstead \(document version 2/);
  });

  it.each([undefined, null, 0, 'sheet', [], {}, { version: '1' }, { version: 0 }, { version: NaN }, { ...emptySheetDocument(), version: 1.5 }])(
    'is refused in words: %j',
    (data) => {
      expect(refusal(data).length).toBeGreaterThan(20);
    },
  );

  it('names the place of the fault', () => {
    expect(refusal({ ...dividerSheet(), operatingFrequency: 5 })).toContain('operatingFrequency');
    const parts = dividerSheet().parts.map((part, index) => (index === 2 ? { ...part, turn: 45 } : part));
    expect(refusal({ ...dividerSheet(), parts })).toContain('parts.2.turn');
  });

  const withPart = (change: object) => ({ ...dividerSheet(), parts: [{ ...dividerSheet().parts[0], ...change }], wires: [] });

  it.each([
    ['a kind that does not exist', { kind: 'wormhole' }],
    ['a kind from the prototype', { kind: 'constructor' }],
    ['an id with a path in it', { id: '../../etc' }],
    ['an id with markup in it', { id: '<b>' }],
    ['an id too long', { id: 'x'.repeat(41) }],
    ['a place that is not whole', { at: { x: 0.5, y: 0 } }],
    ['a place that is no number', { at: { x: null, y: 0 } }],
    ['a place far outside', { at: { x: MAX_COORDINATE + 1, y: 0 } }],
    ['a turn between quarters', { turn: 45 }],
    ['a value that is no text', { values: { amplitude: 1 } }],
    ['a value too long', { values: { amplitude: '1'.repeat(MAX_TEXT + 1) } }],
    ['a mirror that is no yes or no', { mirrored: 'yes' }],
  ])('with %s is refused', (_what, change) => {
    expect(validateSheetDocument(withPart({})).ok).toBe(true);
    refusal(withPart(change));
  });

  it.each([
    ['a band that falls', { band: { fromHz: 100, toHz: 10 } }],
    ['a band of one frequency', { band: { fromHz: 100, toHz: 100 } }],
    ['a band from zero', { band: { fromHz: 0, toHz: 100 } }],
    ['a convention of its own', { convention: { amplitude: 'average', form: 'polar' } }],
    ['a purpose without end', { purpose: 'a'.repeat(MAX_PURPOSE + 1) }],
    ['no frequency', { operatingFrequency: '' }],
    ['parts that are no list', { parts: {} }],
    ['wires that are no list', { wires: 'none' }],
  ])('with %s is refused', (_what, change) => {
    refusal({ ...emptySheetDocument(), ...change });
  });

  it('is refused when it holds more parts than a sheet may', () => {
    const [part] = dividerSheet().parts;
    refusal({ ...emptySheetDocument(), parts: Array.from({ length: MAX_PARTS + 1 }, (_, index) => ({ ...part, id: `p${index}` })) });
  });

  it('is refused as text when it is cut short, too long, or nested without end', () => {
    const text = serializeSheetDocument(dividerSheet());
    expect(parseSheetDocument(text.slice(0, -1)).ok).toBe(false);
    expect(parseSheetDocument(text.padEnd(MAX_DOCUMENT_CHARACTERS + 1))).toMatchObject({ ok: false, message: expect.stringContaining('too large') });
    expect(parseSheetDocument('['.repeat(500_000)).ok).toBe(false);
    expect(parseSheetDocument(`${'['.repeat(100_000)}${']'.repeat(100_000)}`).ok).toBe(false);
    expect(parseSheetDocument(`${'{"parts":'.repeat(50_000)}1${'}'.repeat(50_000)}`).ok).toBe(false);
  });

  it('never throws, whatever it is', () => {
    fc.assert(
      fc.property(fc.anything({ withNullPrototype: true, withBigInt: true, withDate: true, withMap: true }), (data) => {
        expect(validateSheetDocument(data).ok).toBe(false);
      }),
    );
    fc.assert(
      fc.property(fc.string(), (text) => {
        expect(parseSheetDocument(text).ok).toBe(false);
      }),
    );
  });

  it('never throws where a good document has one thing exchanged for something else', () => {
    const good = JSON.parse(serializeSheetDocument(dividerSheet())) as Record<string, unknown>;
    fc.assert(
      fc.property(fc.constantFrom(...Object.keys(good)), fc.jsonValue(), (key, value) => {
        const result = validateSheetDocument({ ...good, [key]: value });
        expect(typeof result.ok).toBe('boolean');
      }),
    );
  });
});

describe('names that JavaScript gives a meaning to', () => {
  it('do not reach the prototype of anything', () => {
    const text = serializeSheetDocument(dividerSheet()).replace('"values":{', '"values":{"__proto__":"polluted","constructor":"polluted",');
    const result = parseSheetDocument(text);
    expect(result.ok).toBe(true);
    if (!result.ok) return;
    expect(Object.keys(result.document.parts[0]?.values ?? {}).sort()).toEqual(['amplitude', 'frequency', 'measure', 'phase', 'wave']);
    expect(Object.getPrototypeOf(result.document.parts[0]?.values)).toBe(Object.prototype);
    expect(({} as Record<string, unknown>)['polluted']).toBeUndefined();
  });

  it('at the top of a document are dropped with all that is not known', () => {
    const text = serializeSheetDocument(dividerSheet()).replace('{', '{"__proto__":{"admin":true},"extra":1,');
    const result = parseSheetDocument(text);
    expect(result).toEqual({ ok: true, document: dividerSheet() });
    expect('admin' in {}).toBe(false);
  });

  it('are ids and designators like any other', () => {
    const sheet = dividerSheet();
    const renamed = JSON.stringify(sheet).replaceAll('"resistor-1"', '"__proto__"').replace('"R1"', '"constructor"');
    const result = parseSheetDocument(renamed);
    expect(result.ok && result.document.parts.some(({ id }) => id === '__proto__')).toBe(true);
    expect(result.ok && result.document.wires).toHaveLength(sheet.wires.length);
  });
});
