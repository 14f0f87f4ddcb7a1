import type { Elimination, MeshGraph } from './mesh-graph';

/**
 * Takes an order of elimination through at one frequency in plain numbers, and finds the vertex of the weakest pivot: its
 * size against the sum of those of its terms. Between two neighbours alone a pivot is never weak unless it is nothing.
 *
 * @param re admittances by slot as given; written over. Slots beyond are taken for nothing.
 */
export function weakestPivot(
  graph: MeshGraph,
  order: readonly Elimination[],
  re: number[],
  im: number[],
): { readonly vertex: number; readonly strength: number } {
  let weakest = { vertex: -1, strength: 1 };
  const add = (one: number, other: number, byRe: number, byIm: number): void => {
    const slot = graph.slot(one, other);
    re[slot] = (re[slot] ?? 0) + byRe;
    im[slot] = (im[slot] ?? 0) + byIm;
  };
  for (const { vertex, into, neighbours, slots } of order) {
    const yRe = Array.from(slots, (slot) => re[slot] ?? 0);
    const yIm = Array.from(slots, (slot) => im[slot] ?? 0);
    if (into >= 0) {
      for (const [at, other] of neighbours.entries()) add(into, other, yRe[at] ?? 0, yIm[at] ?? 0);
      continue;
    }
    let [aRe, aIm, squares, present] = [0, 0, 0, 0];
    for (let at = 0; at < slots.length; at++) {
      const [r, i] = [yRe[at] ?? 0, yIm[at] ?? 0];
      aRe += r;
      aIm += i;
      squares += r * r + i * i;
      if (r !== 0 || i !== 0) present++;
    }
    const size = aRe * aRe + aIm * aIm;
    const ratio = Math.sqrt(size / squares);
    const strength = present > 2 || ratio < SERIES_PIVOT ? ratio : 1;
    if (!(strength >= weakest.strength)) weakest = { vertex, strength: strength > 0 ? strength : 0 };
    if (!(size > 0)) return { vertex, strength: 0 };
    for (let one = 0; one < slots.length; one++) {
      const wRe = ((yRe[one] ?? 0) * aRe + (yIm[one] ?? 0) * aIm) / size;
      const wIm = ((yIm[one] ?? 0) * aRe - (yRe[one] ?? 0) * aIm) / size;
      for (let other = one + 1; other < slots.length; other++) {
        const [r, i] = [yRe[other] ?? 0, yIm[other] ?? 0];
        add(neighbours[one] ?? 0, neighbours[other] ?? 0, wRe * r - wIm * i, wRe * i + wIm * r);
      }
    }
  }
  return weakest;
}

const SERIES_PIVOT = 1e-7;
