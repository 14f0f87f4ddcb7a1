import { formatQuantity, parseQuantity, type Unit } from '@/solver';
import type { PartValues } from './definition';

/** A number in SI units, or the sentence that says what is wrong with what was typed. */
export type ReadNumber = { readonly ok: true; readonly value: number } | { readonly ok: false; readonly message: string };

export const TWO_PI = 2 * Math.PI;

const known = new WeakMap<PartValues, Map<string, ReadNumber>>();

/** Reads a field that holds a quantity. Values never change, so each is read once, however often the network is built. */
export function readQuantity(values: PartValues, key: string, unit: Unit): ReadNumber {
  const ofPart = known.get(values) ?? new Map<string, ReadNumber>();
  const before = ofPart.get(key);
  if (before) return before;
  const read = parseQuantity(values[key] ?? '', unit);
  ofPart.set(key, read);
  known.set(values, ofPart);
  return read;
}

/**
 * Reads a frequency typed in hertz or, with its unit, in radians a second. Answers hertz.
 * A number without a unit is in hertz.
 */
export function readFrequency(text: string): ReadNumber {
  if (/rad|s⁻¹|\/\s*s/i.test(text)) {
    const angular = parseQuantity(text, 'rad/s');
    if (!angular.ok) return angular;
    return nonNegative({ ok: true, value: angular.value / TWO_PI });
  }
  return nonNegative(parseQuantity(text, 'Hz'));
}

function nonNegative(read: ReadNumber): ReadNumber {
  if (read.ok && read.value < 0) return { ok: false, message: 'A frequency is zero or more; for direct current type 0 Hz.' };
  return read;
}

/** Reads an angle in degrees or, with `rad` behind it, in radians. Answers degrees. */
export function readAngle(text: string): ReadNumber {
  const radians = /^(.*?)\s*rad$/i.exec(text.trim());
  if (!radians) return parseQuantity(text, '°');
  const read = parseQuantity(radians[1] ?? '', '');
  return read.ok ? { ok: true, value: (read.value * 360) / TWO_PI } : read;
}

/** A quantity as set on the drawing, or the text as it was typed where it cannot be read. */
export function setQuantity(values: PartValues, key: string, unit: Unit, digits = 4): string {
  const read = readQuantity(values, key, unit);
  return read.ok ? formatQuantity(read.value, unit, significantDigits(values[key] ?? '', digits)) : (values[key] ?? '');
}

/** As many digits as were typed, at least three: 82n is set as 82.0 nF, 4.7k as 4.70 kΩ, 1.2231µ in full. */
function significantDigits(text: string, most: number): number {
  const mantissa = text.replace(/[eE][-+−]?\d+.*/, '').replace(/\D/g, '').replace(/^0+/, '');
  return Math.min(Math.max(3, mantissa.length), Math.max(3, most));
}
