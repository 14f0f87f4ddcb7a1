/**
 * The element list, version 1: all that the solver is told about a network. Numbers are in SI units; a node is a
 * name, and the node named `0` is the reference node (0 V). Nothing here knows of drawings, designators or units as
 * typed.
 */

/** The name of the reference node. */
export const REFERENCE_NODE = '0';

/**
 * What a source delivers, as an rms phasor on the cosine: the time function is √2·rms·cos(2πft + phase). A direct
 * source, with a frequency of 0, delivers the direct value rms·cos(phase). A source of the operating frequency keeps
 * its phasor when that is 0 Hz: it is the limit of ever lower frequencies.
 */
export interface SourceValue {
  /** Volts or amperes, rms (the direct value of a direct source). A negative value is the same as 180° more. */
  readonly rms: number;
  /** Degrees, on the cosine. */
  readonly phase: number;
  /** Hertz; 0 for direct current; null for the operating frequency, whichever is being solved. */
  readonly frequency: number | null;
}

/** The two nodes of an element, in the order that gives its current and voltage their signs. */
export type NodePair = readonly [string, string];

/** `resistance` in ohms; 0 is an ideal connection, a negative value is a legal linear element. */
export interface Resistor {
  readonly id: string;
  readonly kind: 'resistor';
  readonly nodes: NodePair;
  readonly resistance: number;
}

/** `capacitance` in farads; 0 is an open circuit. */
export interface Capacitor {
  readonly id: string;
  readonly kind: 'capacitor';
  readonly nodes: NodePair;
  readonly capacitance: number;
}

/** `inductance` in henries; 0 is an ideal connection. */
export interface Inductor {
  readonly id: string;
  readonly kind: 'inductor';
  readonly nodes: NodePair;
  readonly inductance: number;
}

/** Nodes: plus, minus. The value is the voltage of plus over minus. */
export interface VoltageSource {
  readonly id: string;
  readonly kind: 'voltageSource';
  readonly nodes: NodePair;
  readonly value: SourceValue;
}

/** Nodes: from, to. The current flows through the source from the first node to the second. */
export interface CurrentSource {
  readonly id: string;
  readonly kind: 'currentSource';
  readonly nodes: NodePair;
  readonly value: SourceValue;
}

/** One row of a tabulated impedance. */
export interface ImpedancePoint {
  /** Hertz, rising from point to point. */
  readonly frequency: number;
  /** Ohms. */
  readonly resistance: number;
  readonly reactance: number;
}

/** An impedance known at points; between them linear in log frequency, outside them not known. */
export interface Impedance {
  readonly id: string;
  readonly kind: 'impedance';
  readonly nodes: NodePair;
  readonly points: readonly ImpedancePoint[];
}

/**
 * Coils on a common core, two nodes a coil, the dot at the first of each. `inductances` in henries, above zero, one a
 * coil. `coupling` between −1 and 1: for two coils one number; for n coils the n(n−1)/2 pairs in the order 1–2, 1–3 …
 * 1–n, 2–3 …, such that no currents could store less than no energy.
 */
export interface CoupledInductors {
  readonly id: string;
  readonly kind: 'coupledInductors';
  readonly nodes: readonly string[];
  readonly inductances: readonly number[];
  readonly coupling: number | readonly number[];
}

/** Two pairs of nodes, a–b and c–d. */
export type NodeQuad = readonly [string, string, string, string];

/** Dots at a and c. `ratio` is the turns of a–b over the turns of c–d, not zero: v_ab = ratio·v_cd. */
export interface IdealTransformer {
  readonly id: string;
  readonly kind: 'idealTransformer';
  readonly nodes: NodeQuad;
  readonly ratio: number;
}

/** Nodes: plus, minus, sense plus, sense minus. v = gain·v_sense. */
export interface VoltageControlledVoltageSource {
  readonly id: string;
  readonly kind: 'voltageControlledVoltageSource';
  readonly nodes: NodeQuad;
  readonly gain: number;
}

/** Nodes: from, to, sense plus, sense minus. The current through it from the first node to the second is transconductance·v_sense. */
export interface VoltageControlledCurrentSource {
  readonly id: string;
  readonly kind: 'voltageControlledCurrentSource';
  readonly nodes: NodeQuad;
  /** Siemens. */
  readonly transconductance: number;
}

/** Nodes: plus, minus. v = transresistance·i, with i the current of another element, entering at its first node. */
export interface CurrentControlledVoltageSource {
  readonly id: string;
  readonly kind: 'currentControlledVoltageSource';
  readonly nodes: NodePair;
  /** The id of an element with two nodes. */
  readonly sensedElement: string;
  /** Ohms. */
  readonly transresistance: number;
}

/** Nodes: from, to. The current through it from the first node to the second is gain·i, i as above. */
export interface CurrentControlledCurrentSource {
  readonly id: string;
  readonly kind: 'currentControlledCurrentSource';
  readonly nodes: NodePair;
  readonly sensedElement: string;
  readonly gain: number;
}

/**
 * Nodes: plus input, minus input, output; it drives the output against the reference node, and no current enters its
 * inputs. Without fields it is ideal: its output does what keeps the inputs at one voltage. Else
 * v_out = A(s)·(v_plus − v_minus) + outputResistance·i, i entering at the output, with
 * A(s) = openLoopGain / (1 + s·openLoopGain/(2π·gainBandwidth)); without a gain-bandwidth the gain is the same at all
 * frequencies, without an open-loop gain it is 2π·gainBandwidth/s.
 */
export interface OperationalAmplifier {
  readonly id: string;
  readonly kind: 'operationalAmplifier';
  readonly nodes: readonly [string, string, string];
  readonly openLoopGain?: number;
  /** Hertz. */
  readonly gainBandwidth?: number;
  /** Ohms. */
  readonly outputResistance?: number;
}

/** A complex number as it stands in an element list. */
export type ComplexPair = readonly [re: number, im: number];

/** One row of scattering parameters. */
export interface ScatteringPoint {
  /** Hertz, rising from point to point. */
  readonly frequency: number;
  readonly s11: ComplexPair;
  readonly s12: ComplexPair;
  readonly s21: ComplexPair;
  readonly s22: ComplexPair;
}

/** A block known by its scattering parameters; ports a–b and c–d, `reference` in ohms, real, the same at both. */
export interface TwoPort {
  readonly id: string;
  readonly kind: 'twoPort';
  readonly nodes: NodeQuad;
  readonly reference: number;
  readonly points: readonly ScatteringPoint[];
}

/**
 * A line with ports a–b and c–d, `impedance` in ohms (real, the same at all frequencies), `delay` in seconds, and with
 * `loss` in decibels at `lossFrequency` (hertz), growing as the square root of the frequency; no loss without them.
 */
export interface Line {
  readonly id: string;
  readonly kind: 'line';
  readonly nodes: NodeQuad;
  readonly impedance: number;
  readonly delay: number;
  readonly loss?: number;
  readonly lossFrequency?: number;
}

export type Element =
  | Resistor
  | Capacitor
  | Inductor
  | Impedance
  | CoupledInductors
  | IdealTransformer
  | VoltageSource
  | CurrentSource
  | VoltageControlledVoltageSource
  | VoltageControlledCurrentSource
  | CurrentControlledVoltageSource
  | CurrentControlledCurrentSource
  | OperationalAmplifier
  | TwoPort
  | Line;

export type ElementKind = Element['kind'];

export interface ElementList {
  readonly version: 1;
  readonly elements: readonly Element[];
}
