import { Complex } from 'complex.js';
import type { ElementList } from '../elements/element-list';
import { validateElementList } from '../elements/validate-element-list';
import type { NaturalFrequency } from '../linear/coincident-roots';
import { COINCIDENT } from '../linear/coincident-roots';
import { ComplexLu } from '../linear/complex-lu';
import type { NaturalFrequencies } from '../linear/natural-frequencies';
import { naturalFrequencies } from '../linear/natural-frequencies';
import { balance } from '../linear/pencil-matrices';
import type { Stamps } from '../linear/stamps';
import type { Network } from './network';
import { toNetwork } from './network';
import type { NetworkReading } from './network-reading';
import { portNamed, resolveReading, sourceNamed } from './network-reading';
import type { Pencil } from './pencil';
import { DRIVE, pencilOf, singularPencil } from './pencil';
import type { Problem } from './problem';
import { isProblem, problem } from './problem';
import { ScaledProduct } from './scaled-product';

/** A ratio of two phasors as a function of s. */
export type Transfer =
  /** An output over the value of an independent source (V or A), all other independent sources dead. */
  | { readonly kind: 'transfer'; readonly source: string; readonly output: NetworkReading }
  /** The voltage of the first node over the second, over the current sent in at the first and out at the second, ohms; all independent sources dead. */
  | { readonly kind: 'impedance'; readonly nodes: readonly [string, string] };

/** A pole or a zero of a transfer function. */
export interface Root {
  /** The complex frequency, rad/s; complex ones come as exactly conjugate pairs. */
  readonly s: Complex;
  /** The natural frequency |s|/2π, Hz. */
  readonly frequency: number;
  /** |s| / (2·|Re s|): 0.5 for every real one; undefined on the imaginary axis and at the origin. */
  readonly q: number | undefined;
  /** How far s moves when every element value is off by one unit of rounding, rad/s: errors are of this size. */
  readonly uncertainty: number;
  /** How many coincide here within their uncertainties; each is in the list. */
  readonly multiplicity: number;
}

/** A pole and a zero that coincide within what their uncertainties explain: the transfer function does not show them. */
export interface CancelledPair {
  readonly pole: Root;
  readonly zero: Root;
}

/**
 * - `stable`: all poles in the left half-plane.
 * - `marginal`: none in the right half-plane, but single ones on the imaginary axis as far as their uncertainties tell.
 * - `unstable`: at least one in the right half-plane, or several in one place on the axis.
 */
export type Stability = 'stable' | 'marginal' | 'unstable';

/** H(s) = gain · Π(s − zero) / Π(s − pole). */
export interface PolesAndZeros {
  readonly ok: true;
  readonly poles: readonly Root[];
  readonly zeros: readonly Root[];
  readonly cancelled: readonly CancelledPair[];
  /** The gain constant, in the unit of H times (rad/s)^(poles − zeros); undefined where that leaves the range of numbers; 0 where H is 0 for all s. */
  readonly gain: number | undefined;
  /** gain · omega^(zeros − poles), which does not leave it: H(s) = scaledGain · Π((s − zero)/omega) / Π((s − pole)/omega). */
  readonly scaledGain: number;
  /** The frequency of `scaledGain`, in the middle of the network's band, rad/s. */
  readonly omega: number;
  /** Of the transfer function. */
  readonly stability: Stability;
  /** Of the network with its sources dead: the cancelled poles too. */
  readonly networkStability: Stability;
}

/**
 * The poles and zeros of a transfer function of a network of elements whose laws are polynomials in s.
 *
 * Poles are the s at which the equations (G + s·C)·x = 0 of the network have a solution with its sources dead; zeros
 * those at which the source can have any value while the output is 0: the bordered pencil [[G + sC, b], [eᵀ, 0]], with
 * the row of the source and the column of its value already taken out (Laub and Moore, Automatica 14 (1978) 557). Both
 * as in `naturalFrequencies`. Only the part of the network that hangs together with source and output is looked at.
 *
 * A `Problem` for an element known from a table or a line, an unknown name, an output or a source between parts of the
 * network that nothing joins, and equations that are singular for every s.
 *
 * Each pole and zero is as exact as its own `uncertainty` says; that is checked against exact arithmetic for element
 * values over 12 decades. Beyond some 16 decades in one network the sums of admittances at a node lose what decides, and
 * errors may be larger. Time grows with the cube of the number of unknowns: some 20 ms for 40, 60 ms for 80.
 */
export function polesAndZeros(list: ElementList, transfer: Transfer): PolesAndZeros | Problem {
  const checked = validateElementList(list);
  if (!checked.ok) return problem('invalid', checked.elements, [], checked.message);
  const ends = endsOf(toNetwork(checked.list), transfer);
  if (isProblem(ends)) return ends;
  const pencil = pencilOf(checked.list.elements, {
    currents: ends.currents,
    drivenNodes: transfer.kind === 'impedance' ? transfer.nodes : undefined,
    around: ends.around,
  });
  if (!pencil.ok) return pencil;
  const apart = unjoined(pencil, ends);
  if (apart !== undefined) return apart;
  const drive = pencil.unknownOfPort(...ends.source) ?? -1;
  const size = pencil.unknowns.length;
  const poles = naturalFrequencies(pencil.stamps, size, pencil.omega);
  if (poles.kind === 'singular') return singularPencil(pencil, pencil.stamps.toMatrices(size, pencil.omega));
  const output = outputColumns(pencil, ends);
  const withoutInput = pencil.stamps.withoutRow(drive);
  withoutInput.add(drive, -1, output[0], output[1], 1, 0, true);
  const zeros = naturalFrequencies(withoutInput, size, pencil.omega);
  if (poles.kind === 'unsettled' || zeros.kind === 'unsettled') return unsettled();
  return compose(pencil, drive, output, poles.list, zeros);
}

/** Where the transfer function begins and ends. */
interface Ends {
  /** The port whose equation the source drives. */
  readonly source: readonly [element: string, port: number];
  /** The nodes of the source where it gives a current, which has to come back. */
  readonly sentThrough: readonly [string, string] | undefined;
  readonly output:
    | { readonly nodes: readonly [string, string] }
    | { readonly port: readonly [element: string, port: number] };
  readonly currents: readonly (readonly [string, number])[];
  readonly around: readonly string[];
}

function endsOf(network: Network, transfer: Transfer): Ends | Problem {
  if (transfer.kind === 'impedance') {
    const nodes = portNamed(network, transfer.nodes);
    if (isProblem(nodes)) return nodes;
    const source = [DRIVE, 0] as const;
    return { source, sentThrough: transfer.nodes, output: { nodes: transfer.nodes }, currents: [source], around: transfer.nodes };
  }
  const { output } = transfer;
  const row = sourceNamed(network, transfer.source);
  if (isProblem(row)) return row;
  const reading = resolveReading(network, output);
  if (isProblem(reading)) return reading;
  const source = [transfer.source, 0] as const;
  const sourceNodes = nodesOfRow(network, row);
  const sentThrough = network.laws[row]?.law === 'current' ? sourceNodes : undefined;
  if (output.quantity === 'current') {
    const through = [output.element, output.port ?? 0] as const;
    const around = [...sourceNodes, ...(reading.kind === 'current' ? nodesOfRow(network, reading.row) : [])];
    return { source, sentThrough, output: { port: through }, currents: [source, through], around };
  }
  const nodes = reading.kind === 'between' ? namesOf(network, reading.one, reading.other) : sourceNodes;
  return { source, sentThrough, output: { nodes }, currents: [source], around: [...sourceNodes, ...nodes] };
}

function nodesOfRow(network: Network, row: number): readonly [string, string] {
  return namesOf(network, network.first[row] ?? 0, network.second[row] ?? 0);
}

function namesOf({ nodeNames }: Network, one: number, other: number): readonly [string, string] {
  return [nodeNames[one] ?? '', nodeNames[other] ?? ''];
}

/** A voltage between parts that nothing joins is not determined, and a current from one into the other has no way back. */
function unjoined(pencil: Pencil, { sentThrough, output }: Ends): Problem | undefined {
  if (sentThrough !== undefined && !pencil.areJoined(...sentThrough)) {
    const [from, to] = sentThrough;
    const message = `Nothing but the source itself joins nodes ${from} and ${to}, so its current has no way back. Connect them through an element that conducts.`;
    return problem('floatingNode', [], [from, to], message);
  }
  if ('nodes' in output && !pencil.areJoined(...output.nodes)) {
    const [one, other] = output.nodes;
    const message = `Nothing that conducts joins nodes ${one} and ${other}, so the voltage between them is not determined. Connect the two parts of the network, or take an output within one of them.`;
    return problem('noReference', [], [one, other], message);
  }
  return undefined;
}

function outputColumns(pencil: Pencil, { output }: Ends): readonly [number, number] {
  if ('port' in output) return [pencil.unknownOfPort(...output.port) ?? -1, -1];
  const [one, other] = output.nodes;
  return [pencil.unknownOfNode(one) ?? -1, pencil.unknownOfNode(other) ?? -1];
}

function unsettled(): Problem {
  const message = 'The poles and zeros of this network could not be computed. Check the powers of ten of its values.';
  return problem('notFinite', [], [], message);
}

function compose(
  pencil: Pencil,
  drive: number,
  output: readonly [number, number],
  allPoles: readonly NaturalFrequency[],
  found: Exclude<NaturalFrequencies, { kind: 'unsettled' }>,
): PolesAndZeros {
  const { omega } = pencil;
  const networkStability = stabilityOf(allPoles);
  if (found.kind === 'singular') {
    // The output is 0 whatever the source: nothing leads from one to the other, or what does cancels.
    const none = { poles: [], zeros: [], cancelled: [] } as const;
    return { ok: true, ...none, gain: 0, scaledGain: 0, omega, stability: 'stable', networkStability };
  }
  const { poles, zeros, pairs } = cancel(allPoles, found.list);
  const scaledGain = gainOf(pencil.stamps, pencil.unknowns.length, omega, drive, output, poles, zeros);
  const gain = scaledGain * omega ** (poles.length - zeros.length);
  return {
    ok: true,
    poles: poles.map(rootOf),
    zeros: zeros.map(rootOf),
    cancelled: pairs.map(([pole, zero]) => ({ pole: rootOf(pole), zero: rootOf(zero) })),
    gain: Number.isFinite(gain) && gain !== 0 ? gain : undefined,
    scaledGain,
    omega,
    stability: stabilityOf(poles),
    networkStability,
  };
}

function rootOf({ re, im, uncertainty, multiplicity }: NaturalFrequency): Root {
  const size = Math.hypot(re, im);
  const q = re === 0 ? undefined : im === 0 ? 0.5 : size / (2 * Math.abs(re));
  return { s: new Complex(re, im), frequency: size / (2 * Math.PI), q, uncertainty, multiplicity };
}

/** Takes out each pole with the nearest zero, if that is no further than both of them together may be off. */
function cancel(
  allPoles: readonly NaturalFrequency[],
  allZeros: readonly NaturalFrequency[],
): {
  readonly poles: NaturalFrequency[];
  readonly zeros: NaturalFrequency[];
  readonly pairs: readonly (readonly [NaturalFrequency, NaturalFrequency])[];
} {
  const zeros = [...allZeros];
  const poles: NaturalFrequency[] = [];
  const pairs: (readonly [NaturalFrequency, NaturalFrequency])[] = [];
  for (const pole of allPoles) {
    let nearest = -1;
    let least = Infinity;
    for (const [k, zero] of zeros.entries()) {
      // A pair goes with a pair, so that what is left is still symmetric.
      if (Math.sign(zero.im) !== Math.sign(pole.im)) continue;
      const distance = Math.hypot(zero.re - pole.re, zero.im - pole.im);
      if (distance <= COINCIDENT * (zero.uncertainty + pole.uncertainty) && distance < least) {
        nearest = k;
        least = distance;
      }
    }
    const [zero] = nearest < 0 ? [] : zeros.splice(nearest, 1);
    if (zero === undefined) poles.push(pole);
    else pairs.push([pole, zero]);
  }
  return { poles: recounted(poles), zeros: recounted(zeros), pairs };
}

/** The multiplicities of what is left; members of a group stand in exactly one place. */
function recounted(roots: readonly NaturalFrequency[]): NaturalFrequency[] {
  return roots.map((root) => ({ ...root, multiplicity: roots.filter(({ re, im }) => re === root.re && im === root.im).length }));
}

function stabilityOf(poles: readonly NaturalFrequency[]): Stability {
  const least = (pole: NaturalFrequency): number => 8 * pole.uncertainty;
  if (poles.some((pole) => pole.re > least(pole))) return 'unstable';
  const onAxis = poles.filter((pole) => Math.abs(pole.re) <= least(pole));
  if (onAxis.some(({ multiplicity }) => multiplicity > 1)) return 'unstable';
  return onAxis.length > 0 ? 'marginal' : 'stable';
}

/** Where H is evaluated for the gain, in units of omega: on the positive real axis, where nothing oscillates. */
const PROBES = [0.29, 0.53, 0.97, 1.87, 3.41];

/** scaledGain: H at several s, each over its product of zeros and poles; of these the median. */
function gainOf(
  stamps: Stamps,
  size: number,
  omega: number,
  drive: number,
  output: readonly [number, number],
  poles: readonly NaturalFrequency[],
  zeros: readonly NaturalFrequency[],
): number {
  const matrices = stamps.toMatrices(size, omega);
  const { rows, columns } = balance(matrices);
  const lu = new ComplexLu(size);
  const x = new Float64Array(size);
  const nothing = new Float64Array(size);
  const at = (index: number): number => (index < 0 ? 0 : (x[index] ?? 0) * (columns[index] ?? 1));
  const gains = PROBES.map((sigma) => {
    for (let k = 0; k < size * size; k++) lu.re[k] = (matrices.aRe[k] ?? 0) - sigma * (matrices.bRe[k] ?? 0);
    lu.im.fill(0);
    lu.factor();
    x.fill(0);
    nothing.fill(0);
    x[drive] = rows[drive] ?? 1;
    lu.solve(x, nothing);
    const product = new ScaledProduct();
    product.multiply(at(output[0]) - at(output[1]));
    for (const { re, im } of poles) product.multiply(distance(sigma, re / omega, im / omega));
    for (const { re, im } of zeros) product.divide(distance(sigma, re / omega, im / omega));
    return product.value();
  });
  return gains.sort((a, b) => a - b)[PROBES.length >> 1] ?? 0;
}

/** The factor of a real root; of a pair, each gives the distance, and the two together their product. */
function distance(sigma: number, re: number, im: number): number {
  return im === 0 ? sigma - re : Math.hypot(sigma - re, im);
}
