import { Complex } from 'complex.js';
import { ADMITTANCE, GIVEN_CURRENT } from '../elements/branch-table';
import type { ElementList } from '../elements/element-list';
import { validateElementList } from '../elements/validate-element-list';
import { Engine } from './engine';
import { faultOfFrequency } from './frequency';
import { REFERENCE, rowOf } from './network';
import type { Problem } from './problem';
import { problem } from './problem';
import type { PowerBalance, Solution } from './solution';
import { residualOf } from './residual';

export interface SolveOptions {
  /** The operating frequency, hertz; 0 is allowed. */
  readonly frequency: number;
}

/**
 * The sinusoidal steady state of a network at one frequency.
 *
 * A source whose own frequency is not the operating one is dead: a voltage source is an ideal connection, a current
 * source is open. At 0 Hz a capacitor is open and an inductor an ideal connection, exactly. A zero resistance or
 * inductance is an ideal connection, a zero capacitance open; negative values are solved as they stand.
 *
 * What can be solved is solved: the answer is a `Solution` whose `problems` say what is not determined, and a bare
 * `Problem` only for a faulty list and where nothing is determined. A part of the network without a reference node
 * has currents, powers and element voltages, but no node voltages. Never throws, and never answers with a number that
 * is not finite.
 *
 * Method: nodal form with given voltages kept as such, by star-mesh elimination without a stored diagonal (see
 * `StarMesh`); parts that controlled sources, transformers and the like link, in modified nodal form with threshold
 * pivoting (see `solveInModifiedNodalForm`); where a pivot cancels, branch form with complete pivoting (see
 * `solveInBranchForm`).
 */
export function solve(list: ElementList, options: SolveOptions): Solution | Problem {
  const checked = validateElementList(list);
  if (!checked.ok) return problem('invalid', checked.elements, [], checked.message);
  const { frequency } = options;
  const fault = faultOfFrequency(frequency);
  if (fault !== undefined) return problem('invalid', [], [], fault);
  const engine = new Engine(checked.list);
  const problems = engine.solveAt(frequency);
  const [worst] = problems;
  if (worst !== undefined && !isAnythingKnown(engine)) return worst;
  return toSolution(engine, frequency, problems);
}

/** Whether any node's voltage but the reference's, or any current that is not just given, is determined. */
function isAnythingKnown(engine: Engine): boolean {
  const { network, branches, readings } = engine;
  if (readings.vKnown.includes(1, REFERENCE + 1)) return true;
  return network.laws.some((_, row) => {
    if (readings.iKnown[row] !== 1) return false;
    return (
      branches.form[row] !== GIVEN_CURRENT ||
      (engine.isSolved(network.first[row] ?? 0) && engine.isSolved(network.second[row] ?? 0))
    );
  });
}

function toSolution(engine: Engine, frequency: number, problems: readonly Problem[]): Solution {
  const { network, branches, readings } = engine;
  const { nodeIndex } = network;

  const isSolved = (row: number): boolean =>
    engine.isSolved(network.first[row] ?? 0) && engine.isSolved(network.second[row] ?? 0);
  const voltage = (node: string): Complex | undefined => {
    const at = nodeIndex.get(node);
    return at === undefined || readings.vKnown[at] !== 1 ? undefined : complex(readings.vRe[at], readings.vIm[at]);
  };
  const elementVoltage = (id: string, port = 0): Complex | undefined => {
    const at = rowOf(network, id, port);
    return readings.dKnown[at] === 1 ? complex(readings.dRe[at], readings.dIm[at]) : undefined;
  };
  const current = (id: string, port = 0): Complex | undefined => {
    const at = rowOf(network, id, port);
    return readings.iKnown[at] === 1 ? complex(readings.iRe[at], readings.iIm[at]) : undefined;
  };
  const powerAt = (row: number): Complex | undefined => {
    if (readings.dKnown[row] === 1 && readings.iKnown[row] === 1) return powerOf(engine, row);
    // Nothing times something finite: an open circuit's voltage, or an ideal connection's current, need not be known.
    return branches.form[row] !== ADMITTANCE && branches.isGivenZero(row) && isSolved(row) ? complex(0, 0) : undefined;
  };
  const power = (id: string): Complex | undefined => {
    const place = network.elementIndex.get(id);
    if (place === undefined) return undefined;
    let sum: Complex | undefined;
    for (let row = network.rowStart[place] ?? 0; row < (network.rowStart[place + 1] ?? 0); row++) {
      const part = powerAt(row);
      if (part === undefined) return undefined;
      sum = sum === undefined ? part : complex(sum.re + part.re, sum.im + part.im);
    }
    return sum;
  };
  const errorAt = (errors: Float64Array, known: Uint8Array, at: number): number | undefined =>
    known[at] === 1 ? (errors[at] ?? 0) : undefined;
  return {
    ok: true,
    frequency,
    voltage,
    elementVoltage,
    current,
    power,
    voltageError: (node) => errorAt(readings.vError, readings.vKnown, nodeIndex.get(node) ?? -1),
    currentError: (id, port = 0) => errorAt(readings.iError, readings.iKnown, rowOf(network, id, port)),
    residual: residualOf(engine),
    condition: engine.condition,
    balance: balanceOf(engine),
    problems,
  };
}

/** Adding zero makes −0 a plain 0, which no reader of a value should have to think of. */
function complex(re: number | undefined, im: number | undefined): Complex {
  return new Complex((re ?? 0) + 0, (im ?? 0) + 0);
}

function powerOf({ readings }: Engine, row: number): Complex {
  const dRe = readings.dRe[row] ?? 0;
  const dIm = readings.dIm[row] ?? 0;
  const iRe = readings.iRe[row] ?? 0;
  const iIm = readings.iIm[row] ?? 0;
  return complex(dRe * iRe + dIm * iIm, dIm * iRe - dRe * iIm);
}

/**
 * Tellegen's sum over what was solved. A given current between two components counts at each end by that end's voltage,
 * so a component that was solved balances also where its neighbour was not.
 */
function balanceOf(engine: Engine): PowerBalance {
  const { network, readings } = engine;
  let re = 0;
  let im = 0;
  let scale = 0;
  const add = (vRe: number, vIm: number, iRe: number, iIm: number): void => {
    const p = vRe * iRe + vIm * iIm;
    const q = vIm * iRe - vRe * iIm;
    re += p;
    im += q;
    scale += Math.hypot(p, q);
  };
  for (let row = 0; row < network.rowCount; row++) {
    const a = network.first[row] ?? 0;
    const b = network.second[row] ?? 0;
    const iRe = readings.iRe[row] ?? 0;
    const iIm = readings.iIm[row] ?? 0;
    if (engine.isSolved(a) && engine.isSolved(b)) add(readings.dRe[row] ?? 0, readings.dIm[row] ?? 0, iRe, iIm);
    else if (engine.isSolved(a)) add(readings.vRe[a] ?? 0, readings.vIm[a] ?? 0, iRe, iIm);
    else if (engine.isSolved(b)) add(readings.vRe[b] ?? 0, readings.vIm[b] ?? 0, -iRe, -iIm);
  }
  return { sum: complex(re, im), scale };
}
