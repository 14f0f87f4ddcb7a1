import type { Element } from '@/solver';

/**
 * Where a figure comes from: `found`, read in the public text named; `memory`, recalled, and confirmed by calculation;
 * `computed`, calculated independently of the project; `corrected`, printed wrongly in the text named, and this is the
 * calculated one; `target`, what a design in the text named aims at.
 */
export type Mark = 'found' | 'memory' | 'computed' | 'corrected' | 'target';

/** What is measured on a network. Without `over`, a voltage is over the reference node. */
export type Output =
  | { readonly of: 'voltage'; readonly node: string; readonly over?: string }
  | { readonly of: 'sum'; readonly nodes: readonly [string, string] }
  /** The voltage of a node over that of another, both over the reference node. */
  | { readonly of: 'ratio'; readonly node: string; readonly to: string }
  | { readonly of: 'current'; readonly element: string }
  | { readonly of: 'elementVoltage'; readonly element: string }
  /** Of all the elements together. */
  | { readonly of: 'power'; readonly elements: readonly string[] }
  /** The active power of an element over that which a source delivers. */
  | { readonly of: 'powerShare'; readonly element: string; readonly source: string }
  /** The impedance between two nodes with every source of the network dead. */
  | { readonly of: 'impedance'; readonly node: string; readonly over?: string }
  /** The impedance that a live source of the network sees. */
  | { readonly of: 'impedanceSeen'; readonly element: string }
  /** The reflection coefficient of what a voltage source drives through `reference` ohms, an element of the network. */
  | { readonly of: 'reflection'; readonly source: string; readonly reference: number }
  /** The voltage of a load at `to` without the network in between over that with it; source and load in ohms. */
  | { readonly of: 'insertion'; readonly from: string; readonly to: string; readonly source: number; readonly load: number };

/** How a complex value is read: decibels are 20 lg, those of a power 10 lg. */
export type Reading = 'magnitude' | 'degrees' | 're' | 'im' | 'decibels' | 'powerDecibels';

/** What a reading in decibels is against: a size, or the same output at another frequency. */
export type Against = number | { readonly frequency: number };

interface Common {
  readonly output: Output;
  /** Where it is not that of the circuit. */
  readonly mark?: Mark;
}

/**
 * A number as it is printed: the value holds to half a unit of its last digit, or to `within`, the tolerance recorded
 * beside it.
 */
export interface Printed {
  readonly printed: string;
  readonly within?: number;
}

interface Read extends Common {
  readonly read: Reading;
  readonly against?: Against;
}

/** A reading at one frequency. */
export type ReadingFigure = Read & Printed & { readonly kind: 'reading'; readonly frequency: number };

/** A phasor as a book prints it, and as it was calculated to six digits of its magnitude. */
export interface PhasorFigure extends Common {
  readonly kind: 'phasor';
  readonly frequency: number;
  readonly printed:
    | {
        readonly magnitude: number;
        readonly within: number;
        readonly degrees?: number;
        readonly withinDegrees?: number;
      }
    | { readonly re: number; readonly im: number; readonly within: number };
  readonly computed: { readonly re: number; readonly im: number };
}

/** A closed form of the value, held to `units` of ε. */
export interface ExactFigure extends Common {
  readonly kind: 'exact';
  readonly frequency: number;
  readonly value: { readonly re: number; readonly im: number };
  readonly units: number;
}

/** The frequency between two others at which a reading passes a level. */
export type CrossingFigure = Read &
  Printed & { readonly kind: 'crossing'; readonly level: number; readonly between: readonly [number, number] };

/** How far apart the frequencies are at which a reading passes a level below and above a middle. */
export type WidthFigure = Read &
  Printed & {
    readonly kind: 'width';
    readonly level: number;
    readonly between: readonly [low: number, middle: number, high: number];
  };

/** The largest or smallest reading of a band: where, and how much. */
export type ExtremeFigure = Read & {
  readonly kind: 'largest' | 'smallest';
  readonly between: readonly [number, number];
  readonly at?: Printed;
  readonly value?: Printed;
};

export interface PrintedRoot {
  readonly re: Printed;
  readonly im: Printed;
}

/** Poles or zeros, rad/s, of the transfer from a source; of a conjugate pair both. */
export interface RootsFigure extends Common {
  readonly kind: 'poles' | 'zeros';
  readonly source: string;
  readonly roots: readonly PrintedRoot[];
}

/** Natural frequency (hertz) and quality of the only pair of conjugate poles. */
export interface ResonanceFigure extends Common {
  readonly kind: 'resonance';
  readonly source: string;
  readonly frequency?: Printed;
  readonly quality: Printed;
}

/** −dφ/dω of the output, seconds. */
export type DelayFigure = Common & Printed & { readonly kind: 'groupDelay'; readonly frequency: number };

/** The thermal noise at an output, V/√Hz, of one element or of all; kelvins. */
export type NoiseFigure = Common &
  Printed & {
    readonly kind: 'noise';
    readonly frequency: number;
    readonly temperature: number;
    readonly from?: string;
  };

/** The thermal noise of all frequencies together, V. */
export type TotalNoiseFigure = Common & Printed & { readonly kind: 'totalNoise'; readonly temperature: number };

/** The width, hertz, of a band of the largest power gain that lets as much white noise through. */
export type NoiseBandwidthFigure = Common & Printed & { readonly kind: 'noiseBandwidth' };

/** The relative sensitivity (p/H)·∂H/∂p to an element's value. */
export interface SensitivityFigure extends Common {
  readonly kind: 'sensitivity';
  readonly frequency: number;
  readonly element: string;
  readonly re: Printed;
  readonly im: Printed;
}

/** One scattering parameter between two nodes, each over the reference node. */
export interface ScatteringFigure {
  readonly kind: 'scattering';
  readonly mark?: Mark;
  readonly ports: readonly [string, string];
  readonly reference: number;
  readonly frequency: number;
  readonly parameter: 's11' | 's12' | 's21' | 's22';
  readonly re: Printed;
  readonly im: Printed;
}

/** The time, seconds, that the voltage of a node left to itself takes to fall from so many volts to so many. */
export type DecayFigure = Printed & {
  readonly kind: 'decay';
  readonly mark?: Mark;
  readonly node: string;
  readonly from: number;
  readonly to: number;
};

/**
 * The most active power that a load between a node and the reference takes, W: any load, or a resistance. `load` is
 * that load's impedance, ohms.
 */
export type GreatestPowerFigure = Printed & {
  readonly kind: 'greatestPower';
  readonly mark?: Mark;
  readonly node: string;
  readonly frequency: number;
  readonly loads: 'all' | 'resistances';
  readonly load: { readonly re: Printed; readonly im: Printed };
};

/** The value of an element, where the data computes it by a formula. */
export type ValueFigure = Printed & { readonly kind: 'value'; readonly mark?: Mark; readonly element: string };

export type Figure =
  | ReadingFigure
  | PhasorFigure
  | ExactFigure
  | CrossingFigure
  | WidthFigure
  | ExtremeFigure
  | RootsFigure
  | ResonanceFigure
  | DelayFigure
  | NoiseFigure
  | TotalNoiseFigure
  | NoiseBandwidthFigure
  | SensitivityFigure
  | ScatteringFigure
  | DecayFigure
  | GreatestPowerFigure
  | ValueFigure;

export type FigureKind = Figure['kind'];

/** A network of a published source or of the library of starters, with what is known of it. */
export interface Circuit {
  readonly id: string;
  readonly title: string;
  readonly source: string;
  readonly mark: Mark;
  readonly elements: readonly Element[];
  readonly figures: readonly Figure[];
}
