import type { Node } from 'reactflow';
import { bodyOf, extentOf } from '../../document/lookup';
import type { Part } from '../../document/types';
import { grow, unite, type Box } from '../../geometry/box';
import type { LabelLayout, TextBlock } from '../../labels/label-layout';

/*
 * The adapter to React Flow, and the only place that knows its node type. React Flow keeps the viewport and mounts a
 * box a part; selecting, dragging and wiring are ours (see gestures), since its own go through React at every move.
 */

export type PartNodeData = { readonly part: Part; readonly label: TextBlock | null };
export type PartNode = Node<PartNodeData, 'part'>;

const MARGIN = 4;

/** The box that stands for a part on the screen: body and pins, and a margin for the outline. */
export function nodeBox(part: Part): Box {
  return grow(unite([bodyOf(part), extentOf(part)]) ?? bodyOf(part), MARGIN);
}

const known = new WeakMap<Part, PartNode>();

function nodeOf(part: Part, label: TextBlock | null): PartNode {
  const before = known.get(part);
  if (before && sameBlock(before.data.label, label)) return before;
  const box = nodeBox(part);
  const node: PartNode = {
    id: part.id,
    type: 'part',
    // A junction is a point of a wire, and says nothing by itself: going from part to part passes it by.
    focusable: part.kind !== 'junction',
    position: { x: box.left, y: box.top },
    width: box.right - box.left,
    height: box.bottom - box.top,
    style: { width: box.right - box.left, height: box.bottom - box.top },
    data: { part, label },
  };
  known.set(part, node);
  return node;
}

function sameBlock(a: TextBlock | null, b: TextBlock | null): boolean {
  if (a === null || b === null) return a === b;
  return a.at.x === b.at.x && a.at.y === b.at.y && a.align === b.align;
}

/** A node for each part; parts that did not change keep their node, so that they do not render again. */
export function flowNodes(parts: readonly Part[], layout: LabelLayout): PartNode[] {
  return parts.map((part) => nodeOf(part, layout.labels.get(part.id) ?? null));
}
