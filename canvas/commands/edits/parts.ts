import { freeDesignator, freeNodeName } from '../../document/designators';
import { designatorsOf, extentOf } from '../../document/lookup';
import type { Part, PartId, SheetDocument, Wire } from '../../document/types';
import { centreOf, unite } from '../../geometry/box';
import { turnBy, type Placement } from '../../geometry/placement';
import { add, GRID, snap, type Point } from '../../geometry/point';
import { initialValues, type PartKind } from '../../parts/registry';
import { pruneJunctions } from './junctions';

/** Puts a new part on the sheet, with the first free designator, and a node name with the first free name. */
export function addPart(
  document: SheetDocument,
  kind: PartKind,
  placement: Placement,
  id: PartId,
): { readonly document: SheetDocument; readonly part: Part } {
  const part: Part = {
    id,
    kind,
    at: snap(placement.at),
    turn: placement.turn,
    mirrored: placement.mirrored,
    designator: freeDesignator(kind, designatorsOf(document)),
    values: kind === 'nodeName' ? unusedName(document) : initialValues(kind),
  };
  return { document: { ...document, parts: [...document.parts, part] }, part };
}

/** A new node name must not join its node to another that happens to have the first name that is offered. */
function unusedName(document: SheetDocument): Record<string, string> {
  const taken = new Set(document.parts.flatMap(({ kind, values }) => (kind === 'nodeName' ? [values['name'] ?? ''] : [])));
  const values = initialValues('nodeName');
  return { ...values, name: freeNodeName(values['name'] ?? 'node', taken) };
}

/**
 * Moves parts. The corners of wires between moved parts go with them; a wire with one end left behind stretches, and
 * keeps the corners that a hand placed.
 */
export function moveParts(document: SheetDocument, ids: ReadonlySet<PartId>, by: Point): SheetDocument {
  if (ids.size === 0 || (by.x === 0 && by.y === 0)) return document;
  return {
    ...document,
    parts: document.parts.map((part) => (ids.has(part.id) ? { ...part, at: add(part.at, by) } : part)),
    wires: document.wires.map((wire) => moveWith(wire, ids, by)),
  };
}

function moveWith(wire: Wire, ids: ReadonlySet<PartId>, by: Point): Wire {
  if (wire.corners.length === 0 || !ids.has(wire.from.part) || !ids.has(wire.to.part)) return wire;
  return { ...wire, corners: wire.corners.map((corner) => add(corner, by)) };
}

/** Turns parts by quarter turns about their common centre; a single part about its own. */
export function turnParts(document: SheetDocument, ids: ReadonlySet<PartId>, quarterTurns: number): SheetDocument {
  return rearrange(document, ids, (offset, part) => {
    const turned = turnPoint(offset, quarterTurns);
    return { offset: turned, turn: turnBy(part.turn, quarterTurns), mirrored: part.mirrored };
  });
}

/** Mirrors parts left to right, or top to bottom, about their common centre. */
export function mirrorParts(
  document: SheetDocument,
  ids: ReadonlySet<PartId>,
  axis: 'leftRight' | 'topBottom',
): SheetDocument {
  return rearrange(document, ids, (offset, part) => {
    // Mirroring comes before turning in a placement, so a part that lies on its side needs half a turn besides.
    const onItsSide = part.turn === 90 || part.turn === 270;
    const halfTurn = (axis === 'leftRight') === onItsSide;
    return {
      offset: axis === 'leftRight' ? { x: -offset.x, y: offset.y } : { x: offset.x, y: -offset.y },
      turn: halfTurn ? turnBy(part.turn, 2) : part.turn,
      mirrored: !part.mirrored,
    };
  });
}

type Rearranged = { readonly offset: Point; readonly turn: Part['turn']; readonly mirrored: boolean };

function rearrange(
  document: SheetDocument,
  ids: ReadonlySet<PartId>,
  move: (offset: Point, part: Part) => Rearranged,
): SheetDocument {
  const chosen = document.parts.filter((part) => ids.has(part.id));
  const only = chosen.length === 1 ? chosen[0] : undefined;
  const around = unite(chosen.map(extentOf));
  if (!around) return document;
  const centre = only ? only.at : centreOnGrid(centreOf(around));
  const map = (at: Point, part: Part): Rearranged => move({ x: at.x - centre.x, y: at.y - centre.y }, part);
  const sample = chosen[0];
  return {
    ...document,
    parts: document.parts.map((part) => {
      if (!ids.has(part.id)) return part;
      const { offset, turn, mirrored } = map(part.at, part);
      return { ...part, at: add(centre, offset), turn, mirrored };
    }),
    wires: document.wires.map((wire) => {
      if (!sample || wire.corners.length === 0 || !ids.has(wire.from.part) || !ids.has(wire.to.part)) return wire;
      return { ...wire, corners: wire.corners.map((corner) => add(centre, map(corner, sample).offset)) };
    }),
  };
}

/**
 * The centre to turn and mirror about: near the middle, taking grid points to grid points, and the same again after the
 * turn, so that four turns or two mirrorings bring every part back. Midway both ways is itself such a centre. Midway
 * one way, one of the two grid points beside it is on the black squares of the board, before the turn and after it.
 */
function centreOnGrid(middle: Point): Point {
  const midwayX = Math.abs(middle.x % GRID) === GRID / 2;
  const midwayY = Math.abs(middle.y % GRID) === GRID / 2;
  if (midwayX && midwayY) return middle;
  const near = snap(middle);
  const black = (near.x + near.y) % (2 * GRID) === 0;
  if (midwayX && !black) return { x: near.x - GRID, y: near.y };
  if (midwayY && !black) return { x: near.x, y: near.y - GRID };
  return near;
}

function turnPoint(point: Point, quarterTurns: number): Point {
  switch (((quarterTurns % 4) + 4) % 4) {
    case 1:
      return { x: -point.y + 0, y: point.x };
    case 2:
      return { x: -point.x + 0, y: -point.y + 0 };
    case 3:
      return { x: point.y, y: -point.x + 0 };
    default:
      return point;
  }
}

/** Takes parts and wires off the sheet, with the wires that ended on them, and clears junctions that join nothing. */
export function removeFromSheet(
  document: SheetDocument,
  parts: ReadonlySet<PartId>,
  wires: ReadonlySet<string>,
): SheetDocument {
  if (parts.size === 0 && wires.size === 0) return document;
  const gone = document.wires.filter(
    (wire) => wires.has(wire.id) || parts.has(wire.from.part) || parts.has(wire.to.part),
  );
  const goneIds = new Set(gone.map(({ id }) => id));
  const touched = new Set(gone.flatMap((wire) => [wire.from.part, wire.to.part]));
  const left: SheetDocument = {
    ...document,
    parts: document.parts.filter(({ id }) => !parts.has(id)),
    wires: document.wires.filter(({ id }) => !goneIds.has(id)),
  };
  return pruneJunctions(left, touched);
}
