import { placeBox, type Box } from '../geometry/box';
import { orientDirection, place, type Direction } from '../geometry/placement';
import type { Point } from '../geometry/point';
import { routeWire, type RouteEnd } from '../geometry/route';
import type { PinDefinition } from '../parts/definition';
import { definitionOf } from '../parts/registry';
import type { Part, PartId, PinRef, SheetDocument, Wire, WireId } from './types';

/** A pin as it lies on the sheet. */
export type PlacedPin = { readonly ref: PinRef; readonly label: string; readonly at: Point; readonly outward: Direction };

/** Finding parts by id is needed everywhere; documents never change, so the index is made once for each. */
const indexes = new WeakMap<readonly Part[], ReadonlyMap<PartId, Part>>();

export function partsById(document: Pick<SheetDocument, 'parts'>): ReadonlyMap<PartId, Part> {
  const known = indexes.get(document.parts);
  if (known) return known;
  const made = new Map(document.parts.map((part) => [part.id, part]));
  indexes.set(document.parts, made);
  return made;
}

export function placePin(part: Part, pin: PinDefinition): PlacedPin {
  return {
    ref: { part: part.id, pin: pin.name },
    label: pin.label,
    at: place(part, pin.at),
    outward: orientDirection(part, pin.outward),
  };
}

export function pinsOf(part: Part): readonly PlacedPin[] {
  return definitionOf(part.kind).pins.map((pin) => placePin(part, pin));
}

export function findPin(document: Pick<SheetDocument, 'parts'>, ref: PinRef): PlacedPin | null {
  const part = partsById(document).get(ref.part);
  const pin = part && definitionOf(part.kind).pins.find((candidate) => candidate.name === ref.pin);
  return part && pin ? placePin(part, pin) : null;
}

export function samePin(a: PinRef, b: PinRef): boolean {
  return a.part === b.part && a.pin === b.pin;
}

/** Key of a pin for maps and sets. */
export function pinKey(ref: PinRef): string {
  return `${ref.part}/${ref.pin}`;
}

/** The body of a part on the sheet: what is hit and outlined. */
export function bodyOf(part: Part): Box {
  return placeBox(part, definitionOf(part.kind).body);
}

/** The body and the pins: what the part covers, leads and all. */
export function extentOf(part: Part): Box {
  const body = bodyOf(part);
  let { left, top, right, bottom } = body;
  for (const { at } of pinsOf(part)) {
    left = Math.min(left, at.x);
    right = Math.max(right, at.x);
    top = Math.min(top, at.y);
    bottom = Math.max(bottom, at.y);
  }
  return { left, top, right, bottom };
}

function routeEnd(part: Part, pinName: string): RouteEnd | null {
  const { pins } = definitionOf(part.kind);
  const pin = pins.find((candidate) => candidate.name === pinName);
  if (!pin) return null;
  // A part with a single pin is a mark on a node: a wire may run under it.
  return {
    at: place(part, pin.at),
    outward: orientDirection(part, pin.outward),
    body: pins.length > 1 ? extentOf(part) : null,
  };
}

/** The end of a wire at a pin, or in the open while it is being drawn. */
export function routeEndAt(document: Pick<SheetDocument, 'parts'>, ref: PinRef): RouteEnd | null {
  const part = partsById(document).get(ref.part);
  return part ? routeEnd(part, ref.pin) : null;
}

type Routed = { readonly from: Part; readonly to: Part; readonly course: readonly Point[] };

/** A wire's course depends on itself and its two parts alone, so it is kept for as long as these three are the same. */
const routed = new WeakMap<Wire, Routed>();

/** The course of a wire on the sheet; empty when an end is missing. */
export function courseOf(document: Pick<SheetDocument, 'parts'>, wire: Wire): readonly Point[] {
  const parts = partsById(document);
  const from = parts.get(wire.from.part);
  const to = parts.get(wire.to.part);
  if (!from || !to) return [];
  const known = routed.get(wire);
  if (known && known.from === from && known.to === to) return known.course;
  const start = routeEnd(from, wire.from.pin);
  const end = routeEnd(to, wire.to.pin);
  const course = start && end ? routeWire(start, end, wire.corners) : [];
  routed.set(wire, { from, to, course });
  return course;
}

/** The course of every wire. */
export function coursesOf(document: Pick<SheetDocument, 'parts' | 'wires'>): ReadonlyMap<WireId, readonly Point[]> {
  return new Map(document.wires.map((wire) => [wire.id, courseOf(document, wire)]));
}

const placedPins = new WeakMap<readonly Part[], readonly PlacedPin[]>();

/** Every pin on the sheet, in drawing order. */
export function allPins(document: Pick<SheetDocument, 'parts'>): readonly PlacedPin[] {
  const known = placedPins.get(document.parts);
  if (known) return known;
  const made = document.parts.flatMap(pinsOf);
  placedPins.set(document.parts, made);
  return made;
}

export function designatorsOf(document: Pick<SheetDocument, 'parts'>): Set<string> {
  return new Set(document.parts.map((part) => part.designator).filter((designator) => designator !== ''));
}
