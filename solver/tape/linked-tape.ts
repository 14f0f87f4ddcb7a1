import type { Network } from '../analysis/network';
import { elementAt, rowOf } from '../analysis/network';
import type { Coefficient, Law, Tabulated, Term } from '../elements/law';
import { DisjointSets } from '../linear/disjoint-sets';
import { Admittances, isAdmittance, logarithmicSlopeOf } from './admittances';
import { CoreMatrix, CoreTape } from './core-tape';
import type { GivenTree } from './given-tree';
import { growTrees, isGivenVoltage } from './given-tree';
import { LinkedAdjoint, LinkedReadings } from './linked-readings';
import { MeshGraph, orderElimination } from './mesh-graph';
import { MeshTape } from './mesh-tape';
import type { NetworkInputs } from './network-inputs';
import type { AdjointReadings, Drive, DriveReadings, NetworkTape, OutputWeights, TapeWishes } from './network-tape';
import { choosePivots } from './pivot-order';
import { sampledValues } from './sampled-values';
import type { TapeBuilder, Value } from './tape-builder';
import { isZero, negative, NOTHING, ZERO } from './tape-builder';

/** Above so many unknowns of the core, pivots take too long to choose. */
const LARGEST_CORE = 250;

/** A term of an equation: a coefficient times a voltage between two nodes, an unknown current, or a given one. */
export interface CoreTerm {
  readonly coefficient: Value;
  /** s times the coefficient's derivative by s. */
  readonly slope: Value;
  readonly of: 'voltage' | 'current';
  readonly row: number;
}

/** A network's rows, sorted by how they stand in the equations. */
export interface CoreLayout {
  readonly network: Network;
  readonly inputs: NetworkInputs;
  readonly admittances: Admittances;
  readonly tree: GivenTree;
  readonly mesh: MeshTape;
  /** A vertex of each node: known ones first, then those of the core, then those that are taken out before. */
  readonly vertexOf: Int32Array;
  readonly knownCount: number;
  readonly coreCount: number;
  /** The unknown of each row whose current is one. */
  readonly unknownOf: ReadonlyMap<number, number>;
  /** The terms of each row with an equation. */
  readonly terms: ReadonlyMap<number, readonly CoreTerm[]>;
  readonly core: CoreTape;
  readonly matrix: CoreMatrix;
  /** The coefficients of known voltages, by row of the core, before the elimination. */
  readonly knownEntries: readonly (readonly [row: number, known: number, value: Value])[];
}

/**
 * A network in which equations link ports, on a tape. Nodes that only admittances and current sources touch are taken out
 * by star-mesh elimination; what is left, the core, is in modified nodal form (Ho, Ruehli and Brennan 1975, doi
 * 10.1109/TCS.1975.1084079), with the currents of rows with an equation, and of given voltages that float or are sensed,
 * for unknowns, and is eliminated by pivots that are large enough at several frequencies.
 */
export class LinkedTape implements NetworkTape {
  readonly admittances: Admittances;

  private constructor(private readonly layout: CoreLayout) {
    this.admittances = layout.admittances;
  }

  /**
   * The tape of a network; undefined where it has loops of given voltages, is singular at one of the samples, or has too
   * many linked ports.
   */
  static of(network: Network, inputs: NetworkInputs, wishes: TapeWishes): LinkedTape | undefined {
    const layout = layOut(network, inputs, wishes);
    return layout === undefined ? undefined : new LinkedTape(layout);
  }

  drive(drive: Drive): DriveReadings {
    return new LinkedReadings(this.layout, drive);
  }

  adjoint(weights: OutputWeights): AdjointReadings {
    return new LinkedAdjoint(this.layout, weights);
  }
}

/** The rows whose currents are sensed by equations of other elements, or of their own. */
function sensedRows(network: Network): Set<number> {
  const sensed = new Set<number>();
  for (const [row, law] of network.laws.entries()) {
    if (law.law !== 'equation') continue;
    for (const term of law.terms) if (term.of === 'current') sensed.add(rowOfTerm(network, row, term));
  }
  return sensed;
}

export function rowOfTerm(network: Network, row: number, { port }: Term): number {
  if (typeof port !== 'number') return rowOf(network, port.element);
  return (network.rowStart[network.elementOf[row] ?? 0] ?? 0) + port;
}

function layOut(network: Network, inputs: NetworkInputs, wishes: TapeWishes): CoreLayout | undefined {
  const { laws, first, second, rowCount, nodeNames } = network;
  const ends = (row: number): readonly [number, number] => [first[row] ?? 0, second[row] ?? 0];
  const sensed = sensedRows(network);
  if (sensed.has(-1)) return undefined;
  const whole = growTrees(network);
  if (whole === undefined) return undefined;
  const isFloating = (row: number): boolean => (whole.vertexOf[first[row] ?? 0] ?? 0) >= whole.boundaryCount;
  const isBranch = (row: number): boolean =>
    laws[row]?.law === 'equation' || (isGivenVoltage(network, row) && (sensed.has(row) || isFloating(row)));
  const tree = growTrees(network, isBranch);
  if (tree === undefined) return undefined;

  const inCore = new Set<number>();
  const keep = (row: number): void => {
    for (const node of ends(row)) {
      const vertex = tree.vertexOf[node] ?? 0;
      if (vertex >= tree.boundaryCount) inCore.add(vertex);
    }
  };
  const branches: number[] = [];
  for (let row = 0; row < rowCount; row++) {
    if (isBranch(row)) {
      branches.push(row);
      keep(row);
    }
    const law = laws[row];
    if (law?.law === 'equation') for (const term of law.terms) keep(rowOfTerm(network, row, term));
  }
  const knownCount = tree.boundaryCount;
  const coreCount = inCore.size;
  const size = coreCount + branches.length;
  if (size > LARGEST_CORE) return undefined;

  // Known vertices keep their numbers; the core's come next.
  const renumbered = new Int32Array(tree.vertexCount).fill(-1);
  let next = 0;
  for (; next < knownCount; next++) renumbered[next] = next;
  for (const vertex of inCore) renumbered[vertex] = next++;
  for (let vertex = 0; vertex < tree.vertexCount; vertex++) if (renumbered[vertex] === -1) renumbered[vertex] = next++;
  const vertexOf = Int32Array.from(nodeNames, (_, node) => renumbered[tree.vertexOf[node] ?? 0] ?? 0);

  const graph = new MeshGraph(tree.vertexCount, knownCount + coreCount);
  const rowsOfSlot: number[][] = [];
  const tied = new DisjointSets(tree.vertexCount);
  for (let vertex = 1; vertex < knownCount + coreCount; vertex++) tied.union(0, vertex);
  const vertexEnds = (row: number): readonly [number, number] => [vertexOf[first[row] ?? 0] ?? 0, vertexOf[second[row] ?? 0] ?? 0];
  for (let row = 0; row < rowCount; row++) {
    const [one, other] = vertexEnds(row);
    const law = laws[row];
    if (one === other || (!isAdmittance(law) && law?.law !== 'current')) continue;
    const slot = graph.slot(one, other);
    if (!isAdmittance(law)) continue;
    (rowsOfSlot[slot] ??= []).push(row);
    tied.union(one, other);
  }
  for (let vertex = 0; vertex < tree.vertexCount; vertex++) if (tied.find(vertex) !== tied.find(0)) return undefined;
  for (const [a, b] of wishes.probed) if (vertexOf[a] !== vertexOf[b]) graph.slot(vertexOf[a] ?? 0, vertexOf[b] ?? 0);
  const admittances = new Admittances(network, inputs);
  const order = orderElimination(graph, { last: new Set(wishes.last.map((node) => vertexOf[node] ?? 0)), groups: [] });
  const mesh = new MeshTape(inputs.builder, graph, (slot) => admittances.sumOf(rowsOfSlot[slot] ?? []), order, []);

  const { builder } = inputs;
  const matrix = new CoreMatrix(builder, coreCount, size, knownCount);
  const columnOf = (vertex: number): number => (vertex < knownCount ? size + vertex : vertex - knownCount);
  for (let row = 0; row < coreCount; row++) {
    for (let vertex = 0; vertex < knownCount + coreCount; vertex++) {
      if (vertex === knownCount + row) continue;
      matrix.add(row, columnOf(vertex), negative(mesh.admittanceOf(graph.slot(knownCount + row, vertex))));
    }
  }
  const unknownOf = new Map(branches.map((row, place) => [row, coreCount + place]));
  const terms = new Map<number, readonly CoreTerm[]>();
  const difference = (equation: number, row: number, coefficient: Value): void => {
    const [one, other] = vertexEnds(row);
    if (one === other) return;
    matrix.add(equation, columnOf(one), coefficient);
    matrix.add(equation, columnOf(other), negative(coefficient));
  };
  for (const [row, unknown] of unknownOf) {
    const [one, other] = vertexEnds(row);
    if (one !== other) {
      if (one >= knownCount) matrix.add(columnOf(one), unknown, builder.one);
      if (other >= knownCount) matrix.add(columnOf(other), unknown, negative(builder.one));
    }
    const law = laws[row];
    if (law?.law !== 'equation') {
      difference(unknown, row, builder.one);
      continue;
    }
    const made = law.terms.map((term, place) => coreTerm(network, inputs, row, term, place));
    terms.set(row, made);
    for (const { coefficient, of, row: port } of made) {
      if (of === 'voltage') difference(unknown, port, coefficient);
      else if (unknownOf.has(port)) matrix.add(unknown, unknownOf.get(port) ?? 0, coefficient);
      else if (isAdmittance(laws[port])) difference(unknown, port, builder.mul(coefficient, admittances.of(port)));
    }
  }

  const knownEntries = matrix.rows.flatMap((line, row) =>
    [...line].flatMap(([column, value]) => (column >= size ? [[row, column - size, value] as const] : [])),
  );
  const core = eliminated(matrix, inputs, laws, wishes.samples);
  if (core === undefined) return undefined;
  return { network, inputs, admittances, tree, mesh, vertexOf, knownCount, coreCount, unknownOf, terms, core, matrix, knownEntries };
}

function eliminated(
  matrix: CoreMatrix,
  inputs: NetworkInputs,
  laws: readonly Law[],
  samples: readonly number[],
): CoreTape | undefined {
  const { rows, nodes, size } = matrix;
  const places: { row: number; column: number; value: Value }[] = [];
  for (const [row, line] of rows.entries()) {
    for (const [column, value] of line) if (column < size) places.push({ row, column, value });
    const own = row < nodes ? matrix.own(row) : ZERO;
    if (!isZero(own)) places.push({ row, column: row, value: own });
  }
  const numbers = sampledValues(
    inputs,
    laws,
    places.map(({ value }) => value),
    samples,
  );
  if ((numbers[0]?.re.length ?? 0) === 0 && size > 0) return undefined;
  const order = choosePivots(
    size,
    places.map(({ row, column }, place) => ({ row, column, ...(numbers[place] ?? { re: new Float64Array(0), im: new Float64Array(0) }) })),
  );
  return order === undefined ? undefined : new CoreTape(inputs.builder, matrix, order);
}

function coreTerm(network: Network, inputs: NetworkInputs, row: number, term: Term, place: number): CoreTerm {
  const { coefficient } = term;
  const target = { of: term.of, row: rowOfTerm(network, row, term) };
  const { builder } = inputs;
  const termOf = (law: Law): Coefficient | undefined => (law.law === 'equation' ? law.terms[place]?.coefficient : undefined);
  if ('at' in coefficient) {
    const tableOf = (law: Law): Tabulated | undefined => {
      const of = termOf(law);
      return of !== undefined && 'at' in of ? of.at : undefined;
    };
    // Between its points a table is a straight line; the slope of another function is not to be had from its values.
    const isTable = elementAt(network, row)?.kind === 'twoPort';
    const slope = isTable
      ? inputs.functionOf(row, (law) => logarithmicSlopeOf(tableOf(law)))
      : { re: builder.constantPart(NaN), im: NOTHING };
    return { coefficient: inputs.functionOf(row, tableOf), slope, ...target };
  }
  const number = (name: 'constant' | 'slope') => (law: Law): number => {
    const of = termOf(law);
    return of !== undefined && !('at' in of) ? of[name] : NaN;
  };
  const re = partOf(builder, inputs, row, `${place} c`, coefficient.constant, number('constant'));
  const slope = partOf(builder, inputs, row, `${place} s`, coefficient.slope, number('slope'));
  const im = builder.mulParts(inputs.omega, slope);
  return { coefficient: { re, im }, slope: { re: NOTHING, im }, ...target };
}

/** A number of a law; 0 and 1 are so at every value, for a tape of this shape. */
function partOf(
  builder: TapeBuilder,
  inputs: NetworkInputs,
  row: number,
  name: string,
  value: number,
  read: (law: Law) => number,
): number {
  if (value === 0) return NOTHING;
  return Math.abs(value) === 1 ? builder.constantPart(value) : inputs.scalar(row, name, read);
}
