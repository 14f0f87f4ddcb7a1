import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { addPart, moveParts, removeFromSheet, turnParts } from '@/canvas/commands/edits/parts';
import { setValues } from '@/canvas/commands/edits/values';
import { selectParts } from '@/canvas/document/selection';
import type { SheetDocument } from '@/canvas/document/types';
import { readNetwork } from '@/canvas/network/readings';
import { createSheetStore } from '@/canvas/store/sheet-store';
import { anySheet } from '../../support/arbitrary-sheets';
import { nodePartition } from '../../support/partition';
import { dividerSheet } from '../../support/sample-sheets';

function valued(document: SheetDocument, id: string, values: Record<string, string>): SheetDocument {
  const result = setValues(document, id, values);
  if (!result.ok) throw new Error(result.message);
  return result.document;
}

const nudged = (document: SheetDocument) => moveParts(document, new Set(['resistor-1']), { x: 10, y: 0 });

describe('the bounds of a sheet', () => {
  it('are kept to: an edit that could not be saved is refused in words and changes nothing', () => {
    const sheet = dividerSheet();
    const store = createSheetStore(sheet, true);
    const everything = new Set(sheet.parts.map(({ id }) => id));
    store.getState().apply({ label: 'Move', document: moveParts(sheet, everything, { x: 200_000, y: 0 }) });
    expect(store.getState().document).toBe(sheet);
    expect(store.getState().history.past).toHaveLength(0);
    expect(store.getState().spoken.text).toMatch(/beyond the edge of the sheet/);

    const [part] = sheet.parts;
    if (!part) throw new Error('the divider has parts');
    const many = Array.from({ length: 5001 }, (_, index) => ({ ...part, id: `p${index}` }));
    store.getState().apply({ label: 'Paste', document: { ...sheet, parts: many } });
    expect(store.getState().document).toBe(sheet);
    expect(store.getState().spoken.text).toMatch(/at most 5000 parts/);
  });
});

describe('the store of an open sheet', () => {
  it('has the readings of its document in the same step as the document', () => {
    const store = createSheetStore(dividerSheet(), true);
    const seen: boolean[] = [];
    store.subscribe((state) => seen.push(JSON.stringify([...state.readings.nodes]) === JSON.stringify([...readNetwork(state.document).nodes])));
    store.getState().apply({ label: 'Set R1', document: valued(store.getState().document, 'resistor-1', { resistance: '3k' }) });
    store.getState().undo();
    store.getState().redo();
    expect(seen).toEqual([true, true, true]);
    expect(store.getState().readings.nodes.get('out')?.re).toBeCloseTo(0.25, 15);
  });

  it('undoes step by step to where it began, and does again to where it was', () => {
    fc.assert(
      fc.property(anySheet(), fc.array(fc.nat({ max: 3 }), { minLength: 1, maxLength: 8 }), (sheet, kinds) => {
        const store = createSheetStore(sheet, true);
        const passed: SheetDocument[] = [sheet];
        kinds.forEach((kind, index) => {
          const { document } = store.getState();
          const ids = new Set(document.parts.slice(0, 1 + (index % 3)).map(({ id }) => id));
          const next =
            kind === 0
              ? addPart(document, 'inductor', { at: { x: 900, y: index * 100 }, turn: 0, mirrored: false }, `n${index}`).document
              : kind === 1
                ? moveParts(document, ids, { x: 10, y: 10 })
                : kind === 2
                  ? turnParts(document, ids, 1)
                  : removeFromSheet(document, ids, new Set());
          store.getState().apply({ label: `step ${index}`, document: next });
          if (next !== document) passed.push(next);
        });
        const last = store.getState().document;
        for (const expected of [...passed].reverse().slice(1)) {
          store.getState().undo();
          expect(store.getState().document).toBe(expected);
        }
        expect(nodePartition(store.getState().document)).toEqual(nodePartition(sheet));
        store.getState().undo();
        expect(store.getState().document).toBe(sheet);
        for (let step = 1; step < passed.length; step += 1) store.getState().redo();
        expect(store.getState().document).toBe(last);
      }),
      { numRuns: 60 },
    );
  });

  it('makes one step of the edits of one gesture', () => {
    const store = createSheetStore(dividerSheet(), true);
    for (let frame = 0; frame < 5; frame += 1) {
      store.getState().apply({ label: 'Move R1', document: nudged(store.getState().document), gesture: 'drag' });
    }
    expect(store.getState().history.past).toHaveLength(1);
    store.getState().undo();
    expect(store.getState().document).toEqual(dividerSheet());
    store.getState().redo();
    expect(store.getState().document.parts.find(({ id }) => id === 'resistor-1')?.at.x).toBe(380);
  });

  it('ends a gesture when it is told to, when another begins, and when one is undone', () => {
    const store = createSheetStore(dividerSheet(), true);
    const move = (gesture?: string) => store.getState().apply({ label: 'Move R1', document: nudged(store.getState().document), gesture });
    move('drag 1');
    store.getState().endGesture();
    move('drag 1');
    expect(store.getState().history.past).toHaveLength(2);
    move('drag 2');
    expect(store.getState().history.past).toHaveLength(3);
    move();
    move();
    expect(store.getState().history.past).toHaveLength(5);
    store.getState().undo();
    move('drag 2');
    expect(store.getState().history.past).toHaveLength(5);
    expect(store.getState().history.future).toEqual([]);
  });

  it('makes no step of an edit that changes nothing', () => {
    const store = createSheetStore(dividerSheet(), true);
    store.getState().apply({ label: 'Nothing', document: store.getState().document });
    expect(store.getState().history.past).toEqual([]);
    store.getState().undo();
    expect(store.getState().document).toEqual(dividerSheet());
  });

  it('forgets what was undone when something else is done instead', () => {
    const store = createSheetStore(dividerSheet(), true);
    store.getState().apply({ label: 'Move R1', document: nudged(store.getState().document) });
    store.getState().undo();
    store.getState().apply({ label: 'Delete R2', document: removeFromSheet(store.getState().document, new Set(['resistor-2']), new Set()) });
    expect(store.getState().history.future).toEqual([]);
  });

  it('gives back the selection with the document, and selects nothing that is gone', () => {
    const store = createSheetStore(dividerSheet(), true);
    store.getState().select(selectParts(['resistor-2']));
    store.getState().apply({ label: 'Delete R2', document: removeFromSheet(store.getState().document, new Set(['resistor-2']), new Set()) });
    expect(store.getState().selection.parts.size).toBe(0);
    store.getState().undo();
    expect([...store.getState().selection.parts]).toEqual(['resistor-2']);
    store.getState().select(selectParts(['resistor-2', 'no such part']));
    expect([...store.getState().selection.parts]).toEqual(['resistor-2']);
  });

  it('lets those who may only look change the frequency and the conventions, and nothing else', () => {
    const store = createSheetStore(dividerSheet(), false);
    const { document } = store.getState();
    store.getState().apply({ label: 'Move R1', document: nudged(document) });
    store.getState().apply({ label: 'Purpose', document: { ...document, purpose: 'mine' } });
    store.getState().apply({ label: 'No wires', document: { ...document, wires: [] } });
    expect(store.getState().document).toBe(document);
    store.getState().apply({ label: 'Frequency', document: { ...document, operatingFrequency: '5 kHz' } });
    expect(store.getState().document.operatingFrequency).toBe('5 kHz');
    expect(store.getState().readings.frequencyHz).toBe(5000);
  });

  it('takes another document in place of this one with no way back', () => {
    const store = createSheetStore(dividerSheet(), true);
    store.getState().apply({ label: 'Move R1', document: nudged(store.getState().document) });
    store.getState().select(selectParts(['resistor-1']));
    const other = dividerSheet({ purpose: 'theirs' });
    store.getState().replace(other);
    store.getState().undo();
    expect(store.getState().document).toBe(other);
    expect(store.getState().selection.parts.size).toBe(0);
  });

  it('says the same words twice when they are said twice', () => {
    const store = createSheetStore(dividerSheet(), true);
    store.getState().say('Joined.');
    const first = store.getState().spoken;
    store.getState().say('Joined.');
    expect(store.getState().spoken).toEqual({ text: 'Joined.', count: first.count + 1 });
  });
});
