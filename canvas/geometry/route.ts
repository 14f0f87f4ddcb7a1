import type { Box } from './box';
import { directionVector, type Direction } from './placement';
import { GRID, samePoint, type Point } from './point';

/** One end of a wire: where it is, the way it leaves, and the body it must not run through. */
export type RouteEnd = { readonly at: Point; readonly outward: Direction; readonly body: Box | null };

const STUB = 20;
const BEND_COST = 24;
/** Leaving a pin sideways looks like a part on its side: worth two bends and a stub to avoid. */
const SIDEWAYS_COST = 90;
const AGAINST_COST = 400;
const THROUGH_COST = 600;

/**
 * The orthogonal course of a wire, from end to end, through the corners that a hand placed. Between two given points
 * it takes the cheapest of a fixed set of courses (straight, one bend, two bends, with a stub at either end; and where
 * all of these run through a body, round the bodies), where length, bends, leaving a pin against its direction and
 * running through an end's own body all cost. It looks at nothing but its two ends, so that moving some other part
 * never moves this wire.
 */
export function routeWire(from: RouteEnd, to: RouteEnd, corners: readonly Point[] = []): Point[] {
  if (corners.length === 0) return tidy(bestCourse(from, to));
  const stops: RouteEnd[] = [from, ...corners.map((at): RouteEnd => ({ at, outward: 'any', body: null })), to];
  const course: Point[] = [from.at];
  for (let index = 1; index < stops.length; index += 1) {
    const start = stops[index - 1];
    const end = stops[index];
    if (start && end) course.push(...bestCourse(start, end).slice(1));
  }
  return tidy(course);
}

function bestCourse(from: RouteEnd, to: RouteEnd): Point[] {
  let best: Point[] = [from.at, to.at];
  let bestCost = Infinity;
  const consider = (candidates: Iterable<Point[]>) => {
    for (const course of candidates) {
      const cost = courseCost(course, from, to);
      if (cost < bestCost) {
        best = course;
        bestCost = cost;
      }
    }
  };
  consider(courses(from, to));
  // Only a wire that would run through a body needs the many courses round it.
  if (bestCost >= THROUGH_COST) consider(detours(from, to));
  return best;
}

function* courses(from: RouteEnd, to: RouteEnd): Generator<Point[]> {
  const a = from.at;
  const b = to.at;
  if (a.x === b.x || a.y === b.y) yield [a, b];
  yield [a, { x: b.x, y: a.y }, b];
  yield [a, { x: a.x, y: b.y }, b];
  const starts = stubs(from);
  const ends = stubs(to);
  for (const s of starts) {
    for (const e of ends) {
      yield [a, s, { x: e.x, y: s.y }, e, b];
      yield [a, s, { x: s.x, y: e.y }, e, b];
      const middleX = snapHalf(s.x, e.x);
      const middleY = snapHalf(s.y, e.y);
      yield [a, s, { x: middleX, y: s.y }, { x: middleX, y: e.y }, e, b];
      yield [a, s, { x: s.x, y: middleY }, { x: e.x, y: middleY }, e, b];
    }
  }
}

/** Courses along the sides of the bodies: from a stub to a line beside a body, along it, and to the other stub. */
function* detours(from: RouteEnd, to: RouteEnd): Generator<Point[]> {
  const bodies = [from.body, to.body].flatMap((body) => body ?? []);
  const columns = bodies.flatMap(({ left, right }) => [snapDown(left - STUB), snapUp(right + STUB)]);
  const rows = bodies.flatMap(({ top, bottom }) => [snapDown(top - STUB), snapUp(bottom + STUB)]);
  for (const s of stubs(from)) {
    for (const e of stubs(to)) {
      for (const x of columns) {
        yield [from.at, s, { x, y: s.y }, { x, y: e.y }, e, to.at];
        for (const y of rows) {
          yield [from.at, s, { x, y: s.y }, { x, y }, { x: e.x, y }, e, to.at];
          yield [from.at, s, { x: s.x, y }, { x, y }, { x, y: e.y }, e, to.at];
        }
      }
      for (const y of rows) yield [from.at, s, { x: s.x, y }, { x: e.x, y }, e, to.at];
    }
  }
}

function snapDown(coordinate: number): number {
  // `+ 0` keeps −0 out of documents.
  return Math.floor(coordinate / GRID) * GRID + 0;
}

function snapUp(coordinate: number): number {
  return Math.ceil(coordinate / GRID) * GRID + 0;
}

function stubs(end: RouteEnd): readonly Point[] {
  if (end.outward === 'any') return [end.at];
  const v = directionVector(end.outward);
  return [end.at, { x: end.at.x + v.x * STUB, y: end.at.y + v.y * STUB }];
}

function snapHalf(a: number, b: number): number {
  return Math.round((a + b) / 20) * 10 + 0;
}

function courseCost(course: readonly Point[], from: RouteEnd, to: RouteEnd): number {
  const points = tidy(course);
  let cost = Math.max(0, points.length - 2) * BEND_COST;
  for (let index = 1; index < points.length; index += 1) {
    const a = points[index - 1];
    const b = points[index];
    if (!a || !b) continue;
    cost += Math.abs(a.x - b.x) + Math.abs(a.y - b.y);
    if (from.body && runsThrough(a, b, from.body)) cost += THROUGH_COST;
    if (to.body && runsThrough(a, b, to.body)) cost += THROUGH_COST;
  }
  cost += leavingCost(points[0], points[1], from.outward);
  cost += leavingCost(points[points.length - 1], points[points.length - 2], to.outward);
  return cost;
}

function leavingCost(start: Point | undefined, next: Point | undefined, outward: Direction): number {
  if (!start || !next || outward === 'any') return 0;
  const v = directionVector(outward);
  const along = Math.sign(next.x - start.x) * v.x + Math.sign(next.y - start.y) * v.y;
  if (along > 0) return 0;
  return along < 0 ? AGAINST_COST : SIDEWAYS_COST;
}

/** Whether a segment passes through the inside of a box (its rim does not count: pins lie on it). */
function runsThrough(a: Point, b: Point, box: Box): boolean {
  const left = Math.min(a.x, b.x);
  const right = Math.max(a.x, b.x);
  const top = Math.min(a.y, b.y);
  const bottom = Math.max(a.y, b.y);
  return right > box.left && left < box.right && bottom > box.top && top < box.bottom;
}

/** Without repeated points, and without corners on a straight run. */
export function tidy(points: readonly Point[]): Point[] {
  const kept: Point[] = [];
  for (const point of points) {
    const last = kept[kept.length - 1];
    if (last && samePoint(last, point)) continue;
    const before = kept[kept.length - 2];
    if (last && before && betweenOnLine(before, last, point)) kept.pop();
    kept.push(point);
  }
  return kept;
}

function betweenOnLine(a: Point, middle: Point, b: Point): boolean {
  if (a.x === middle.x && middle.x === b.x) return (middle.y - a.y) * (b.y - middle.y) >= 0;
  if (a.y === middle.y && middle.y === b.y) return (middle.x - a.x) * (b.x - middle.x) >= 0;
  return false;
}

/** The course as an SVG path. */
export function pathOf(points: readonly Point[]): string {
  return points.map((point, index) => `${index === 0 ? 'M' : 'L'}${point.x} ${point.y}`).join('');
}
