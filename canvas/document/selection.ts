import type { PartId, SheetDocument, WireId } from './types';

export type Selection = { readonly parts: ReadonlySet<PartId>; readonly wires: ReadonlySet<WireId> };

export const NOTHING_SELECTED: Selection = { parts: new Set(), wires: new Set() };

export function selectParts(ids: Iterable<PartId>): Selection {
  return { parts: new Set(ids), wires: new Set() };
}

export function selectWires(ids: Iterable<WireId>): Selection {
  return { parts: new Set(), wires: new Set(ids) };
}

export function selectAll(document: SheetDocument): Selection {
  return { parts: new Set(document.parts.map(({ id }) => id)), wires: new Set(document.wires.map(({ id }) => id)) };
}

export function isEmptySelection(selection: Selection): boolean {
  return selection.parts.size === 0 && selection.wires.size === 0;
}

/** Without what is no longer on the sheet; the same object when all of it still is. */
export function stillThere(selection: Selection, document: SheetDocument): Selection {
  const parts = document.parts.filter(({ id }) => selection.parts.has(id));
  const wires = document.wires.filter(({ id }) => selection.wires.has(id));
  if (parts.length === selection.parts.size && wires.length === selection.wires.size) return selection;
  return { parts: new Set(parts.map(({ id }) => id)), wires: new Set(wires.map(({ id }) => id)) };
}
