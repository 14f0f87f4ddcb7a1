import type { ElementList } from '../elements/element-list';
import type { Problem } from './problem';

/** What is recorded at each frequency: the voltage of a node, or the current or voltage of an element. */
export type SweepOutput =
  | { readonly quantity: 'voltage'; readonly node: string }
  | { readonly quantity: 'elementVoltage'; readonly element: string }
  | { readonly quantity: 'current'; readonly element: string };

export interface SweepOptions {
  /** The operating frequencies, hertz, in any order. */
  readonly frequencies: ArrayLike<number>;
  readonly outputs: readonly SweepOutput[];
}

/** One output over the frequencies, rms phasors. Where `determined` is 0, there is no value, and `re` and `im` hold 0. */
export interface SweepTrace {
  readonly output: SweepOutput;
  readonly re: Float64Array;
  readonly im: Float64Array;
  readonly determined: Uint8Array;
}

/** A problem, and the frequencies (by index) at which it stands. */
export interface SweepProblem {
  readonly problem: Problem;
  readonly at: readonly number[];
}

export interface Sweep {
  readonly ok: true;
  readonly frequencies: Float64Array;
  /** One for each output asked for, in that order. */
  readonly traces: readonly SweepTrace[];
  readonly problems: readonly SweepProblem[];
}

export declare function sweep(list: ElementList, options: SweepOptions): Sweep | Problem;
