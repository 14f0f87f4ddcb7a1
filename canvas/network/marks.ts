import type { PartId, PinRef, SheetDocument, WireId } from '../document/types';
import type { Point } from '../geometry/point';
import { allPins, pinKey } from '../document/lookup';
import { pointKey } from '../geometry/point';
import type { Nodes } from './nodes';
import type { Readings } from './readings';

/** What to mark on the drawing, looked up by part and wire. */
export type Marks = {
  readonly faultyParts: ReadonlyMap<PartId, string>;
  readonly faultyWires: ReadonlySet<WireId>;
  readonly cautions: ReadonlyMap<PartId, string>;
  readonly dead: ReadonlySet<PartId>;
};

const made = new WeakMap<Readings, Marks>();

/** The problems and cautions of a set of readings, by what they are about; sentences joined where there are several. */
export function marksOf(readings: Readings): Marks {
  const known = made.get(readings);
  if (known) return known;
  const marks: Marks = {
    faultyParts: gather(readings.problems),
    faultyWires: new Set(readings.problems.flatMap(({ wires }) => wires)),
    cautions: gather(readings.cautions),
    dead: new Set(readings.deadSources),
  };
  made.set(readings, marks);
  return marks;
}

function gather(said: readonly { readonly message: string; readonly parts: readonly PartId[] }[]): Map<PartId, string> {
  const byPart = new Map<PartId, string>();
  for (const { message, parts } of said) {
    for (const part of parts) {
      const before = byPart.get(part);
      byPart.set(part, before === undefined ? message : `${before} ${message}`);
    }
  }
  return byPart;
}

/** Pins that nothing is joined to: drawn as open rings. */
export function openPins(document: Pick<SheetDocument, 'parts'>, nodes: Nodes): readonly { readonly ref: PinRef; readonly at: Point }[] {
  const open = new Set(
    nodes.all.flatMap(({ pins, wires }) => {
      const [only] = pins;
      return pins.length === 1 && wires.length === 0 && only ? [pinKey(only)] : [];
    }),
  );
  return allPins(document).filter(({ ref }) => open.has(pinKey(ref)));
}

/** Places where three or more conductors meet and no junction stands: a dot says that they join. */
export function meetingPlaces(document: SheetDocument): readonly Point[] {
  const counted = new Map<string, { readonly at: Point; count: number; junction: boolean }>();
  const kinds = new Map(document.parts.map(({ id, kind }) => [id, kind]));
  const ends = new Map<string, number>();
  for (const { from, to } of document.wires) {
    for (const ref of [from, to]) ends.set(pinKey(ref), (ends.get(pinKey(ref)) ?? 0) + 1);
  }
  for (const { ref, at } of allPins(document)) {
    const key = pointKey(at);
    const place = counted.get(key) ?? { at, count: 0, junction: false };
    const kind = kinds.get(ref.part);
    if (kind === 'junction') place.junction = true;
    else if (kind !== 'nodeName') place.count += 1;
    place.count += ends.get(pinKey(ref)) ?? 0;
    counted.set(key, place);
  }
  return [...counted.values()].filter(({ count, junction }) => count >= 3 && !junction).map(({ at }) => at);
}
