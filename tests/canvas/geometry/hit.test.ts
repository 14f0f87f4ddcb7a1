import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { nearestOnCourse } from '@/canvas/geometry/hit';
import { distance, type Point } from '@/canvas/geometry/point';
import { gridPoint } from '../../support/arbitrary-sheets';

const CORNERED: readonly Point[] = [
  { x: 0, y: 0 },
  { x: 100, y: 0 },
  { x: 100, y: 50 },
];

describe('the nearest place on a course', () => {
  it('is on the segment under the pointer', () => {
    expect(nearestOnCourse(CORNERED, { x: 40, y: 7 })).toEqual({ distance: 7, at: { x: 40, y: 0 }, segment: 0 });
    expect(nearestOnCourse(CORNERED, { x: 96, y: 30 })).toEqual({ distance: 4, at: { x: 100, y: 30 }, segment: 1 });
  });

  it('is the end where the pointer is past it', () => {
    expect(nearestOnCourse(CORNERED, { x: -30, y: -40 })).toEqual({ distance: 50, at: { x: 0, y: 0 }, segment: 0 });
  });

  it('is none on a course without length', () => {
    expect(nearestOnCourse([], { x: 0, y: 0 })).toBeNull();
    expect(nearestOnCourse([{ x: 0, y: 0 }], { x: 0, y: 0 })).toBeNull();
  });

  it('is never further than any point of the course', () => {
    fc.assert(
      fc.property(fc.array(gridPoint, { minLength: 2, maxLength: 6 }), gridPoint, fc.double({ min: 0, max: 1, noNaN: true }), (course, point, t) => {
        const nearest = nearestOnCourse(course, point);
        for (let index = 1; index < course.length; index += 1) {
          const [a, b] = [course[index - 1], course[index]];
          if (!a || !b) continue;
          const on = { x: a.x + t * (b.x - a.x), y: a.y + t * (b.y - a.y) };
          expect(nearest?.distance ?? Infinity).toBeLessThanOrEqual(distance(on, point) + 1e-9);
        }
      }),
    );
  });
});
