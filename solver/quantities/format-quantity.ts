import { prefixOfExponent } from './prefix';
import type { Unit } from './unit';
import { takesPrefixes } from './unit';

const THIN_SPACE = '\u2009';
const TRUE_MINUS = '\u2212';
/** What is shown where there is no number to show. */
const NOTHING = '\u2014';

/** A decimal figure taken apart: sign, significant digits "d…", and the power of ten of the first digit. */
interface Figure {
  readonly negative: boolean;
  readonly digits: string;
  readonly exponent: number;
}

/**
 * Rounds to a number of significant digits (or, without one, to the shortest that reads back the same), in decimal
 * text, so that a carry (999.96 → 1.00·10³) is seen before the prefix is chosen.
 */
function toFigure(value: number, digits: number | undefined): Figure {
  const text = digits === undefined ? value.toExponential() : value.toExponential(digits - 1);
  const [mantissa = '0', exponent = '0'] = text.split('e');
  return { negative: mantissa.startsWith('-'), digits: mantissa.replace(/[-.]/g, ''), exponent: Number(exponent) };
}

/** The figure's digits with the decimal point set for a multiplier of 10^shift. */
function placePoint(figure: Figure, shift: number): string {
  const whole = figure.exponent - shift + 1;
  const { digits } = figure;
  if (whole <= 0) return `0.${'0'.repeat(-whole)}${digits}`;
  if (whole >= digits.length) return digits + '0'.repeat(whole - digits.length);
  return `${digits.slice(0, whole)}.${digits.slice(whole)}`;
}

/** A plain number takes a prefix when typed (10k) but is shown without: "12.3 k" of nothing reads badly. */
function showsPrefix(unit: Unit): boolean {
  return unit !== '' && takesPrefixes(unit);
}

function withSign(negative: boolean, text: string): string {
  return negative ? TRUE_MINUS + text : text;
}

/** The power of ten whose prefix suits a figure: figures run from 1 to 999, but volts and amperes from 0.1. */
function engineeringExponent(exponent: number, unit: Unit): number {
  if (exponent === -1 && (unit === 'V' || unit === 'A')) return 0;
  return Math.floor(exponent / 3) * 3;
}

function setFigure(figure: Figure, unit: Unit): string {
  const { exponent } = figure;
  if (showsPrefix(unit)) {
    const engineering = engineeringExponent(exponent, unit);
    const prefix = prefixOfExponent(engineering);
    if (prefix !== undefined) {
      return `${withSign(figure.negative, placePoint(figure, engineering))}${THIN_SPACE}${prefix}${unit}`;
    }
  } else if (exponent >= -4 && exponent < 6) {
    return withSign(figure.negative, placePoint(figure, 0)) + unitTail(unit);
  }
  const tenPower = exponent < 0 ? TRUE_MINUS + String(-exponent) : String(exponent);
  return `${withSign(figure.negative, placePoint(figure, exponent))}e${tenPower}${unitTail(unit)}`;
}

/** A degree sign stands at its figure; every other unit stands off by a thin space. */
function unitTail(unit: Unit): string {
  return unit === '' || unit === '°' ? unit : THIN_SPACE + unit;
}

function clampDigits(digits: number): number {
  return Math.min(17, Math.max(1, Math.trunc(digits) || 1));
}

/**
 * A value as the trade sets it: figure, thin space (U+2009), SI prefix (atto to exa) and unit, with a true minus
 * (U+2212): `4.70 kΩ`. Rounded to `digits` significant digits (1 to 17) before the prefix is chosen, so 999.96 Ω at
 * three digits is `1.00 kΩ`. Volts and amperes keep the plain unit down to 0.1 (`0.732 A`). Degrees, decibels and
 * plain numbers take no prefix. Outside the prefixes' range the figure has a power of ten (`1.00e−25 F`). Zero is `0`
 * and the unit, without digits that would claim an accuracy; what is not finite is a dash.
 */
export function formatQuantity(value: number, unit: Unit, digits: number): string {
  if (!Number.isFinite(value)) return NOTHING;
  if (value === 0) return `0${unitTail(unit)}`;
  return setFigure(toFigure(value, clampDigits(digits)), unit);
}

/** A value with all its digits, the shortest text that reads back as the same number, set as by `formatQuantity`. */
export function formatExact(value: number, unit: Unit): string {
  if (!Number.isFinite(value)) return NOTHING;
  if (value === 0) return `0${unitTail(unit)}`;
  return setFigure(toFigure(value, undefined), unit);
}

/**
 * An angle in degrees, brought to (−180°, 180°], with a fixed number of decimals: `−82.9°`. Half a turn is always
 * `180°`, never `−180°`, also after rounding; zero never has a sign. An angle that was typed and may exceed half a
 * turn is shown by `formatQuantity`, which does not bring it round.
 */
export function formatAngle(degrees: number, decimals: number): string {
  if (!Number.isFinite(degrees)) return NOTHING;
  const places = Math.min(12, Math.max(0, Math.trunc(decimals) || 0));
  let turned = degrees % 360;
  if (turned > 180) turned -= 360;
  if (turned <= -180) turned += 360;
  const size = Math.abs(turned).toFixed(places);
  const negative = turned < 0 && Number(size) !== 0 && Number(size) !== 180;
  return `${withSign(negative, size)}°`;
}

/** How many decimals an angle gets beside a magnitude of so many digits: at 3 digits, 0.1° is 0.2 % of the value. */
function angleDecimals(digits: number): number {
  return Math.max(0, clampDigits(digits) - 2);
}

/**
 * A phasor as magnitude and angle: `0.732 A ∠ −82.9°`, `637 µA ∠ −3.0°`. The magnitude has `digits` significant
 * digits, the angle two decimals fewer. A phasor of zero has no angle and is shown as `0 A`.
 */
export function formatPolar(re: number, im: number, unit: Unit, digits: number): string {
  const magnitude = Math.hypot(re, im);
  if (!Number.isFinite(magnitude)) return NOTHING;
  if (magnitude === 0) return formatQuantity(0, unit, digits);
  const angle = formatAngle((Math.atan2(im, re) * 180) / Math.PI, angleDecimals(digits));
  return `${formatQuantity(magnitude, unit, digits)} ∠ ${angle}`;
}

/**
 * A phasor as real and imaginary part under one prefix: `91 − j726 mA`. The larger part has `digits` significant
 * digits, and the other the same number of decimals, so neither claims more than the phasor holds.
 */
export function formatRectangular(re: number, im: number, unit: Unit, digits: number): string {
  if (!Number.isFinite(re) || !Number.isFinite(im)) return NOTHING;
  const larger = toFigure(Math.max(Math.abs(re), Math.abs(im)), clampDigits(digits));
  if (re === 0 && im === 0) return formatQuantity(0, unit, digits);
  const engineering = showsPrefix(unit) ? engineeringExponent(larger.exponent, unit) : 0;
  const prefix = showsPrefix(unit) ? prefixOfExponent(engineering) : '';
  const shift = prefix === undefined ? larger.exponent : engineering;
  const decimals = Math.min(20, Math.max(0, larger.digits.length - 1 - (larger.exponent - shift)));
  const real = fixedPart(re, shift, decimals);
  const imaginary = fixedPart(im, shift, decimals);
  const power = prefix === undefined ? `e${withSign(shift < 0, String(Math.abs(shift)))}` : '';
  const parts = `${withSign(real.negative, real.text)} ${imaginary.negative ? TRUE_MINUS : '+'} j${imaginary.text}`;
  if (power !== '') return `(${parts})${power}${unitTail(unit)}`;
  return prefix === undefined || prefix === '' ? parts + unitTail(unit) : `${parts}${THIN_SPACE}${prefix}${unit}`;
}

/** A part rounded to so many decimals under 10^shift, in decimal text: dividing by the power would round twice. */
function fixedPart(value: number, shift: number, decimals: number): { negative: boolean; text: string } {
  if (value === 0) return { negative: false, text: '0' };
  const leading = toFigure(value, undefined).exponent - shift;
  const digits = leading + decimals + 1;
  if (digits < 0) return { negative: false, text: '0' };
  if (digits === 0) {
    const one = Math.abs(value) >= Number(`5e${shift - decimals - 1}`);
    const text = one ? (decimals === 0 ? '1' : `0.${'0'.repeat(decimals - 1)}1`) : '0';
    return { negative: one && value < 0, text };
  }
  const figure = toFigure(value, Math.min(17, digits));
  return { negative: figure.negative, text: placePoint(figure, shift) };
}

/** All the digits of a number in plain characters, for copying: the shortest text that reads back as the same number. */
export function formatFull(value: number): string {
  if (!Number.isFinite(value)) return '';
  return value === 0 ? '0' : String(value);
}
