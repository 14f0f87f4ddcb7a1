import { magnitudeCrossings, phaseCrossings } from './crossings';
import { decibels } from './response';
import type { Scan } from './scan';

/** At a frequency where the loop's gain is one. */
export interface PhaseMargin {
  /** Hertz. */
  readonly frequency: number;
  /** How far the loop may still turn back before it reaches −1, degrees, above −180 to 180. */
  readonly degrees: number;
}

/** At a frequency where the loop turns its signal round. */
export interface GainMargin {
  /** Hertz. */
  readonly frequency: number;
  /** By how much the loop's gain may grow until it reaches −1, decibels; below 0, by how much it may shrink. */
  readonly decibels: number;
}

export interface LoopMargins {
  /** One for each unity-gain crossing, in rising frequency. */
  readonly phase: readonly PhaseMargin[];
  /** One for each crossing of −180°, in rising frequency. */
  readonly gain: readonly GainMargin[];
  /** The one nearest to 0° and that nearest to 0 dB; undefined where the loop crosses neither within the band. */
  readonly leastPhase: PhaseMargin | undefined;
  readonly leastGain: GainMargin | undefined;
}

/**
 * Phase and gain margins of a loop response L, with the sign for which the closed loop is 1/(1 + L): negative feedback
 * counted as positive L, the critical point at −1 (Bode 1945). Whether the loop is stable is for its poles to say;
 * margins tell how far from changing that it is.
 */
export function loopMargins(scan: Scan): LoopMargins {
  const phase = magnitudeCrossings(scan, 1).flatMap(({ frequency }) => {
    const value = scan.response.evaluate(frequency);
    if (value === undefined) return [];
    // arg L + 180°, as the argument of −L.
    return [{ frequency, degrees: (Math.atan2(-value.im, -value.re) * 180) / Math.PI }];
  });
  const gain = phaseCrossings(scan, 180).flatMap(({ frequency }) => {
    const value = scan.response.evaluate(frequency);
    const level = value === undefined ? undefined : decibels(Math.hypot(value.re, value.im));
    return level === undefined ? [] : [{ frequency, decibels: -level }];
  });
  return {
    phase,
    gain,
    leastPhase: nearest(phase, ({ degrees }) => Math.abs(degrees)),
    leastGain: nearest(gain, (margin) => Math.abs(margin.decibels)),
  };
}

function nearest<M>(margins: readonly M[], size: (margin: M) => number): M | undefined {
  return margins.length === 0 ? undefined : margins.reduce((best, one) => (size(one) < size(best) ? one : best));
}
