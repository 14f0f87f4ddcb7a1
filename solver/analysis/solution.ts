import type { Complex } from 'complex.js';
import type { Problem } from './problem';

/** The balance of complex power. */
export interface PowerBalance {
  /** The sum of V·I* over all solved elements, VA; zero but for rounding, by Tellegen's theorem. */
  readonly sum: Complex;
  /** The sum of |V·I*| over the same elements, VA: what `sum` is to be compared with. */
  readonly scale: number;
}

/**
 * The sinusoidal steady state at one frequency. Every phasor is rms, on the cosine, time dependence e^(+jωt). The
 * current of an element is positive when it enters at its first node, for a source too; so a positive active power
 * is absorbed. An element with further pairs of nodes has further ports: `port` counts them from 0; an amplifier's are
 * its inputs and its output against the reference node. A method answers `undefined` where the quantity is not determined, or the name is not in the list.
 */
export interface Solution {
  readonly ok: true;
  /** Hertz. */
  readonly frequency: number;
  /** The voltage of a node over the reference node, V. */
  voltage(node: string): Complex | undefined;
  /** The voltage of an element's first node over its second, V; determined also where no reference node is. */
  elementVoltage(id: string, port?: number): Complex | undefined;
  /** The current through an element from its first node to its second, A. */
  current(id: string, port?: number): Complex | undefined;
  /** The complex power V·I* that an element absorbs, over all its ports, VA: P is the real part, Q the imaginary part. */
  power(id: string): Complex | undefined;
  /** An estimate of how far off a node's voltage may be, V: from the condition, or the running error of the arithmetic. */
  voltageError(node: string): number | undefined;
  /** The same for an element's current, A. */
  currentError(id: string, port?: number): number | undefined;
  /**
   * The largest relative error in the equations as solved: at each node |Σi| / Σ|i|, and for each element the
   * difference between its voltage and that of its nodes over the larger node voltage. A small residual is needed
   * for a good solution; it does not prove one.
   */
  readonly residual: number;
  /**
   * An estimate of the network's condition at this frequency: the largest voltage, in volts, across any element when
   * every element has an electromotive force of one volt in series. Near 1 for resistances, the quality factor at a
   * resonance; relative errors of a value may come out so many times larger. Undefined where the network is so near to
   * having no unique solution that it was solved in branch form.
   */
  readonly condition: number | undefined;
  readonly balance: PowerBalance;
  /** What could not be solved, or is not unique; empty when all is determined. */
  readonly problems: readonly Problem[];
}
