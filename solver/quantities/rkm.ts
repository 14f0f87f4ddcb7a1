import { exponentOfPrefix } from './prefix';
import type { Unit } from './unit';
import { quantityName } from './unit';

/** A number as digits and a power of ten, still in text, so that reading it rounds once. */
export interface RkmFigure {
  /** Digits with at most one point. */
  readonly mantissa: string;
  readonly exponent: number;
  /** The letter that stood for the decimal sign and the multiplier. */
  readonly letter: string;
  /** What followed the figure. */
  readonly rest: string;
}

const RKM_SHAPE = /^(\d*)([A-Za-zµ])(\d+)(.*)$/;

/** Letters that are multipliers when they stand in the place of the decimal sign; E, P, a and f are not among them. */
const MULTIPLIER_LETTERS = 'pnuµmkKMGT';

/** The letters that mean "times one" for a unit: R for ohms, the unit's own letter for the others. */
function isUnityLetter(letter: string, unit: Unit): boolean {
  return unit === 'Ω' ? letter === 'R' : letter === unit;
}

/**
 * Reads a figure with a letter in the place of its decimal sign, as IEC 60062 writes it: 4k7, R47, 2u2, p33, 3V3.
 * `L` stands for milliohms. Answers undefined where the text does not have that shape or the letter means nothing
 * for the unit.
 */
export function readRkmFigure(text: string, unit: Unit): RkmFigure | undefined {
  const match = RKM_SHAPE.exec(text);
  if (match === null) return undefined;
  const [, whole = '', letter = '', fraction = '', rest = ''] = match;
  const mantissa = `${whole === '' ? '0' : whole}.${fraction}`;
  if (isUnityLetter(letter, unit)) return { mantissa, exponent: 0, letter, rest };
  if (letter === 'L' && unit === 'Ω') return { mantissa, exponent: -3, letter, rest };
  const exponent = MULTIPLIER_LETTERS.includes(letter) ? exponentOfPrefix(letter) : undefined;
  return exponent === undefined ? undefined : { mantissa, exponent, letter, rest };
}

/** How far the true value may lie from the marked one. */
export interface RkmTolerance {
  /** Below the value: per cent of it, or farads when `absolute`. */
  readonly minus: number;
  /** Above the value, likewise. */
  readonly plus: number;
  readonly absolute: boolean;
}

export type ParsedRkm =
  | { readonly ok: true; readonly value: number; readonly tolerance: RkmTolerance | null }
  | { readonly ok: false; readonly message: string };

/** Per cent, equal on both sides (IEC 60062; letters from memory). */
const SYMMETRIC_PERCENT: ReadonlyMap<string, number> = new Map([
  ['E', 0.005],
  ['L', 0.01],
  ['P', 0.02],
  ['W', 0.05],
  ['B', 0.1],
  ['C', 0.25],
  ['D', 0.5],
  ['F', 1],
  ['G', 2],
  ['H', 3],
  ['J', 5],
  ['K', 10],
  ['M', 20],
  ['N', 30],
]);

/** Per cent below and above (IEC 60062; letters from memory). */
const UNEQUAL_PERCENT: ReadonlyMap<string, readonly [number, number]> = new Map([
  ['Q', [10, 30]],
  ['T', [10, 50]],
  ['S', [20, 50]],
  ['Z', [20, 80]],
]);

/** Picofarads, for capacitors below 10 pF (IEC 60062; letters from memory). */
const SMALL_CAPACITOR_PICOFARADS: ReadonlyMap<string, number> = new Map([
  ['B', 0.1],
  ['C', 0.25],
  ['D', 0.5],
  ['F', 1],
  ['G', 2],
]);

function toleranceOf(letter: string, value: number, unit: Unit): RkmTolerance | undefined {
  const picofarads = unit === 'F' && value < 10e-12 ? SMALL_CAPACITOR_PICOFARADS.get(letter) : undefined;
  if (picofarads !== undefined) {
    const farads = Number(`${picofarads}e-12`);
    return { minus: farads, plus: farads, absolute: true };
  }
  const percent = SYMMETRIC_PERCENT.get(letter);
  if (percent !== undefined) return { minus: percent, plus: percent, absolute: false };
  const unequal = UNEQUAL_PERCENT.get(letter);
  return unequal === undefined ? undefined : { minus: unequal[0], plus: unequal[1], absolute: false };
}

/**
 * Reads a marking in the letter code of IEC 60062 with, perhaps, its tolerance letter: `4K7J` is 4.7 kΩ ± 5 %,
 * `R33K` is 0.33 Ω ± 10 %, `470R` is 470 Ω, `2n2F` (for farads) is 2.2 nF ± 1 %. Here a last letter after a complete
 * figure is a tolerance, so `F` is one per cent and not farads. Below 10 pF, B, C, D, F and G are picofarads.
 */
export function parseRkm(text: string, unit: Unit): ParsedRkm {
  const code = text.trim().replace(/\u03bc/g, 'µ');
  if (code.length === 0 || code.length > 16) {
    return { ok: false, message: 'A marking code has a few digits and a letter, such as 4K7 or 4K7J.' };
  }
  const shape = readRkmFigure(code, unit) ?? readTrailingLetter(code, unit);
  if (shape === undefined) {
    return {
      ok: false,
      message: `“${code}” is not a marking code for ${quantityName(unit)}; write it as in 4K7, R47 or 2n2.`,
    };
  }
  const value = Number(`${shape.mantissa}e${shape.exponent}`);
  if (shape.rest === '') return { ok: true, value, tolerance: null };
  const tolerance = toleranceOf(shape.rest, value, unit);
  if (tolerance === undefined) {
    return {
      ok: false,
      message: `“${shape.rest}” at the end of “${code}” is not a tolerance letter, such as F, J or K.`,
    };
  }
  return { ok: true, value, tolerance };
}

/** A whole figure with its letter behind it: 470R, 47K, 10p. */
function readTrailingLetter(code: string, unit: Unit): RkmFigure | undefined {
  const match = /^(\d+)([A-Za-zµ])([A-Za-z]?)$/.exec(code);
  if (match === null) return undefined;
  const [, whole = '', letter = '', tolerance = ''] = match;
  const figure = readRkmFigure(`${whole}${letter}0`, unit);
  return figure === undefined ? undefined : { ...figure, rest: tolerance };
}
