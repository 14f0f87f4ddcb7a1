import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { contains, placeBox } from '@/canvas/geometry/box';
import { directionVector, orient, orientDirection, place, turnBy, type Direction, type Placement } from '@/canvas/geometry/placement';
import { snap } from '@/canvas/geometry/point';
import { anyTurn, gridPoint } from '../../support/arbitrary-sheets';

const placement: fc.Arbitrary<Placement> = fc.record({ at: gridPoint, turn: anyTurn, mirrored: fc.boolean() });
const direction: fc.Arbitrary<Direction> = fc.constantFrom('left', 'right', 'up', 'down');

describe('placing a part', () => {
  it('turns clockwise: the first pin of a two-pin part goes from the left to the top', () => {
    expect(orient({ turn: 90, mirrored: false }, { x: -30, y: 0 })).toEqual({ x: 0, y: -30 });
    expect(orient({ turn: 180, mirrored: false }, { x: -30, y: 0 })).toEqual({ x: 30, y: 0 });
    expect(orient({ turn: 270, mirrored: false }, { x: -30, y: 0 })).toEqual({ x: 0, y: 30 });
  });

  it('mirrors before it turns', () => {
    expect(orient({ turn: 90, mirrored: true }, { x: -30, y: 5 })).toEqual({ x: -5, y: 30 });
  });

  it('keeps lengths, and no two points of a part fall together', () => {
    fc.assert(
      fc.property(placement, gridPoint, gridPoint, (where, a, b) => {
        const [p, q] = [place(where, a), place(where, b)];
        expect(Math.hypot(p.x - q.x, p.y - q.y)).toBe(Math.hypot(a.x - b.x, a.y - b.y));
      }),
    );
  });

  it('comes back after four quarter turns, and after two mirrorings', () => {
    fc.assert(
      fc.property(anyTurn, fc.integer({ min: -9, max: 9 }), (turn, quarters) => {
        expect(turnBy(turnBy(turn, quarters), -quarters)).toBe(turn);
        expect(turnBy(turn, 4)).toBe(turn);
      }),
    );
    fc.assert(
      fc.property(placement, gridPoint, ({ turn }, local) => {
        const once = orient({ turn: 0, mirrored: true }, local);
        expect(orient({ turn: 0, mirrored: true }, once)).toEqual(local);
        expect(orient({ turn, mirrored: false }, orient({ turn: turnBy(turn, -2 * (turn / 90)), mirrored: false }, local))).toEqual(local);
      }),
    );
  });

  it('turns directions with points', () => {
    fc.assert(
      fc.property(placement, direction, (where, way) => {
        expect(directionVector(orientDirection(where, way))).toEqual(orient(where, directionVector(way)));
      }),
    );
    expect(orientDirection({ turn: 90, mirrored: true }, 'any')).toBe('any');
  });

  it('never makes a minus zero, which would reach saved documents', () => {
    fc.assert(
      fc.property(placement, (where) => {
        for (const local of [{ x: 0, y: 0 }, { x: -30, y: 0 }, { x: 0, y: 30 }]) {
          const { x, y } = orient(where, local);
          expect(Object.is(x, -0) || Object.is(y, -0)).toBe(false);
        }
      }),
    );
    expect(Object.is(snap({ x: -3, y: -4 }).x, -0)).toBe(false);
  });

  it('places a box so that it holds what it held', () => {
    const body = { left: -22, top: -8, right: 40, bottom: 8 };
    fc.assert(
      fc.property(placement, fc.integer({ min: -22, max: 40 }), fc.integer({ min: -8, max: 8 }), (where, x, y) => {
        const box = placeBox(where, body);
        expect(contains(box, place(where, { x, y }))).toBe(true);
        expect((box.right - box.left) * (box.bottom - box.top)).toBe(62 * 16);
      }),
    );
  });
});
