import type { SheetDocument } from '@/canvas/document/types';
import { pinKey } from '@/canvas/document/lookup';
import { findNodes } from '@/canvas/network/nodes';

/**
 * Which pins are one node, as sorted text, so that two drawings can be held against each other.
 * @param keep only pins of these parts count; all when absent
 */
export function nodePartition(document: SheetDocument, keep?: ReadonlySet<string>): string[] {
  return findNodes(document)
    .all.map(({ pins }) =>
      pins
        .filter(({ part }) => !keep || keep.has(part))
        .map(pinKey)
        .sort()
        .join(' '),
    )
    .filter((pins) => pins !== '')
    .sort();
}

export function partIds(document: SheetDocument): ReadonlySet<string> {
  return new Set(document.parts.map(({ id }) => id));
}
