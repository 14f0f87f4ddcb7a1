import { partsById, pinKey } from '@/canvas/document/lookup';
import type { NoteAnchor } from '@/canvas/document/notes';
import type { SheetDocument } from '@/canvas/document/types';
import type { Nodes } from '@/canvas/network/nodes';
import { definitionOf } from '@/canvas/parts/registry';

export type AnchorWords = {
  /** Such as `at R1`, `at node out`. */
  readonly text: string;
  /** What the note was pinned to is no longer on the sheet. */
  readonly gone: boolean;
};

/** What a note is pinned to, in words, as the sheet is now. */
export function describeAnchor(anchor: NoteAnchor, document: SheetDocument, nodes: Nodes): AnchorWords {
  if (anchor.kind === 'place') return { text: 'at a place', gone: false };
  const part = partsById(document).get(anchor.part);
  const node = anchor.kind === 'node' ? nodes.byPin.get(pinKey({ part: anchor.part, pin: anchor.pin })) : undefined;
  if (part === undefined || (anchor.kind === 'node' && node === undefined)) {
    return { text: anchor.kind === 'node' ? 'its node is gone' : 'its part is gone', gone: true };
  }
  if (node !== undefined) return { text: node.name === '0' ? 'at the reference node' : `at node ${node.name}`, gone: false };
  const { name } = definitionOf(part.kind);
  return { text: `at ${part.designator === '' ? `a ${name.toLowerCase()}` : part.designator}`, gone: false };
}
