import type {
  Against,
  Circuit,
  CrossingFigure,
  ExtremeFigure,
  Output,
  PhasorFigure,
  Printed,
  PrintedRoot,
  Reading,
  ReadingFigure,
  WidthFigure,
} from './records';

/** Short names for building the figures of a circuit. A number as printed is a text, so that it keeps its digits. */

/** Half the power, dB. */
export const HALF_POWER = -10 * Math.log10(2);

export function volts(node: string, over?: string): Output {
  return over === undefined ? { of: 'voltage', node } : { of: 'voltage', node, over };
}

export function amperes(element: string): Output {
  return { of: 'current', element };
}

export function ohms(node: string, over?: string): Output {
  return over === undefined ? { of: 'impedance', node } : { of: 'impedance', node, over };
}

export function shown(text: string, within?: number): Printed {
  return within === undefined ? { printed: text } : { printed: text, within };
}

export function root(re: string, im = '0.0'): PrintedRoot {
  return { re: shown(re), im: shown(im) };
}

function outputOf(of: string | Output): Output {
  return typeof of === 'string' ? volts(of) : of;
}

/** A reading at a frequency; a text is a node. */
export function reading(
  read: Reading,
  of: string | Output,
  frequency: number,
  text: string,
  against?: Against,
): ReadingFigure {
  return {
    kind: 'reading',
    read,
    output: outputOf(of),
    frequency,
    printed: text,
    ...(against === undefined ? {} : { against }),
  };
}

/** Decibels, against 1 if nothing else is said. */
export function level(of: string | Output, frequency: number, text: string, against: Against = 1): ReadingFigure {
  return reading('decibels', of, frequency, text, against);
}

export function phase(of: string | Output, frequency: number, text: string): ReadingFigure {
  return reading('degrees', of, frequency, text);
}

export function size(of: string | Output, frequency: number, text: string): ReadingFigure {
  return reading('magnitude', of, frequency, text);
}

/** Where a reading passes a level. */
export function crossing(
  read: Reading,
  of: string | Output,
  passes: number,
  between: readonly [number, number],
  text: string,
  against?: Against,
): CrossingFigure {
  return {
    kind: 'crossing',
    read,
    output: outputOf(of),
    level: passes,
    between,
    printed: text,
    ...(against === undefined ? {} : { against }),
  };
}

/** Where a level is half a power below what it is against. */
export function halfPower(
  of: string | Output,
  between: readonly [number, number],
  text: string,
  against: Against = 1,
): CrossingFigure {
  return crossing('decibels', of, HALF_POWER, between, text, against);
}

/** How wide the band of half power is. */
export function halfPowerWidth(
  of: string | Output,
  between: readonly [number, number, number],
  text: string,
  against: Against = 1,
): WidthFigure {
  return { kind: 'width', read: 'decibels', output: outputOf(of), level: HALF_POWER, between, printed: text, against };
}

/** The largest or smallest size in a band; where, and how much. */
export function extreme(
  kind: ExtremeFigure['kind'],
  of: string | Output,
  between: readonly [number, number],
  at: string | undefined,
  value?: string,
): ExtremeFigure {
  return {
    kind,
    read: 'magnitude',
    output: outputOf(of),
    between,
    ...(at === undefined ? {} : { at: shown(at) }),
    ...(value === undefined ? {} : { value: shown(value) }),
  };
}

export function across(element: string): Output {
  return { of: 'elementVoltage', element };
}

export function seenBy(element: string): Output {
  return { of: 'impedanceSeen', element };
}

export function watts(...elements: readonly string[]): Output {
  return { of: 'power', elements };
}

/** A phasor as printed: its size and its angle, each with the tolerance of its last digits. */
export function polar(magnitude: number, within: number, degrees?: number, withinDegrees?: number): PhasorFigure['printed'] {
  if (degrees === undefined || withinDegrees === undefined) return { magnitude, within };
  return { magnitude, within, degrees, withinDegrees };
}

/** A phasor as printed: its parts, with the tolerance of either. */
export function rectangular(re: number, im: number, within: number): PhasorFigure['printed'] {
  return { re, im, within };
}

/** A phasor of a worked example, whose frequency the example knows. */
export interface WorkedPhasor {
  readonly output: Output;
  readonly printed: PhasorFigure['printed'];
  readonly computed: PhasorFigure['computed'];
}

export function phasor(output: Output, printed: PhasorFigure['printed'], re: number, im: number): WorkedPhasor {
  return { output, printed, computed: { re, im } };
}

/** A worked example: phasors of a network at one frequency. */
export function worked({
  frequency,
  figures,
  ...circuit
}: Omit<Circuit, 'figures'> & { readonly frequency: number; readonly figures: readonly WorkedPhasor[] }): Circuit {
  return { ...circuit, figures: figures.map((figure) => ({ kind: 'phasor', frequency, ...figure })) };
}

/** The frequency of 1 rad/s, at which an inductor has as many ohms as henries. */
export const ONE_RADIAN = 1 / (2 * Math.PI);
