import { allPins, courseOf, partsById, samePin } from '../../document/lookup';
import type { PartId, PinRef, SheetDocument, Wire } from '../../document/types';
import { samePoint } from '../../geometry/point';

/**
 * After wires have gone: of the junctions they ended on, one that joins nothing goes too, and one that is left with
 * two wires heals into a single wire, which keeps its course. A junction under another pin stays: it is what joins that
 * pin (a node's name, say) to the wires.
 */
export function pruneJunctions(document: SheetDocument, touched: ReadonlySet<PartId>): SheetDocument {
  let result = document;
  for (const id of touched) {
    if (partsById(result).get(id)?.kind !== 'junction') continue;
    const ends = result.wires.filter((wire) => wire.from.part === id || wire.to.part === id);
    if (liesUnderPin(result, id)) continue;
    if (ends.length === 0) result = withoutPart(result, id);
    else if (ends.length === 2) result = heal(result, id, ends);
  }
  return result;
}

function liesUnderPin(document: SheetDocument, junction: PartId): boolean {
  const at = partsById(document).get(junction)?.at;
  return at !== undefined && allPins(document).some((pin) => pin.ref.part !== junction && samePoint(pin.at, at));
}

function withoutPart(document: SheetDocument, id: PartId): SheetDocument {
  return { ...document, parts: document.parts.filter((part) => part.id !== id) };
}

function heal(document: SheetDocument, junction: PartId, ends: readonly Wire[]): SheetDocument {
  const [first, second] = ends;
  const at = partsById(document).get(junction)?.at;
  if (!first || !second || !at) return document;
  const start = farEnd(first, junction);
  const finish = farEnd(second, junction);
  if (samePin(start, finish)) return document;
  const before = cornersFrom(document, first, start);
  const after = cornersFrom(document, second, { part: junction, pin: 'a' });
  const healed: Wire = { id: first.id, from: start, to: finish, corners: [...before, at, ...after] };
  const others = document.wires.filter((wire) => wire.id !== first.id && wire.id !== second.id);
  return withoutPart({ ...document, wires: [...others, simplified(document, healed)] }, junction);
}

function farEnd(wire: Wire, junction: PartId): PinRef {
  return wire.from.part === junction ? wire.to : wire.from;
}

/** The inner points of a wire's course, read from one of its ends. */
function cornersFrom(document: SheetDocument, wire: Wire, end: PinRef): Wire['corners'] {
  const inner = courseOf(document, wire).slice(1, -1);
  return samePin(wire.from, end) ? inner : [...inner].reverse();
}

/** Without corners, when the course between the ends is the same without them: then it follows its parts freely. */
function simplified(document: SheetDocument, wire: Wire): Wire {
  const free: Wire = { ...wire, corners: [] };
  const same = JSON.stringify(courseOf(document, free)) === JSON.stringify(courseOf(document, wire));
  return same ? free : { ...wire, corners: courseOf(document, wire).slice(1, -1) };
}
