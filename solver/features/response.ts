import type { ResonanceHint } from '../analysis/adaptive-frequencies';

/**
 * A response as the features see it: a complex number as a function of the frequency. Where it comes from (a sweep, a
 * transfer function, a measurement that is interpolated) is nobody's business here; it has to be smooth between its
 * poles and zeros, and the same each time.
 */
export interface ResponseFunction {
  /** The value at a frequency in hertz; undefined where there is none, as at a resonance without losses. */
  readonly evaluate: (frequency: number) => { readonly re: number; readonly im: number } | undefined;
  /** The values at many frequencies at once, where that is cheaper; `determined` is 0 where there is none. */
  readonly evaluateAll?: (frequencies: Float64Array) => {
    readonly re: Float64Array;
    readonly im: Float64Array;
    readonly determined: Uint8Array;
  };
  /** Where it may change over less than a grid steps over, where that is known. */
  readonly hints?: readonly ResonanceHint[];
}

/** From where to where, hertz, 0 < low < high. */
export interface Band {
  readonly low: number;
  readonly high: number;
}

/** 20 lg of a magnitude; undefined for 0, which has none. */
export function decibels(magnitude: number): number | undefined {
  return magnitude > 0 ? 20 * Math.log10(magnitude) : undefined;
}

/** The magnitude of a number of decibels. */
export function magnitudeOf(level: number): number {
  return 10 ** (level / 20);
}

/** −10 lg 2, where the power is a half: what "−3 dB" means. */
export const HALF_POWER_DECIBELS = -10 * Math.log10(2);
