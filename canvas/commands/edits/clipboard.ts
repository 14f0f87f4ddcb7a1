import * as z from 'zod/mini';
import { freeDesignator } from '../../document/designators';
import { designatorsOf, extentOf } from '../../document/lookup';
import { emptySheetDocument, validateSheetDocument } from '../../document/schema';
import type { Selection } from '../../document/selection';
import type { Part, SheetDocument, Wire } from '../../document/types';
import { unite } from '../../geometry/box';
import { add, snap, type Point } from '../../geometry/point';

/** What marks clipboard text as ours. */
const FORMAT = 'ohmstead-parts';

const envelope = z.object({ format: z.literal(FORMAT), version: z.literal(1), parts: z.unknown(), wires: z.unknown() });

/** Parts and the wires among them, as they go to the clipboard. */
export type Clipping = { readonly parts: readonly Part[]; readonly wires: readonly Wire[] };

/** The selected parts, and every wire that joins two of them. */
export function clip(document: SheetDocument, selection: Selection): Clipping {
  const parts = document.parts.filter(({ id }) => selection.parts.has(id));
  const wires = document.wires.filter(
    (wire) => selection.parts.has(wire.from.part) && selection.parts.has(wire.to.part),
  );
  return { parts, wires };
}

export function writeClipping(clipping: Clipping): string {
  return JSON.stringify({ format: FORMAT, version: 1, ...clipping });
}

/** Reads clipboard text; null when it is not ours. Never throws. */
export function readClipping(text: string): Clipping | null {
  let data: unknown;
  try {
    data = JSON.parse(text);
  } catch {
    return null;
  }
  const read = envelope.safeParse(data);
  if (!read.success) return null;
  const checked = validateSheetDocument({ ...emptySheetDocument(), parts: read.data.parts, wires: read.data.wires });
  return checked.ok ? { parts: checked.document.parts, wires: checked.document.wires } : null;
}

export type Pasted = { readonly document: SheetDocument; readonly parts: readonly Part[] };

/** Puts a clipping on the sheet, moved by an offset, with fresh ids and fresh designators where the old are taken. */
export function paste(document: SheetDocument, clipping: Clipping, by: Point, freshId: () => string): Pasted {
  const ids = new Map(clipping.parts.map((part) => [part.id, freshId()]));
  const taken = designatorsOf(document);
  const parts = clipping.parts.map((part): Part => {
    const designator =
      part.designator === '' || !taken.has(part.designator) ? part.designator : freeDesignator(part.kind, taken);
    if (designator !== '') taken.add(designator);
    return { ...part, id: ids.get(part.id) ?? freshId(), at: add(part.at, by), designator };
  });
  const wires = clipping.wires.flatMap((wire): Wire[] => {
    const from = ids.get(wire.from.part);
    const to = ids.get(wire.to.part);
    if (from === undefined || to === undefined) return [];
    return [
      {
        id: freshId(),
        from: { part: from, pin: wire.from.pin },
        to: { part: to, pin: wire.to.pin },
        corners: wire.corners.map((corner) => add(corner, by)),
      },
    ];
  });
  return { document: { ...document, parts: [...document.parts, ...parts], wires: [...document.wires, ...wires] }, parts };
}

/** The offset that puts a clipping's upper left corner at a place. */
export function offsetTo(clipping: Clipping, place: Point): Point {
  const around = unite(clipping.parts.map(extentOf));
  return around ? snap({ x: place.x - around.left, y: place.y - around.top }) : { x: 0, y: 0 };
}
