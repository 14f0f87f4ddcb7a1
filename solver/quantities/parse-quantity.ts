import { formatExact } from './format-quantity';
import { exponentOfPrefix } from './prefix';
import { readRkmFigure } from './rkm';
import type { Unit } from './unit';
import { quantityName, takesPrefixes, unitOfSpelling } from './unit';

export type ParsedQuantity =
  /** `value` in the unit asked for; `echo` is what was understood, with all its digits, to be shown to the person. */
  | { readonly ok: true; readonly value: number; readonly echo: string }
  /** One or two sentences: what is wrong with the text, and what to do. */
  | { readonly ok: false; readonly message: string };

const LONGEST = 64;

/**
 * Reads a value as engineers type it: `4k7`, `4.7k`, `4,7 kΩ`, `2u2`, `100 nF`, `1e-6`, `R47`, `−30°`. Never throws.
 *
 * - `m` is milli and `M` is mega, always; `u` is µ; `K` is taken for kilo, as in IEC 60062.
 * - The unit may be left out. A unit of another quantity is refused, never converted.
 * - A comma is a decimal sign, so `1,000` is 1; the echo makes it visible. Two decimal signs are refused.
 * - Digits may be grouped in threes by spaces (`1 000 000`), by nothing else.
 * - A letter in the place of the decimal sign is the multiplier (IEC 60062); `R` and `L` stand for ohms and milliohms.
 */
export function parseQuantity(text: string, unit: Unit): ParsedQuantity {
  if (text.length > LONGEST)
    return refuse(`That is over ${LONGEST} characters long; type one value, such as ${example(unit)}.`);
  const clean = normalise(text);
  if (clean === '') return refuse(`Type a value, such as ${example(unit)}.`);
  const signMatch = /^([+-]?) ?(.*)$/.exec(clean);
  const sign = signMatch?.[1] === '-' ? '-' : '';
  const body = signMatch?.[2] ?? '';
  if (/^[+-]/.test(body)) return refuse(`“${clean}” has two signs; keep one.`);
  if (!/\d/.test(body)) return refuse(`There is no number in “${clean}”; type a value, such as ${example(unit)}.`);
  if (/\d ?[.,](.*[^\de])?[.,]|[.,]\d*[.,]/.test(body)) {
    return refuse(`“${clean}” has two decimal signs; use one point or comma, and spaces to group digits.`);
  }
  return readPlain(sign, body, unit) ?? readCode(sign, body, unit);
}

const EXAMPLES: Readonly<Record<Unit, string>> = {
  Ω: '4k7 or 4.7 kΩ',
  F: '100n or 2.2 µF',
  H: '10 mH or 2u2',
  V: '5 V or 230 mV',
  A: '2 A or 10 mA',
  Hz: '50 Hz or 1.5 kHz',
  'rad/s': '314 rad/s or 2 krad/s',
  '°': '30° or −90',
  W: '5 W',
  var: '2 kvar',
  VA: '10 kVA',
  S: '10 mS',
  s: '20 ms',
  J: '0.5 J',
  dB: '−3 dB',
  '': '2.5',
};

function example(unit: Unit): string {
  return EXAMPLES[unit];
}

function refuse(message: string): ParsedQuantity {
  return { ok: false, message };
}

/** One kind of space, of minus, of µ and of Ω; nothing around the text. Dashes are taken for a minus only in front. */
function normalise(text: string): string {
  return text
    .replace(/[\s\u00a0\u1680\u2000-\u200d\u202f\u205f\u2060\u3000\ufeff]+/g, ' ')
    .trim()
    .replace(/^[\u2010-\u2015\ufe63\uff0d]/, '-')
    .replace(/\u2212/g, '-')
    .replace(/\u03bc/g, 'µ')
    .replace(/\u2126/g, 'Ω');
}

/** A number, grouped or not, with or without a power of ten, and then a prefix and a unit or nothing. */
const PLAIN =
  /^(\d{1,3}(?: \d{3})+(?!\d)|\d+)?(?:([.,])(\d{3}(?: \d{3})+(?!\d)|\d*))?(?:[eE]([+-]?\d{1,5})(?!\d))? ?(.*)$/;

function readPlain(sign: string, body: string, unit: Unit): ParsedQuantity | undefined {
  const match = PLAIN.exec(body);
  if (match === null) return undefined;
  const [, whole = '', , fraction = '', power = '0', tail = ''] = match;
  if (whole === '' && fraction === '') return undefined;
  if (/^\d/.test(tail)) {
    return refuse(`The digits of “${body}” are not in groups of three; leave out the spaces between them.`);
  }
  if (/\d/.test(tail)) return undefined;
  const multiplier = readTail(tail, unit);
  if (!multiplier.ok) return multiplier;
  const mantissa = `${digitsOf(whole)}.${digitsOf(fraction)}`;
  return finish(sign, mantissa, Number(power) + multiplier.exponent, unit);
}

function digitsOf(grouped: string): string {
  const digits = grouped.replace(/ /g, '');
  return digits === '' ? '0' : digits;
}

/** A figure with a letter in the place of its decimal sign. */
function readCode(sign: string, body: string, unit: Unit): ParsedQuantity {
  if (/\d[.,]|[.,]\d/.test(body) && /[A-Za-zµ]\d/.test(body)) {
    return refuse(`“${body}” has a decimal sign and a letter in the place of one; use 4.7k or 4k7.`);
  }
  const figure = readRkmFigure(body, unit);
  if (figure === undefined) return refuseCode(body, unit);
  const tail = figure.rest.trim();
  if (tail !== '' && unitOfSpelling(tail) !== unit) {
    const other = unitOfSpelling(tail);
    if (other !== undefined) return refuseOtherUnit(other, unit);
    return refuse(`“${tail}” at the end of “${body}” is not understood; type it as ${example(unit)}.`);
  }
  return finish(sign, figure.mantissa, figure.exponent, unit);
}

function refuseCode(body: string, unit: Unit): ParsedQuantity {
  const letter = /^\d*([A-Za-zµ])\d+/.exec(body)?.[1];
  if (letter === 'R' || letter === 'L') return refuseOtherUnit('Ω', unit);
  const other = letter === undefined ? undefined : unitOfSpelling(letter);
  if (other !== undefined && other !== unit) return refuseOtherUnit(other, unit);
  return refuse(`“${body}” is not understood as ${quantityName(unit)}; type it as ${example(unit)}.`);
}

type Tail = { readonly ok: true; readonly exponent: number } | { readonly ok: false; readonly message: string };

/** What follows a number: nothing, a prefix, a unit, or a prefix and a unit. */
function readTail(tail: string, unit: Unit): Tail {
  if (tail === '') return { ok: true, exponent: 0 };
  if (unitOfSpelling(tail) === unit) return { ok: true, exponent: 0 };
  if (tail === 'R' && unit === 'Ω') return { ok: true, exponent: 0 };
  if (tail === 'L' && unit === 'Ω') return { ok: true, exponent: -3 };
  const prefix = exponentOfPrefix(tail.charAt(0));
  const behind = tail.slice(1).trimStart();
  if (takesPrefixes(unit) && prefix !== undefined) {
    // A lone E is more likely a power of ten not yet typed than exa.
    if (behind === '' && tail !== 'E') return { ok: true, exponent: prefix };
    if (behind !== '' && isUnit(behind, unit)) return { ok: true, exponent: prefix };
  }
  return refuseTail(tail, behind, prefix !== undefined, unit);
}

/** Behind a prefix nothing but the unit can stand, so its letter is taken in lower case too: `100nf`, `10mh`. */
function isUnit(text: string, unit: Unit): boolean {
  if (unitOfSpelling(text) === unit) return true;
  return 'FHVAW'.includes(unit) && unit !== '' && text === unit.toLowerCase();
}

function refuseTail(tail: string, behind: string, prefixed: boolean, unit: Unit): Tail {
  if (tail === 'E' || tail === 'e') {
    return { ok: false, message: 'The power of ten is missing after the e; write it as in 1e-6.' };
  }
  if (/^(mega|meg|milli|kilo|micro|nano|pico|giga)/i.test(tail)) {
    return {
      ok: false,
      message: `Write the prefix as a letter, not as “${tail}”: M is mega, m is milli, k, µ (or u), n and p.`,
    };
  }
  const other = unitOfSpelling(tail) ?? (prefixed ? unitOfSpelling(behind) : undefined);
  if (other !== undefined && other !== unit) return otherUnit(other, unit);
  if (other === unit) return { ok: false, message: `A prefix is not used with ${unit}; type it as ${example(unit)}.` };
  const wanted = unit === '' ? 'a plain number' : `a prefix and ${unit}`;
  return {
    ok: false,
    message: `“${tail}” after the number is not understood; ${wanted} may stand there, as in ${example(unit)}.`,
  };
}

function otherUnit(other: Unit, unit: Unit): { readonly ok: false; readonly message: string } {
  const wanted = unit === '' ? 'a plain number' : `${quantityName(unit)} (${unit})`;
  return { ok: false, message: `That is ${quantityName(other)} (${other}); this field wants ${wanted}.` };
}

function refuseOtherUnit(other: Unit, unit: Unit): ParsedQuantity {
  return otherUnit(other, unit);
}

/** Reads the decimal text in one go, so that 4.7k is 4700 to the last bit. */
function finish(sign: string, mantissa: string, exponent: number, unit: Unit): ParsedQuantity {
  const value = Number(`${sign}${mantissa}e${exponent}`);
  if (!Number.isFinite(value)) return refuse('That is too large a number; check the power of ten.');
  if (value === 0 && /[1-9]/.test(mantissa)) return refuse('That is too small a number; type 0 if none is meant.');
  return { ok: true, value: value === 0 ? 0 : value, echo: formatExact(value, unit) };
}
