import { courseOf, findPin, routeEndAt, samePin } from '../../document/lookup';
import type { Part, PinRef, SheetDocument, Wire, WireId } from '../../document/types';
import { nearestOnCourse } from '../../geometry/hit';
import { samePoint, snap, type Point } from '../../geometry/point';
import type { RouteEnd } from '../../geometry/route';

/** Where a wire may start or end: on a pin, somewhere on a wire (which makes a junction), or in the open. */
export type WireTarget =
  | { readonly kind: 'pin'; readonly ref: PinRef; readonly at: Point }
  | { readonly kind: 'wire'; readonly wire: WireId; readonly at: Point }
  | { readonly kind: 'open'; readonly at: Point };

export type ConnectResult =
  | { readonly ok: true; readonly document: SheetDocument; readonly wire: WireId }
  | { readonly ok: false; readonly message: string };

/** The end for routing a wire that is still being drawn. */
export function targetEnd(document: SheetDocument, target: WireTarget): RouteEnd {
  const atPin = target.kind === 'pin' ? routeEndAt(document, target.ref) : null;
  return atPin ?? { at: target.at, outward: 'any', body: null };
}

/**
 * Draws a wire between two targets. An end on a wire splits that wire with a junction; an end in the open gets a
 * junction of its own. Refused, in words, where there is nothing to join.
 */
export function connect(
  document: SheetDocument,
  from: WireTarget,
  to: WireTarget,
  corners: readonly Point[],
  freshId: () => string,
): ConnectResult {
  const start = landing(document, from, freshId);
  const end = landing(start.document, to, freshId);
  if (samePin(start.pin, end.pin)) {
    return { ok: false, message: 'A wire joins two different pins. End it on another pin or on a wire.' };
  }
  const joined = end.document.wires.some(
    (wire) =>
      (samePin(wire.from, start.pin) && samePin(wire.to, end.pin)) ||
      (samePin(wire.from, end.pin) && samePin(wire.to, start.pin)),
  );
  if (joined && corners.length === 0) return { ok: false, message: 'These two pins are joined already.' };
  const wire: Wire = { id: freshId(), from: start.pin, to: end.pin, corners: corners.map(snap) };
  return { ok: true, document: { ...end.document, wires: [...end.document.wires, wire] }, wire: wire.id };
}

type Landing = { readonly document: SheetDocument; readonly pin: PinRef };

function landing(document: SheetDocument, target: WireTarget, freshId: () => string): Landing {
  switch (target.kind) {
    case 'pin':
      return { document, pin: target.ref };
    case 'wire':
      return splitWire(document, target.wire, target.at, freshId);
    case 'open': {
      const { document: withJunction, part } = addJunction(document, target.at, freshId);
      return { document: withJunction, pin: { part: part.id, pin: 'a' } };
    }
  }
}

function addJunction(
  document: SheetDocument,
  at: Point,
  freshId: () => string,
): { readonly document: SheetDocument; readonly part: Part } {
  const part: Part = { id: freshId(), kind: 'junction', at: snap(at), turn: 0, mirrored: false, designator: '', values: {} };
  return { document: { ...document, parts: [...document.parts, part] }, part };
}

/** Puts a junction on a wire where it passes `at`, and makes two wires of it that keep its course. */
export function splitWire(document: SheetDocument, id: WireId, at: Point, freshId: () => string): Landing {
  const wire = document.wires.find((candidate) => candidate.id === id);
  const course = wire ? courseOf(document, wire) : [];
  const nearest = nearestOnCourse(course, at);
  const first = course[0];
  const last = course[course.length - 1];
  if (!wire || !nearest || !first || !last) {
    const { document: withJunction, part } = addJunction(document, at, freshId);
    return { document: withJunction, pin: { part: part.id, pin: 'a' } };
  }
  const place = snap(nearest.at);
  // On the very end of a wire there is a pin already.
  if (samePoint(place, first)) return { document, pin: wire.from };
  if (samePoint(place, last)) return { document, pin: wire.to };
  const { document: withJunction, part } = addJunction(document, place, freshId);
  const pin: PinRef = { part: part.id, pin: 'a' };
  const before = course.slice(1, nearest.segment + 1);
  const after = course.slice(nearest.segment + 1, -1);
  const halves = [
    freed(withJunction, { id: wire.id, from: wire.from, to: pin, corners: before }),
    freed(withJunction, { id: freshId(), from: pin, to: wire.to, corners: after }),
  ];
  const others = withJunction.wires.filter((candidate) => candidate.id !== id);
  return { document: { ...withJunction, wires: [...others, ...halves] }, pin };
}

/** A wire without corners where it runs the same course without them. */
function freed(document: SheetDocument, wire: Wire): Wire {
  const free: Wire = { ...wire, corners: [] };
  const course = courseOf(document, wire);
  const freeCourse = courseOf(document, free);
  const same = course.length === freeCourse.length && course.every((point, index) => samePoint(point, freeCourse[index] ?? point));
  return same ? free : wire;
}

/**
 * The target under a place: the nearest pin within reach, else the nearest wire, else the open grid point.
 * @param reach in drawing units, so that it can stand for the same distance on screen at every zoom.
 */
export function targetAt(
  document: SheetDocument,
  place: Point,
  reach: number,
  pins: readonly { readonly ref: PinRef; readonly at: Point }[],
  courses: ReadonlyMap<WireId, readonly Point[]>,
): WireTarget {
  let best: { readonly target: WireTarget; readonly far: number } | null = null;
  for (const { ref, at } of pins) {
    const far = Math.hypot(at.x - place.x, at.y - place.y);
    if (far <= reach && (!best || far < best.far)) best = { target: { kind: 'pin', ref, at }, far };
  }
  if (best) return best.target;
  for (const [wire, course] of courses) {
    const nearest = nearestOnCourse(course, place);
    if (nearest && nearest.distance <= reach && (!best || nearest.distance < best.far)) {
      best = { target: { kind: 'wire', wire, at: snapToCourse(nearest.at, course, nearest.segment) }, far: nearest.distance };
    }
  }
  return best ? best.target : { kind: 'open', at: snap(place) };
}

/** The grid point on the segment nearest to a place on it. */
function snapToCourse(at: Point, course: readonly Point[], segment: number): Point {
  const a = course[segment];
  const b = course[segment + 1];
  const grid = snap(at);
  if (!a || !b) return grid;
  return a.x === b.x ? { x: a.x, y: grid.y } : { x: grid.x, y: a.y };
}

/** The pin as a target, if it is on the sheet. */
export function pinTarget(document: SheetDocument, ref: PinRef): WireTarget | null {
  const pin = findPin(document, ref);
  return pin ? { kind: 'pin', ref, at: pin.at } : null;
}
