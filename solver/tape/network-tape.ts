import type { Admittances } from './admittances';
import type { Value } from './tape-builder';

/** A pair of nodes, and the current, in amperes, that comes into the first from outside and leaves by the second. */
export interface Probe {
  readonly into: number;
  readonly outOf: number;
  readonly current: Value;
}

/** What drives the network: its own sources, or, those dead, currents from outside. */
export type Drive = 'sources' | readonly Probe[];

/** One drive's readings on the tape: first all that will be read is asked for, then `solve`, then it is read. */
export interface DriveReadings {
  wantVoltage(one: number, other: number): void;
  wantCurrent(row: number): void;
  solve(): void;
  /** The voltage of one node over another. */
  voltage(one: number, other: number): Value;
  /** The current through a row from its first node to its second. */
  current(row: number): Value;
  /**
   * What the current of a row is made of, given currents left out: the currents of admittances, or of rows whose current
   * is an unknown of its own, each with its sign.
   */
  partsOfCurrent(row: number): readonly SignedRow[];
}

export interface SignedRow {
  readonly row: number;
  readonly sign: 1 | -1;
}

/** How an output depends on voltages, as currents sent in, and on currents that are unknowns of their own, by row. */
export interface OutputWeights {
  readonly probes: readonly Probe[];
  readonly currents: ReadonlyMap<number, Value>;
}

/** The adjoint of an output: by it, one solution tells how the output depends on everything. */
export interface AdjointReadings {
  wantVoltage(one: number, other: number): void;
  solve(): void;
  /** By −d·d̂ the output depends on an admittance that has the voltage d, d̂ being this. */
  voltage(one: number, other: number): Value;
  /** How the output depends on the admittance of a row besides that, by way of equations that its current stands in. */
  elsewhere(row: number, readings: DriveReadings): Value;
  /** s·∂H/∂s as far as s stands in the coefficients of equations. */
  slope(readings: DriveReadings): Value;
}

/** A network's equations, eliminated on a tape. */
export interface NetworkTape {
  readonly admittances: Admittances;
  drive(drive: Drive): DriveReadings;
  adjoint(weights: OutputWeights): AdjointReadings;
}

/** What a network is compiled for. */
export interface TapeWishes {
  /** Nodes between which outputs are asked for: they stay longest. */
  readonly last: readonly number[];
  /** Pairs of nodes at which drives from outside will be put. */
  readonly probed: readonly (readonly [number, number])[];
  /** Frequencies, hertz, at which no pivot may be weak; none for the usual order. */
  readonly samples: readonly number[];
}
