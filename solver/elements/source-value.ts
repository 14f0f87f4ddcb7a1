import type { Excitation, UnknownFields } from './element-definition';
import type { SourceValue } from './element-list';

/** Two frequencies are the same when they differ by no more than rounding on the way (rad/s to Hz and back). */
const SAME_FREQUENCY = 1e-12;

/** What is wrong with a source's `value`, as the end of a sentence, or undefined. */
export function faultOfSourceValue(fields: UnknownFields): string | undefined {
  const { value } = fields;
  if (typeof value !== 'object' || value === null) return 'needs a value with rms, phase and frequency';
  const { rms, phase, frequency } = value as UnknownFields;
  if (typeof rms !== 'number' || !Number.isFinite(rms)) return 'needs a finite number as the rms of its value';
  if (typeof phase !== 'number' || !Number.isFinite(phase)) {
    return 'needs a finite number of degrees as the phase of its value';
  }
  if (frequency === null) return undefined;
  if (typeof frequency !== 'number' || !Number.isFinite(frequency) || frequency < 0) {
    return 'needs a frequency of 0 Hz or more in its value, or null for the operating frequency';
  }
  return undefined;
}

/** Whether the source delivers anything at the frequency; one with another frequency of its own is dead there. */
export function isLive(value: SourceValue, { frequency }: Excitation): boolean {
  if (value.frequency === null) return true;
  return sameFrequency(value.frequency, frequency);
}

/** Whether two frequencies, in hertz, are the same but for rounding: a source with the one delivers at the other. */
export function sameFrequency(a: number, b: number): boolean {
  return Math.abs(a - b) <= SAME_FREQUENCY * b;
}

/**
 * The phasor rms·e^(jφ) by its real part. The cosine of a whole number of quarter turns is exact, so a source at 90°
 * has no real part of 6e-17.
 */
export function phasorRe(value: SourceValue): number {
  return value.rms * cosOfDegrees(value.phase);
}

/** The phasor by its imaginary part; see `phasorRe`. A direct value has none. */
export function phasorIm(value: SourceValue): number {
  return value.frequency === 0 ? 0 : value.rms * cosOfDegrees(value.phase - 90);
}

function cosOfDegrees(degrees: number): number {
  const turned = Math.abs(degrees % 360);
  if (turned === 0) return 1;
  if (turned === 90 || turned === 270) return 0;
  if (turned === 180) return -1;
  return Math.cos((turned * Math.PI) / 180);
}
