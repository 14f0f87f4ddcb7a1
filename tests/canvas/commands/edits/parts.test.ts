import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { clip, paste } from '@/canvas/commands/edits/clipboard';
import { addPart, mirrorParts, moveParts, removeFromSheet, turnParts } from '@/canvas/commands/edits/parts';
import { allPins, findPin } from '@/canvas/document/lookup';
import { validateSheetDocument } from '@/canvas/document/schema';
import { selectParts } from '@/canvas/document/selection';
import type { SheetDocument } from '@/canvas/document/types';
import { samePoint, snap, type Point } from '@/canvas/geometry/point';
import { PART_KINDS } from '@/canvas/parts/registry';
import { anySheet, anyTurn, gridPoint } from '../../../support/arbitrary-sheets';
import { nodePartition, partIds } from '../../../support/partition';
import { dividerSheet } from '../../../support/sample-sheets';
import { SheetBuilder } from '../../../support/sheet-builder';

function counter(): () => string {
  let count = 0;
  return () => `new${(count += 1)}`;
}

/** A sheet and some of its parts. */
const sheetAndSome = anySheet().chain((sheet) =>
  fc.subarray(sheet.parts.map(({ id }) => id)).map((ids) => ({ sheet, some: new Set(ids) })),
);

function pinPlaces(sheet: SheetDocument): ReadonlyMap<string, Point> {
  return new Map(allPins(sheet).map(({ ref, at }) => [`${ref.part}/${ref.pin}`, at]));
}

describe('every edit', () => {
  const edits: Record<string, (sheet: SheetDocument, some: ReadonlySet<string>) => SheetDocument> = {
    move: (sheet, some) => moveParts(sheet, some, { x: 30, y: -10 }),
    turn: (sheet, some) => turnParts(sheet, some, 1),
    'mirror left to right': (sheet, some) => mirrorParts(sheet, some, 'leftRight'),
    'mirror top to bottom': (sheet, some) => mirrorParts(sheet, some, 'topBottom'),
    remove: (sheet, some) => removeFromSheet(sheet, some, new Set(sheet.wires.slice(0, 2).map(({ id }) => id))),
    paste: (sheet, some) => paste(sheet, clip(sheet, selectParts(some)), { x: 20, y: 20 }, counter()).document,
    add: (sheet) => addPart(sheet, 'capacitor', { at: { x: 3, y: 4 }, turn: 0, mirrored: false }, 'added').document,
  };

  it.each(Object.entries(edits))('leaves the document that it was given as it was, and gives a good one: %s', (_name, edit) => {
    fc.assert(
      fc.property(sheetAndSome, ({ sheet, some }) => {
        const before = JSON.stringify(sheet);
        const after = edit(sheet, some);
        expect(JSON.stringify(sheet)).toBe(before);
        expect(validateSheetDocument(JSON.parse(JSON.stringify(after)))).toEqual({ ok: true, document: after });
      }),
    );
  });

  it('of nothing is no edit: the same document comes back', () => {
    const sheet = dividerSheet();
    expect(moveParts(sheet, new Set(), { x: 10, y: 0 })).toBe(sheet);
    expect(moveParts(sheet, new Set(['resistor-1']), { x: 0, y: 0 })).toBe(sheet);
    expect(turnParts(sheet, new Set(), 1)).toBe(sheet);
    expect(removeFromSheet(sheet, new Set(), new Set())).toBe(sheet);
  });
});

describe('placing', () => {
  it('gives the first free designator, and snaps to the grid', () => {
    const { part } = addPart(dividerSheet(), 'resistor', { at: { x: 704, y: 96 }, turn: 90, mirrored: true }, 'r');
    expect(part).toMatchObject({ designator: 'R3', at: { x: 700, y: 100 }, turn: 90, mirrored: true, values: { resistance: '1k' } });
    const gap = { ...dividerSheet(), parts: dividerSheet().parts.filter(({ designator }) => designator !== 'R1') };
    expect(addPart(gap, 'resistor', { at: { x: 0, y: 0 }, turn: 0, mirrored: false }, 'r').part.designator).toBe('R1');
  });

  it('does not join a node by the name that a new mark happens to begin with', () => {
    const { part } = addPart(dividerSheet(), 'nodeName', { at: { x: 0, y: 0 }, turn: 0, mirrored: false }, 'n');
    expect(part.values['name']).toBe('out2');
  });

  it('gives every kind its fields', () => {
    for (const kind of PART_KINDS) {
      const { document } = addPart(dividerSheet(), kind, { at: { x: 900, y: 900 }, turn: 0, mirrored: false }, 'x');
      expect(validateSheetDocument(document)).toEqual({ ok: true, document });
    }
  });
});

describe('turning and mirroring', () => {
  it('four quarter turns bring every pin and corner back, whatever is selected', () => {
    fc.assert(
      fc.property(sheetAndSome, ({ sheet, some }) => {
        let turned = sheet;
        for (let quarter = 0; quarter < 4; quarter += 1) turned = turnParts(turned, some, 1);
        expect(turned).toEqual(sheet);
        expect(turnParts(turnParts(sheet, some, 1), some, -1)).toEqual(sheet);
      }),
    );
  });

  it('mirroring twice brings every pin and corner back', () => {
    fc.assert(
      fc.property(sheetAndSome, fc.constantFrom('leftRight' as const, 'topBottom' as const), ({ sheet, some }, axis) => {
        expect(mirrorParts(mirrorParts(sheet, some, axis), some, axis)).toEqual(sheet);
      }),
    );
  });

  it('mirrors the pins as seen on the sheet, however the part is turned', () => {
    fc.assert(
      fc.property(sheetAndSome, ({ sheet, some }) => {
        const before = pinPlaces(sheet);
        const across = pinPlaces(mirrorParts(sheet, some, 'leftRight'));
        const down = pinPlaces(mirrorParts(sheet, some, 'topBottom'));
        // About one common axis: the sum of a pin's coordinate and its image's is the same for all.
        const sums = { x: new Set<number>(), y: new Set<number>() };
        for (const [pin, at] of before) {
          if (!some.has(pin.split('/')[0] ?? '')) {
            expect(across.get(pin)).toEqual(at);
            continue;
          }
          expect(across.get(pin)?.y).toBe(at.y);
          expect(down.get(pin)?.x).toBe(at.x);
          sums.x.add((across.get(pin)?.x ?? NaN) + at.x);
          sums.y.add((down.get(pin)?.y ?? NaN) + at.y);
        }
        expect(sums.x.size).toBeLessThanOrEqual(1);
        expect(sums.y.size).toBeLessThanOrEqual(1);
      }),
    );
  });

  it('turns the pins of a group as one, clockwise', () => {
    const sheet = new SheetBuilder();
    const [left, right] = [sheet.resistor(0, 0, '1k'), sheet.resistor(100, 0, '2k')];
    const turned = turnParts(sheet.document(), new Set([left, right]), 1);
    // The left one goes to the top.
    expect(turned.parts.map(({ at, turn }) => ({ ...at, turn }))).toEqual([
      { x: 50, y: -50, turn: 90 },
      { x: 50, y: 50, turn: 90 },
    ]);
    expect(findPin(turned, { part: left, pin: 'a' })?.at).toEqual({ x: 50, y: -80 });
  });

  it('keeps on the grid', () => {
    fc.assert(
      fc.property(sheetAndSome, ({ sheet, some }) => {
        for (const after of [turnParts(sheet, some, 1), mirrorParts(sheet, some, 'leftRight'), mirrorParts(sheet, some, 'topBottom')]) {
          for (const { at } of after.parts) expect(samePoint(snap(at), at)).toBe(true);
          for (const { corners } of after.wires) for (const corner of corners) expect(samePoint(snap(corner), corner)).toBe(true);
        }
      }),
    );
  });

  it('changes no node of a group that is turned, mirrored or moved whole', () => {
    fc.assert(
      fc.property(anySheet(), (sheet) => {
        const all = partIds(sheet);
        expect(nodePartition(turnParts(sheet, all, 1))).toEqual(nodePartition(sheet));
        expect(nodePartition(mirrorParts(sheet, all, 'topBottom'))).toEqual(nodePartition(sheet));
        expect(nodePartition(moveParts(sheet, all, { x: 70, y: 10 }))).toEqual(nodePartition(sheet));
      }),
    );
  });
});

describe('moving', () => {
  it('takes the corners along of wires whose both ends move, and stretches the others', () => {
    const sheet = new SheetBuilder();
    const [a, b, c] = [sheet.resistor(0, 0, '1'), sheet.resistor(200, 0, '1'), sheet.resistor(400, 0, '1')];
    const corner = { x: 100, y: 50 };
    sheet.wire([a, 'b'], b, [corner]);
    sheet.wire([b, 'b'], c, [corner]);
    const moved = moveParts(sheet.document(), new Set([a, b]), { x: 0, y: 20 });
    expect(moved.wires.map(({ corners }) => corners)).toEqual([[{ x: 100, y: 70 }], [corner]]);
  });

  it('and back is the identity', () => {
    fc.assert(
      fc.property(sheetAndSome, gridPoint, ({ sheet, some }, by) => {
        expect(moveParts(moveParts(sheet, some, by), some, { x: -by.x, y: -by.y })).toEqual(sheet);
      }),
    );
  });
});

describe('turning a placed part about itself', () => {
  it('leaves it where it is', () => {
    fc.assert(
      fc.property(gridPoint, anyTurn, fc.boolean(), (at, turn, mirrored) => {
        const { document } = addPart(dividerSheet(), 'inductor', { at, turn, mirrored }, 'x');
        const turned = turnParts(document, new Set(['x']), 1).parts.find(({ id }) => id === 'x');
        expect(turned?.at).toEqual(at);
        expect(turned?.turn).toBe((turn + 90) % 360);
      }),
    );
  });
});
