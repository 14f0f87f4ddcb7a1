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

export type Element = Resistor | Capacitor | Inductor | VoltageSource | CurrentSource;

export type ElementKind = Element['kind'];

export interface ElementList {
  readonly version: 1;
  readonly elements: readonly Element[];
}
