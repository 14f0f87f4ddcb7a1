import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { courseOf, extentOf, pinsOf, routeEndAt } from '@/canvas/document/lookup';
import { emptySheetDocument } from '@/canvas/document/schema';
import type { Part } from '@/canvas/document/types';
import { grow, overlap, type Box } from '@/canvas/geometry/box';
import type { Point } from '@/canvas/geometry/point';
import { routeWire, tidy, type RouteEnd } from '@/canvas/geometry/route';
import { anySheet, anyTurn, gridPoint } from '../../support/arbitrary-sheets';

const open = (x: number, y: number): RouteEnd => ({ at: { x, y }, outward: 'any', body: null });

function segments(course: readonly Point[]): readonly (readonly [Point, Point])[] {
  return course.slice(1).flatMap((b, index) => {
    const a = course[index];
    return a ? [[a, b] as const] : [];
  });
}

function entersBox([a, b]: readonly [Point, Point], box: Box): boolean {
  return (
    Math.max(a.x, b.x) > box.left && Math.min(a.x, b.x) < box.right && Math.max(a.y, b.y) > box.top && Math.min(a.y, b.y) < box.bottom
  );
}

const twoPin = fc
  .record({ kind: fc.constantFrom('resistor' as const, 'capacitor' as const, 'voltageSource' as const), at: gridPoint, turn: anyTurn, mirrored: fc.boolean() })
  .map((part) => ({ ...part, designator: '', values: {} }));

describe('the course of a wire', () => {
  it('is straight between ends in line, and bends once between ends that are not', () => {
    expect(routeWire(open(0, 0), open(100, 0))).toEqual([{ x: 0, y: 0 }, { x: 100, y: 0 }]);
    expect(routeWire(open(0, 0), open(100, 50))).toHaveLength(3);
  });

  it('runs only across and down, from one end to the other, through its corners', () => {
    fc.assert(
      fc.property(anySheet(), (sheet) => {
        for (const wire of sheet.wires) {
          const course = courseOf(sheet, wire);
          expect(course[0]).toEqual(routeEndAt(sheet, wire.from)?.at);
          expect(course[course.length - 1]).toEqual(routeEndAt(sheet, wire.to)?.at);
          for (const [a, b] of segments(course)) {
            expect(a.x === b.x || a.y === b.y).toBe(true);
            expect(a).not.toEqual(b);
          }
          for (const corner of wire.corners) {
            const passed =
              course.length === 1
                ? [[course[0] ?? corner, course[0] ?? corner] as const]
                : segments(course);
            expect(
              passed.some(
                ([a, b]) =>
                  Math.min(a.x, b.x) <= corner.x && corner.x <= Math.max(a.x, b.x) && Math.min(a.y, b.y) <= corner.y && corner.y <= Math.max(a.y, b.y),
              ),
            ).toBe(true);
          }
        }
      }),
    );
  });

  it('stays on the grid when its ends and corners are on it', () => {
    fc.assert(
      fc.property(anySheet(), (sheet) => {
        for (const wire of sheet.wires) {
          for (const { x, y } of courseOf(sheet, wire)) expect([Math.abs(x % 10), Math.abs(y % 10)]).toEqual([0, 0]);
        }
      }),
    );
  });

  it('keeps out of the two parts that it joins, when they leave it room', () => {
    fc.assert(
      fc.property(twoPin, twoPin, fc.constantFrom('a', 'b'), fc.constantFrom('a', 'b'), (first, second, pinA, pinB) => {
        const parts: Part[] = [
          { ...first, id: 'first' },
          { ...second, id: 'second' },
        ];
        const [one, other] = parts;
        if (!one || !other) return;
        fc.pre(!overlap(grow(extentOf(one), 30), grow(extentOf(other), 30)));
        const sheet = { ...emptySheetDocument(), parts };
        const wire = { id: 'w', from: { part: 'first', pin: pinA }, to: { part: 'second', pin: pinB }, corners: [] };
        for (const segment of segments(courseOf(sheet, wire))) {
          expect(entersBox(segment, extentOf(one))).toBe(false);
          expect(entersBox(segment, extentOf(other))).toBe(false);
        }
      }),
      { numRuns: 2000 },
    );
  });

  it('goes round both parts when their pins look away from each other', () => {
    const part = (id: string, x: number): Part => ({ id, kind: 'resistor', at: { x, y: 0 }, turn: 0, mirrored: false, designator: '', values: {} });
    const sheet = { ...emptySheetDocument(), parts: [part('left', 0), part('right', 200)] };
    const course = courseOf(sheet, { id: 'w', from: { part: 'left', pin: 'a' }, to: { part: 'right', pin: 'b' }, corners: [] });
    for (const segment of segments(course)) {
      for (const each of sheet.parts) expect(entersBox(segment, extentOf(each))).toBe(false);
    }
  });

  it('is the same for the same wire, however often it is asked for', () => {
    fc.assert(
      fc.property(anySheet(), (sheet) => {
        for (const wire of sheet.wires) {
          const again = courseOf(sheet, { ...wire });
          expect(again).toEqual(courseOf(sheet, wire));
        }
      }),
    );
  });

  it('does not move when a part that it does not end on moves', () => {
    fc.assert(
      fc.property(anySheet(), gridPoint, (sheet, by) => {
        const wire = sheet.wires[0];
        if (!wire) return;
        const others = sheet.parts.map((part) =>
          part.id === wire.from.part || part.id === wire.to.part ? part : { ...part, at: { x: part.at.x + by.x, y: part.at.y + by.y } },
        );
        expect(courseOf({ parts: others }, { ...wire })).toEqual(courseOf(sheet, wire));
      }),
    );
  });

  it('leaves a pin the way the pin looks, when the other end is that way', () => {
    const part: Part = { id: 'r', kind: 'resistor', at: { x: 0, y: 0 }, turn: 0, mirrored: false, designator: 'R1', values: {} };
    const junction: Part = { id: 'j', kind: 'junction', at: { x: 200, y: 80 }, turn: 0, mirrored: false, designator: '', values: {} };
    const sheet = { ...emptySheetDocument(), parts: [part, junction] };
    const course = courseOf(sheet, { id: 'w', from: { part: 'r', pin: 'b' }, to: { part: 'j', pin: 'a' }, corners: [] });
    const pin = pinsOf(part)[1];
    expect(course[0]).toEqual(pin?.at);
    expect(course[1]?.y).toBe(0);
    expect(course[1]?.x).toBeGreaterThan(30);
  });
});

describe('tidying a course', () => {
  it('drops repeated points and corners on a straight run, and keeps the turn of one that runs back', () => {
    expect(tidy([{ x: 0, y: 0 }, { x: 0, y: 0 }, { x: 50, y: 0 }, { x: 100, y: 0 }, { x: 100, y: 20 }])).toEqual([
      { x: 0, y: 0 },
      { x: 100, y: 0 },
      { x: 100, y: 20 },
    ]);
    expect(tidy([{ x: 0, y: 0 }, { x: 100, y: 0 }, { x: 60, y: 0 }])).toHaveLength(3);
  });
});
