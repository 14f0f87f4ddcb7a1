import type { Showing } from '../commands/command';
import { bodyOf, coursesOf, extentOf, findPin } from '../document/lookup';
import type { Convention, Part, PartId, SheetDocument } from '../document/types';
import { grow, type Box } from '../geometry/box';
import { placeBlocks, type Block } from '../geometry/label-placing';
import type { Point } from '../geometry/point';
import type { DrawnNode, Nodes } from '../network/nodes';
import { definitionOf } from '../parts/registry';

/** How a text block is set from its place: `x` is its left edge, middle or right edge. */
export type Align = 'start' | 'middle' | 'end';

/** Lines of text at a place; `at` is the top of the block at its aligned edge. */
export type TextBlock = { readonly at: Point; readonly align: Align };

export type LabelLayout = {
  /** Designator and value, by part; relative to the part's place. */
  readonly labels: ReadonlyMap<PartId, TextBlock>;
  /** The part's readings, by part; relative to the part's place. */
  readonly readings: ReadonlyMap<PartId, TextBlock>;
  /** Voltages of nodes without a name mark, by node name; on the sheet. */
  readonly nodes: ReadonlyMap<string, TextBlock>;
};

export const LABEL_LINE = 16;
export const READING_LINE = 19;
/** Widths that hold the longest text a block can show, so that nothing moves when a figure changes. */
const CHARACTER = 7.25;
const READING_WIDTH = { polar: 146, rectangular: 178 } as const;
const GAP = 10;
/** The reference mark, node names and junctions carry no label of their own beside them. */
const MARK_KINDS: ReadonlySet<Part['kind']> = new Set(['reference', 'nodeName', 'junction']);

const linesOf = new WeakMap<Part, readonly string[]>();

/** The lines beside a part: its designator and value, or for a source, the lines of its description. */
export function labelLines(part: Part): readonly string[] {
  const known = linesOf.get(part);
  if (known) return known;
  const made = writeLines(part);
  linesOf.set(part, made);
  return made;
}

function writeLines(part: Part): readonly string[] {
  if (MARK_KINDS.has(part.kind)) return [];
  const [first = '', ...more] = definitionOf(part.kind).describe(part.values).split('\n');
  return more.length === 0 ? [`${part.designator} ${first}`] : [part.designator, first, ...more];
}

/** The room that a line of a label may take, in drawing units; a little more than it does. */
export function labelWidth(line: string): number {
  return line.length * CHARACTER;
}

function labelSize(part: Part): { readonly width: number; readonly height: number } {
  const lines = labelLines(part);
  return { width: Math.max(...lines.map(labelWidth)) + 4, height: lines.length * LABEL_LINE };
}

type Sized = { readonly width: number; readonly height: number };

/** Places round a body: above and below it, and to either side. */
function around(body: Box, { width, height }: Sized, prefer: readonly Side[]): readonly { readonly box: Box; readonly align: Align }[] {
  const middleX = (body.left + body.right) / 2;
  const middleY = (body.top + body.bottom) / 2;
  const at: Record<Side, { readonly left: number; readonly top: number; readonly align: Align }> = {
    above: { left: middleX - width / 2, top: body.top - GAP - height, align: 'middle' },
    below: { left: middleX - width / 2, top: body.bottom + GAP, align: 'middle' },
    right: { left: body.right + GAP, top: middleY - height / 2, align: 'start' },
    left: { left: body.left - GAP - width, top: middleY - height / 2, align: 'end' },
    rightUpper: { left: body.right + GAP, top: middleY - height - 1, align: 'start' },
    rightLower: { left: body.right + GAP, top: middleY + 2, align: 'start' },
    leftUpper: { left: body.left - GAP - width, top: middleY - height - 1, align: 'end' },
    leftLower: { left: body.left - GAP - width, top: middleY + 2, align: 'end' },
  };
  return prefer.map((side) => {
    const { left, top, align } = at[side];
    return { box: { left, top, right: left + width, bottom: top + height }, align };
  });
}

type Side = 'above' | 'below' | 'left' | 'right' | 'rightUpper' | 'rightLower' | 'leftUpper' | 'leftLower';

const LYING = { label: ['above', 'below'], reading: ['below', 'above'] } as const;
const STANDING = {
  label: ['rightUpper', 'leftUpper', 'right', 'left'],
  reading: ['rightLower', 'leftLower', 'right', 'left'],
} as const;
const STANDING_SOURCE = { label: ['left', 'right'], reading: ['rightLower', 'right', 'leftLower'] } as const;

function sidesOf(part: Part): { readonly label: readonly Side[]; readonly reading: readonly Side[] } {
  if (part.turn === 0 || part.turn === 180) return LYING;
  return part.kind === 'voltageSource' || part.kind === 'currentSource' ? STANDING_SOURCE : STANDING;
}

/** How many lines of reading stand beside each part. */
export function readingLines(showing: Showing): number {
  return Number(showing.currents) + Number(showing.voltages) + Number(showing.powers);
}

/**
 * Finds places for everything written on the drawing, so that nothing covers anything it can keep clear of. Depends on
 * the drawing and on what is shown, never on the figures, so that nothing moves while a value or the frequency does.
 */
export function layOutLabels(
  document: SheetDocument,
  nodes: Nodes,
  showing: Showing,
  form: Convention['form'],
): LabelLayout {
  const obstacles = [...document.parts.map(obstacleOf), ...wireObstacles(document)];
  const blocks: (Block & { readonly aligns: readonly Align[] })[] = [];
  const lines = readingLines(showing);
  const offer = (id: string, places: readonly { readonly box: Box; readonly align: Align }[]) =>
    blocks.push({ id, candidates: places.map(({ box }) => box), aligns: places.map(({ align }) => align) });

  for (const part of document.parts) {
    if (MARK_KINDS.has(part.kind)) continue;
    offer(`label/${part.id}`, around(bodyOf(part), labelSize(part), sidesOf(part).label));
  }
  if (lines > 0) {
    const size = { width: READING_WIDTH[form], height: lines * READING_LINE };
    for (const part of document.parts) {
      if (MARK_KINDS.has(part.kind)) continue;
      offer(`reading/${part.id}`, around(bodyOf(part), size, sidesOf(part).reading));
    }
  }
  if (showing.nodes) {
    const size = { width: READING_WIDTH[form] + 10, height: READING_LINE };
    for (const node of nodes.all) {
      if (node.named || node.name === '0' || node.pins.length < 2) continue;
      offer(`node/${node.name}`, nodePlaces(document, node, size));
    }
  }

  const placed = placeBlocks(blocks, obstacles, (id) => id.startsWith('node/'));
  const layout = { labels: new Map<PartId, TextBlock>(), readings: new Map<PartId, TextBlock>(), nodes: new Map<string, TextBlock>() };
  const partAt = new Map(document.parts.map((part) => [part.id, part.at]));
  for (const { id, candidates, aligns } of blocks) {
    const box = placed.get(id);
    if (!box) continue;
    const align = aligns[candidates.indexOf(box)] ?? 'start';
    const [what, key = ''] = splitOnce(id);
    const origin = what === 'node' ? { x: 0, y: 0 } : (partAt.get(key) ?? { x: 0, y: 0 });
    const x = align === 'start' ? box.left : align === 'end' ? box.right : (box.left + box.right) / 2;
    const block = { at: { x: x - origin.x, y: box.top - origin.y }, align };
    if (what === 'label') layout.labels.set(key, block);
    else if (what === 'reading') layout.readings.set(key, block);
    else layout.nodes.set(key, block);
  }
  return layout;
}

function splitOnce(id: string): readonly [string, string] {
  const slash = id.indexOf('/');
  return [id.slice(0, slash), id.slice(slash + 1)];
}

function obstacleOf(part: Part): Box {
  const body = part.kind === 'nodeName' ? grow(bodyOf(part), 26) : bodyOf(part);
  // A name's pill widens with its reading, upwards and downwards it does not.
  return part.kind === 'nodeName' ? { ...body, top: body.top + 24, bottom: part.at.y } : grow(body, 1);
}

function wireObstacles(document: SheetDocument): Box[] {
  const boxes: Box[] = [];
  for (const course of coursesOf(document).values()) {
    for (let index = 1; index < course.length; index += 1) {
      const a = course[index - 1];
      const b = course[index];
      if (!a || !b) continue;
      boxes.push({ left: Math.min(a.x, b.x), right: Math.max(a.x, b.x), top: Math.min(a.y, b.y), bottom: Math.max(a.y, b.y) });
    }
  }
  // Leads between a body and its pins are as much in the way as wires.
  for (const part of document.parts) if (!MARK_KINDS.has(part.kind)) boxes.push(leadsOf(part));
  return boxes;
}

function leadsOf(part: Part): Box {
  const extent = extentOf(part);
  const lying = part.turn === 0 || part.turn === 180;
  return lying
    ? { ...extent, top: part.at.y, bottom: part.at.y }
    : { ...extent, left: part.at.x, right: part.at.x };
}

/** Beside the node's pins and wire corners: above right, above left, below right, below left of each. */
function nodePlaces(
  document: SheetDocument,
  node: DrawnNode,
  { width, height }: Sized,
): readonly { readonly box: Box; readonly align: Align }[] {
  const spots = node.pins
    .flatMap((ref) => findPin(document, ref)?.at ?? [])
    .sort((a, b) => a.y - b.y || a.x - b.x)
    .slice(0, 6);
  const place = (left: number, top: number): { readonly box: Box; readonly align: Align } => ({
    box: { left, top, right: left + width, bottom: top + height },
    align: 'start',
  });
  return spots.flatMap(({ x, y }) => [
    place(x + 5, y - height - 5),
    place(x - width - 5, y - height - 5),
    place(x - width / 2, y - height - 8),
    place(x + 5, y + 5),
    place(x - width - 5, y + 5),
    place(x - width / 2, y - height - 26),
  ]);
}
