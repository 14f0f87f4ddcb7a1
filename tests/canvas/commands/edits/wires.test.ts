import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { addPart, removeFromSheet } from '@/canvas/commands/edits/parts';
import { connect, splitWire, targetAt } from '@/canvas/commands/edits/wires';
import { allPins, courseOf, coursesOf, findPin } from '@/canvas/document/lookup';
import type { SheetDocument } from '@/canvas/document/types';
import type { Point } from '@/canvas/geometry/point';
import { anySheet } from '../../../support/arbitrary-sheets';
import { nodePartition, partIds } from '../../../support/partition';
import { dividerSheet, ladderSheet } from '../../../support/sample-sheets';
import { SheetBuilder } from '../../../support/sheet-builder';

function counter(): () => string {
  let count = 0;
  return () => `new${(count += 1)}`;
}

/** A sheet and some of its parts. */
const sheetAndSome = anySheet().chain((sheet) =>
  fc.subarray(sheet.parts.map(({ id }) => id)).map((ids) => ({ sheet, some: new Set(ids) })),
);

/** Grid points inside a wire's course, away from every pin: where a hand could end another wire on it. */
function placesOn(sheet: SheetDocument, course: readonly Point[]): Point[] {
  const pins = new Set(allPins(sheet).map(({ at }) => `${at.x},${at.y}`));
  const places: Point[] = [];
  for (let index = 1; index < course.length; index += 1) {
    const [a, b] = [course[index - 1], course[index]];
    if (!a || !b) continue;
    const steps = (Math.abs(b.x - a.x) + Math.abs(b.y - a.y)) / 10;
    for (let step = 0; step <= steps; step += 1) {
      const at = { x: a.x + ((b.x - a.x) * step) / steps, y: a.y + ((b.y - a.y) * step) / steps };
      if (!pins.has(`${at.x},${at.y}`)) places.push(at);
    }
  }
  return places;
}

describe('drawing a wire', () => {
  it('from pin to pin joins their nodes and no others', () => {
    fc.assert(
      fc.property(anySheet(), fc.nat(), fc.nat(), (sheet, first, second) => {
        const pins = allPins(sheet);
        const [from, to] = [pins[first % pins.length], pins[second % pins.length]];
        if (!from || !to) return;
        const result = connect(sheet, { kind: 'pin', ref: from.ref, at: from.at }, { kind: 'pin', ref: to.ref, at: to.at }, [], counter());
        if (!result.ok) {
          expect(result.message).toMatch(/two different pins|joined already/);
          return;
        }
        const before = nodePartition(sheet);
        const after = nodePartition(result.document);
        expect(after.length).toBeGreaterThanOrEqual(before.length - 1);
        expect(result.document.wires).toHaveLength(sheet.wires.length + 1);
      }),
    );
  });

  it('onto a wire makes a junction there, and of that wire two that keep its course', () => {
    const sheet = ladderSheet(6);
    const wire = sheet.wires[0];
    if (!wire) throw new Error('the ladder has wires');
    const course = courseOf(sheet, wire);
    const at = placesOn(sheet, course)[3];
    if (!at) throw new Error('the wire is long enough');
    const free = addPart(sheet, 'resistor', { at: { x: 0, y: 0 }, turn: 0, mirrored: false }, 'free').document;
    const pin = { part: 'free', pin: 'a' };
    const result = connect(free, { kind: 'pin', ref: pin, at: { x: -30, y: 0 } }, { kind: 'wire', wire: wire.id, at }, [], counter());
    if (!result.ok) throw new Error(result.message);
    const junction = result.document.parts.find(({ id }) => !partIds(free).has(id));
    expect(junction).toMatchObject({ kind: 'junction', at });
    expect(result.document.wires).toHaveLength(free.wires.length + 2);
    const halves = result.document.wires.filter(({ id, from, to }) => id !== result.wire && (from.part === junction?.id || to.part === junction?.id));
    expect(halves.map((half) => courseOf(result.document, half)).flat()).toEqual(expect.arrayContaining([...course]));
  });

  it('splits without changing a node, wherever on the wire', () => {
    fc.assert(
      fc.property(anySheet(), fc.nat(), fc.nat(), (sheet, which, where) => {
        const wire = sheet.wires[which % Math.max(1, sheet.wires.length)];
        if (!wire) return;
        const places = placesOn(sheet, courseOf(sheet, wire));
        const at = places[where % Math.max(1, places.length)];
        if (!at) return;
        const { document, pin } = splitWire(sheet, wire.id, at, counter());
        expect(findPin(document, pin)?.at).toEqual(at);
        expect(nodePartition(document, partIds(sheet))).toEqual(nodePartition(sheet));
        expect(document.wires).toHaveLength(sheet.wires.length + 1);
      }),
      { numRuns: 500 },
    );
  });

  it('and taking it off again heals the wire that it ended on', () => {
    fc.assert(
      fc.property(anySheet(), fc.nat(), fc.nat(), (sheet, which, where) => {
        const wire = sheet.wires[which % Math.max(1, sheet.wires.length)];
        if (!wire) return;
        const places = placesOn(sheet, courseOf(sheet, wire));
        const at = places[where % Math.max(1, places.length)];
        if (!at) return;
        const free = addPart(sheet, 'resistor', { at: { x: 5000, y: 5000 }, turn: 0, mirrored: false }, 'free').document;
        const joined = connect(free, { kind: 'pin', ref: { part: 'free', pin: 'a' }, at: { x: 4970, y: 5000 } }, { kind: 'wire', wire: wire.id, at }, [], counter());
        if (!joined.ok) throw new Error(joined.message);
        const healed = removeFromSheet(joined.document, new Set(), new Set([joined.wire]));
        expect(healed.parts).toEqual(free.parts);
        expect(healed.wires).toHaveLength(free.wires.length);
        expect(nodePartition(healed)).toEqual(nodePartition(free));
      }),
      { numRuns: 500 },
    );
  });

  it('refuses, in words, what joins nothing', () => {
    const sheet = dividerSheet();
    const pin = { kind: 'pin', ref: { part: 'resistor-1', pin: 'a' }, at: { x: 300, y: 200 } } as const;
    const source = { kind: 'pin', ref: { part: 'voltageSource-1', pin: 'a' }, at: { x: 200, y: 290 } } as const;
    expect(connect(sheet, pin, pin, [], counter())).toMatchObject({ ok: false, message: expect.stringContaining('two different pins') });
    expect(connect(sheet, source, pin, [], counter())).toMatchObject({ ok: false, message: expect.stringContaining('joined already') });
    expect(connect(sheet, pin, source, [], counter()).ok).toBe(false);
  });

  it('may end in the open, on a junction of its own', () => {
    const result = connect(
      dividerSheet(),
      { kind: 'pin', ref: { part: 'resistor-1', pin: 'b' }, at: { x: 360, y: 200 } },
      { kind: 'open', at: { x: 704, y: 396 } },
      [],
      counter(),
    );
    expect(result.ok && result.document.parts.find(({ id }) => id.startsWith('new'))).toMatchObject({ kind: 'junction', at: { x: 700, y: 400 } });
  });
});

describe('what a pointer would end a wire on', () => {
  const sheet = dividerSheet();
  const at = (x: number, y: number, reach = 8) => targetAt(sheet, { x, y }, reach, allPins(sheet), coursesOf(sheet));

  it('is the nearest pin within reach, before any wire', () => {
    expect(at(303, 204)).toEqual({ kind: 'pin', ref: { part: 'resistor-1', pin: 'a' }, at: { x: 300, y: 200 } });
  });

  it('is a wire, at a grid point on it', () => {
    expect(at(246, 205)).toMatchObject({ kind: 'wire', wire: 'wire-1', at: { x: 250, y: 200 } });
    expect(at(205, 243)).toMatchObject({ kind: 'wire', wire: 'wire-1', at: { x: 200, y: 240 } });
  });

  it('is the open grid elsewhere, and out of reach', () => {
    expect(at(246, 213)).toEqual({ kind: 'open', at: { x: 250, y: 210 } });
    expect(at(246, 205, 2)).toEqual({ kind: 'open', at: { x: 250, y: 210 } });
  });
});

describe('taking things off', () => {
  it('takes the wires of a part along, and leaves the other nodes as they are', () => {
    fc.assert(
      fc.property(sheetAndSome, ({ sheet, some }) => {
        const after = removeFromSheet(sheet, some, new Set());
        for (const { from, to } of after.wires) expect(some.has(from.part) || some.has(to.part)).toBe(false);
        const kept = new Set(after.parts.map(({ id }) => id));
        const left = { ...sheet, parts: sheet.parts.filter(({ id }) => !some.has(id)), wires: sheet.wires.filter(({ from, to }) => !some.has(from.part) && !some.has(to.part)) };
        expect(nodePartition(after)).toEqual(nodePartition(left, kept));
      }),
      { numRuns: 500 },
    );
  });

  it('keeps a junction that ties a name to its node, when only two wires are left on it', () => {
    const sheet = dividerSheet();
    const extra = addPart(sheet, 'resistor', { at: { x: 600, y: 200 }, turn: 0, mirrored: false }, 'load').document;
    const joined = connect(
      extra,
      { kind: 'pin', ref: { part: 'load', pin: 'a' }, at: { x: 570, y: 200 } },
      { kind: 'pin', ref: { part: 'junction-1', pin: 'a' }, at: { x: 460, y: 200 } },
      [],
      counter(),
    );
    if (!joined.ok) throw new Error(joined.message);
    const after = removeFromSheet(joined.document, new Set(['load']), new Set());
    expect(after).toEqual({ ...sheet, parts: expect.arrayContaining([...sheet.parts]) });
    expect(nodePartition(after)).toEqual(nodePartition(sheet));
  });

  it('takes a junction along that is left with nothing to join', () => {
    const sheet = new SheetBuilder();
    const [part, junction] = [sheet.resistor(0, 0, '1k'), sheet.junction(100, 0)];
    const wire = sheet.wire([part, 'b'], junction);
    expect(removeFromSheet(sheet.document(), new Set(), new Set([wire])).parts.map(({ id }) => id)).toEqual([part]);
  });

  it('keeps the course of the wire that a junction heals into', () => {
    const sheet = new SheetBuilder();
    const [left, right, below] = [sheet.resistor(0, 0, '1'), sheet.resistor(300, 100, '1'), sheet.resistor(150, 300, '1', 90)];
    const junction = sheet.junction(150, 0);
    sheet.wire([left, 'b'], junction);
    sheet.wire(junction, right, [{ x: 200, y: 0 }, { x: 200, y: 100 }]);
    const third = sheet.wire(junction, below);
    const after = removeFromSheet(sheet.document(), new Set(), new Set([third]));
    expect(after.wires).toHaveLength(1);
    const [healed] = after.wires;
    expect(healed && courseOf(after, healed)).toEqual([
      { x: 30, y: 0 },
      { x: 200, y: 0 },
      { x: 200, y: 100 },
      { x: 270, y: 100 },
    ]);
  });
});
