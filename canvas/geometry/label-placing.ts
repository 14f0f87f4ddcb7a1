import { overlap, type Box } from './box';

/** Something to be set beside a part or a node, and the places it may have, the best first. */
export type Block = { readonly id: string; readonly candidates: readonly Box[] };

/**
 * Sets blocks one after another, each at its first candidate that covers nothing, else at the one that covers least
 * (in area). A block that was set is in the way of those after it, so the order of blocks is their rank.
 *
 * @param obstacles what must stay uncovered: bodies and wires.
 * @param mayHide blocks that are left out rather than set over something.
 */
export function placeBlocks(
  blocks: readonly Block[],
  obstacles: readonly Box[],
  mayHide: (id: string) => boolean = () => false,
): ReadonlyMap<string, Box> {
  const taken = new BoxIndex(obstacles);
  const placed = new Map<string, Box>();
  for (const { id, candidates } of blocks) {
    let best: Box | null = null;
    let bestCovered = Infinity;
    for (const candidate of candidates) {
      const covered = coveredArea(candidate, taken, bestCovered);
      if (covered < bestCovered) {
        best = candidate;
        bestCovered = covered;
      }
      if (covered === 0) break;
    }
    if (!best || (bestCovered > 0 && mayHide(id))) continue;
    placed.set(id, best);
    taken.add(best);
  }
  return placed;
}

/** Side of an index cell: about the width of a reading, so that a block looks into few cells and a cell holds few. */
const CELL = 120;

/** Boxes by the cells of a coarse grid that they touch: what could cover a block is found without asking all. */
class BoxIndex {
  private readonly cells = new Map<string, Box[]>();

  constructor(boxes: readonly Box[]) {
    for (const box of boxes) this.add(box);
  }

  add(box: Box): void {
    forEachCell(box, (cell) => {
      const there = this.cells.get(cell);
      if (there) there.push(box);
      else this.cells.set(cell, [box]);
    });
  }

  near(box: Box): Set<Box> {
    const found = new Set<Box>();
    forEachCell(box, (cell) => {
      for (const other of this.cells.get(cell) ?? []) found.add(other);
    });
    return found;
  }
}

function forEachCell(box: Box, visit: (cell: string) => void): void {
  for (let x = Math.floor(box.left / CELL); x <= Math.floor(box.right / CELL); x += 1) {
    for (let y = Math.floor(box.top / CELL); y <= Math.floor(box.bottom / CELL); y += 1) visit(`${x},${y}`);
  }
}

function coveredArea(box: Box, taken: BoxIndex, enough: number): number {
  let area = 0;
  for (const other of taken.near(box)) {
    if (!overlap(box, other)) continue;
    const width = Math.min(box.right, other.right) - Math.max(box.left, other.left);
    const height = Math.min(box.bottom, other.bottom) - Math.max(box.top, other.top);
    // Touching rims count a little, so that a free place is preferred to one that only just fits.
    area += Math.max(1, width) * Math.max(1, height);
    if (area >= enough) return area;
  }
  return area;
}
