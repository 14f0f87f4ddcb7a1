import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { clip, offsetTo, paste, readClipping, writeClipping } from '@/canvas/commands/edits/clipboard';
import { designatorsOf, pinsOf } from '@/canvas/document/lookup';
import { selectAll, selectParts } from '@/canvas/document/selection';
import type { SheetDocument } from '@/canvas/document/types';
import { snap } from '@/canvas/geometry/point';
import { anySheet, gridPoint } from '../../../support/arbitrary-sheets';
import { nodePartition, partIds } from '../../../support/partition';
import { dividerSheet } from '../../../support/sample-sheets';

function counter(): () => string {
  let count = 0;
  return () => `new${(count += 1)}`;
}

/** A sheet and some of its parts. */
const sheetAndSome = anySheet().chain((sheet) =>
  fc.subarray(sheet.parts.map(({ id }) => id)).map((ids) => ({ sheet, some: new Set(ids) })),
);

describe('copying and pasting', () => {
  it('gives fresh ids and free designators, and the wires among the copied', () => {
    fc.assert(
      fc.property(sheetAndSome, gridPoint, ({ sheet, some }, by) => {
        const clipping = clip(sheet, selectParts(some));
        const pasted = paste(sheet, clipping, by, counter());
        expect(pasted.parts).toHaveLength(some.size);
        expect(partIds(pasted.document).size).toBe(sheet.parts.length + some.size);
        const designated = pasted.document.parts.filter(({ designator }) => designator !== '');
        expect(designatorsOf(pasted.document).size).toBe(designated.length);
        expect(new Set(pasted.document.wires.map(({ id }) => id)).size).toBe(pasted.document.wires.length);
        expect(pasted.document.wires.length - sheet.wires.length).toBe(sheet.wires.filter(({ from, to }) => some.has(from.part) && some.has(to.part)).length);
      }),
    );
  });

  it('pastes onto an empty sheet what was there, designators and all', () => {
    const sheet = dividerSheet();
    const empty = { ...sheet, parts: [], wires: [] };
    const pasted = paste(empty, clip(sheet, selectAll(sheet)), { x: 0, y: 0 }, counter());
    const bare = (of: SheetDocument) => of.parts.map(({ kind, at, turn, mirrored, designator, values }) => ({ kind, at, turn, mirrored, designator, values }));
    expect(bare(pasted.document)).toEqual(bare(sheet));
    expect(nodePartition(pasted.document)).toHaveLength(nodePartition(sheet).length);
  });

  it('goes over the clipboard as text and comes back equal', () => {
    fc.assert(
      fc.property(sheetAndSome, ({ sheet, some }) => {
        const clipping = clip(sheet, selectParts(some));
        expect(readClipping(writeClipping(clipping))).toEqual(clipping);
      }),
    );
  });

  it.each(['', 'R1 4k7', '{}', '[]', 'null', '{"format":"ohmstead-parts","version":1}', '{"format":"ohmstead-parts","version":1,"parts":[{"id":"x"}],"wires":[]}', '{"format":"ohmstead-parts","version":2,"parts":[],"wires":[]}'])(
    'takes nothing from a clipboard that holds something else: %s',
    (text) => {
      expect(readClipping(text)).toBeNull();
    },
  );

  it('puts the upper left corner of a clipping where it is wanted, on the grid', () => {
    const clipping = clip(dividerSheet(), selectParts(['resistor-1']));
    const by = offsetTo(clipping, { x: 503, y: 97 });
    expect(snap(by)).toEqual(by);
    const [part] = paste(dividerSheet(), clipping, by, counter()).parts;
    expect(part && Math.abs((pinsOf(part)[0]?.at.x ?? 0) - 503)).toBeLessThanOrEqual(5);
  });
});
