import type { Engine } from './engine';
import { REFERENCE } from './network';

/**
 * How well the readings satisfy the equations: the largest of |Σi| / Σ|i| over the nodes but the reference (its current
 * law follows from the others), and of
 * |(v_a − v_b) − v| / max(|v_a|, |v_b|, |v|) over the elements, among what was solved. Between 0 and some units of
 * rounding for a good solution.
 */
export function residualOf(engine: Engine): number {
  const { network, readings } = engine;
  const { first, second, nodeNames, elements } = network;
  const { vRe, vIm, dRe, dIm, iRe, iIm } = readings;
  const sumRe = new Float64Array(nodeNames.length);
  const sumIm = new Float64Array(nodeNames.length);
  const size = new Float64Array(nodeNames.length);
  let worst = 0;
  for (let row = 0; row < elements.length; row++) {
    const a = first[row] ?? 0;
    const b = second[row] ?? 0;
    const re = iRe[row] ?? 0;
    const im = iIm[row] ?? 0;
    sumRe[a] = (sumRe[a] ?? 0) + re;
    sumIm[a] = (sumIm[a] ?? 0) + im;
    sumRe[b] = (sumRe[b] ?? 0) - re;
    sumIm[b] = (sumIm[b] ?? 0) - im;
    const current = Math.hypot(re, im);
    size[a] = (size[a] ?? 0) + current;
    size[b] = (size[b] ?? 0) + current;
    if (!engine.isSolved(a) || !engine.isSolved(b)) continue;
    const offRe = (vRe[a] ?? 0) - (vRe[b] ?? 0) - (dRe[row] ?? 0);
    const offIm = (vIm[a] ?? 0) - (vIm[b] ?? 0) - (dIm[row] ?? 0);
    const largest = Math.max(
      Math.hypot(vRe[a] ?? 0, vIm[a] ?? 0),
      Math.hypot(vRe[b] ?? 0, vIm[b] ?? 0),
      Math.hypot(dRe[row] ?? 0, dIm[row] ?? 0),
    );
    if (largest > 0) worst = Math.max(worst, Math.hypot(offRe, offIm) / largest);
  }
  for (let node = 0; node < nodeNames.length; node++) {
    const total = size[node] ?? 0;
    if (total === 0 || node === REFERENCE || !engine.isSolved(node)) continue;
    worst = Math.max(worst, Math.hypot(sumRe[node] ?? 0, sumIm[node] ?? 0) / total);
  }
  return worst;
}
