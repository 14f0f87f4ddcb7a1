import { distance, type Point } from './point';

/** The place on a course nearest to a point: how far it is, where, and on which segment (0 is the first). */
export type Nearest = { readonly distance: number; readonly at: Point; readonly segment: number };

export function nearestOnCourse(course: readonly Point[], point: Point): Nearest | null {
  let best: Nearest | null = null;
  for (let index = 1; index < course.length; index += 1) {
    const a = course[index - 1];
    const b = course[index];
    if (!a || !b) continue;
    const at = nearestOnSegment(a, b, point);
    const far = distance(at, point);
    if (!best || far < best.distance) best = { distance: far, at, segment: index - 1 };
  }
  return best;
}

function nearestOnSegment(a: Point, b: Point, point: Point): Point {
  const dx = b.x - a.x;
  const dy = b.y - a.y;
  const lengthSquared = dx * dx + dy * dy;
  if (lengthSquared === 0) return a;
  const t = ((point.x - a.x) * dx + (point.y - a.y) * dy) / lengthSquared;
  const clamped = Math.min(1, Math.max(0, t));
  return { x: a.x + clamped * dx, y: a.y + clamped * dy };
}
