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
  const taken = [...obstacles];
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
    taken.push(best);
  }
  return placed;
}

function coveredArea(box: Box, taken: readonly Box[], enough: number): number {
  let area = 0;
  for (const other of taken) {
    if (!overlap(box, other)) continue;
    const width = Math.min(box.right, other.right) - Math.max(box.left, other.left);
    const height = Math.min(box.bottom, other.bottom) - Math.max(box.top, other.top);
    // Touching rims count a little, so that a free place is preferred to one that only just fits.
    area += Math.max(1, width) * Math.max(1, height);
    if (area >= enough) return area;
  }
  return area;
}
