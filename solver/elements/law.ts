import type { SourceValue } from './element-list';

/**
 * What an element is, said once and read by all: the branch table evaluates it at a frequency, a sweep compiles it, the
 * pencil of poles and zeros takes its powers of s. An element has one law for each of its ports, a port being a pair of
 * nodes; the voltage of a port is that of its first node over its second, its current enters at the first and leaves at
 * the second.
 */
export type Law =
  /** v = R·i; R ≠ 0, a zero one is a `short`. */
  | { readonly law: 'resistance'; readonly resistance: number }
  /** i = s·C·v; C ≠ 0, a zero one is `open`. Open at 0 Hz. */
  | { readonly law: 'capacitance'; readonly capacitance: number }
  /** v = s·L·i; L ≠ 0, a zero one is a `short`. A short at 0 Hz. */
  | { readonly law: 'inductance'; readonly inductance: number }
  /** v = Z(f)·i, with Z known from a table; see `tabulated`. */
  | { readonly law: 'impedance'; readonly at: Tabulated }
  | { readonly law: 'voltage'; readonly value: SourceValue }
  | { readonly law: 'current'; readonly value: SourceValue }
  /** v = 0. */
  | { readonly law: 'short' }
  /** i = 0. Its voltage may stand in an equation of the element: then it is a sensing port. */
  | { readonly law: 'open' }
  /**
   * Σ terms = 0. The equation belongs to the port by name only: a port whose own voltage and current do not stand in
   * it (the output of an ideal amplifier) takes what the others leave it.
   */
  | { readonly law: 'equation'; readonly terms: readonly Term[] };

/** One term of an equation: a coefficient times the voltage or the current of a port. */
export interface Term {
  /** The port, counted from 0, of this element; or the first port of another element, by its id. */
  readonly port: number | { readonly element: string };
  readonly of: 'voltage' | 'current';
  readonly coefficient: Coefficient;
}

/** A coefficient as a function of s = jω: constant + slope·s; or a function of the frequency that is not a polynomial. */
export type Coefficient =
  | { readonly constant: number; readonly slope: number }
  | { readonly at: Tabulated };

/** Real and imaginary part at a frequency in hertz, 0 included; undefined where a table does not reach it. */
export type Tabulated = (frequency: number) => readonly [re: number, im: number] | undefined;

export function constant(value: number): Coefficient {
  return { constant: value, slope: 0 };
}

/** value·s. */
export function timesS(value: number): Coefficient {
  return { constant: 0, slope: value };
}
