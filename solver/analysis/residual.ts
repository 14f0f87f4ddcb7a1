import { ADMITTANCE } from '../elements/branch-table';
import type { Engine } from './engine';
import { REFERENCE } from './network';

/**
 * How well the readings satisfy the equations: the largest of |Σi| / Σ|i| over the nodes but the reference (its current
 * law follows from the others), and of
 * |(v_a − v_b) − v| / max(|v_a|, |v_b|, |v|) over the elements, of |Σ c·x| / Σ|c·x| over the equations, among what was solved. Between 0 and some units of
 * rounding for a good solution.
 */
export function residualOf(engine: Engine): number {
  const { network, readings } = engine;
  const { first, second, nodeNames, rowCount } = network;
  const { vRe, vIm, dRe, dIm, iRe, iIm } = readings;
  const sumRe = new Float64Array(nodeNames.length);
  const sumIm = new Float64Array(nodeNames.length);
  const size = new Float64Array(nodeNames.length);
  let worst = 0;
  for (let row = 0; row < rowCount; row++) {
    const a = first[row] ?? 0;
    const b = second[row] ?? 0;
    const re = iRe[row] ?? 0;
    const im = iIm[row] ?? 0;
    sumRe[a] = (sumRe[a] ?? 0) + re;
    sumIm[a] = (sumIm[a] ?? 0) + im;
    sumRe[b] = (sumRe[b] ?? 0) - re;
    sumIm[b] = (sumIm[b] ?? 0) - im;
    const current = Math.max(Math.hypot(re, im), engine.isLinked(a) || engine.isLinked(b) ? termOf(engine, row, a, b) : 0);
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
  worst = Math.max(worst, residualOfEquations(engine));
  for (let node = 0; node < nodeNames.length; node++) {
    const total = size[node] ?? 0;
    if (total === 0 || node === REFERENCE || !engine.isSolved(node)) continue;
    worst = Math.max(worst, Math.hypot(sumRe[node] ?? 0, sumIm[node] ?? 0) / total);
  }
  return worst;
}

/** In modified nodal form a current law is a sum of terms y·v_a and y·v_b, of which the currents are what is left. */
function termOf({ branches, readings }: Engine, row: number, a: number, b: number): number {
  if (branches.form[row] !== ADMITTANCE) return 0;
  const voltage = Math.max(
    Math.hypot(readings.vRe[a] ?? 0, readings.vIm[a] ?? 0),
    Math.hypot(readings.vRe[b] ?? 0, readings.vIm[b] ?? 0),
  );
  return Math.hypot(branches.yRe[row] ?? 0, branches.yIm[row] ?? 0) * voltage;
}

function residualOfEquations(engine: Engine): number {
  const { network, branches, readings } = engine;
  let worst = 0;
  for (let row = 0; row < network.rowCount; row++) {
    const equation = branches.equations[row];
    if (equation === undefined || !engine.isSolved(network.first[row] ?? 0) || !engine.isSolved(network.second[row] ?? 0)) continue;
    let re = 0;
    let im = 0;
    let size = 0;
    for (const [place, of] of equation.row.entries()) {
      const isVoltage = equation.ofVoltage[place] === 1;
      const xRe = (isVoltage ? readings.dRe[of] : readings.iRe[of]) ?? 0;
      const xIm = (isVoltage ? readings.dIm[of] : readings.iIm[of]) ?? 0;
      const cRe = equation.re[place] ?? 0;
      const cIm = equation.im[place] ?? 0;
      re += cRe * xRe - cIm * xIm;
      im += cRe * xIm + cIm * xRe;
      size += Math.hypot(cRe, cIm) * sizeOfTerm(engine, of, isVoltage);
    }
    if (size > 0) worst = Math.max(worst, Math.hypot(re, im) / size);
  }
  return worst;
}

/** A voltage is measured against those of its nodes, which it is the difference of. */
function sizeOfTerm({ network, readings }: Engine, row: number, isVoltage: boolean): number {
  if (!isVoltage) return Math.hypot(readings.iRe[row] ?? 0, readings.iIm[row] ?? 0);
  const a = network.first[row] ?? 0;
  const b = network.second[row] ?? 0;
  return Math.max(
    Math.hypot(readings.vRe[a] ?? 0, readings.vIm[a] ?? 0),
    Math.hypot(readings.vRe[b] ?? 0, readings.vIm[b] ?? 0),
    Math.hypot(readings.dRe[row] ?? 0, readings.dIm[row] ?? 0),
  );
}
