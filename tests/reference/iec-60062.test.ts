import { describe, expect, it } from 'vitest';
import { parseQuantity, parseRkm } from '@/solver';
import {
  CAPACITOR_CODES,
  RESISTOR_CODES,
  SMALL_CAPACITOR_TOLERANCE,
  SYMMETRIC_TOLERANCE,
  UNEQUAL_TOLERANCE,
} from './data/iec-60062';

describe('IEC 60062 letter code', () => {
  it.each(RESISTOR_CODES)('%s is %d ohms', (code, value) => {
    expect(parseRkm(code, 'Ω')).toEqual({ ok: true, value, tolerance: null });
    expect(parseQuantity(code, 'Ω')).toMatchObject({ ok: true, value });
  });

  it.each(CAPACITOR_CODES)('%s is %d farads', (code, value) => {
    expect(parseRkm(code, 'F')).toEqual({ ok: true, value, tolerance: null });
    expect(parseQuantity(code, 'F')).toMatchObject({ ok: true, value });
  });

  it.each(Object.entries(SYMMETRIC_TOLERANCE))('%s is ± %d per cent', (letter, percent) => {
    const tolerance = { minus: percent, plus: percent, absolute: false };
    expect(parseRkm(`4K7${letter}`, 'Ω')).toEqual({ ok: true, value: 4700, tolerance });
    expect(parseRkm(`2n2${letter}`, 'F')).toEqual({ ok: true, value: 2.2e-9, tolerance });
  });

  it.each(Object.entries(UNEQUAL_TOLERANCE))('%s is unequal', (letter, [minus, plus]) => {
    expect(parseRkm(`10µ${letter}`, 'F')).toEqual({
      ok: true,
      value: 1e-5,
      tolerance: { minus, plus, absolute: false },
    });
  });

  it.each(Object.entries(SMALL_CAPACITOR_TOLERANCE))('%s below 10 pF is ± %d pF', (letter, picofarads) => {
    const farads = Number(`${picofarads}e-12`);
    const tolerance = { minus: farads, plus: farads, absolute: true };
    expect(parseRkm(`3p3${letter}`, 'F')).toEqual({ ok: true, value: 3.3e-12, tolerance });
  });

  // The examples with a tolerance are from memory.
  it.each([
    ['4K7J', 'Ω', 4700, 5],
    ['R33K', 'Ω', 0.33, 10],
    ['2n2F', 'F', 2.2e-9, 1],
    ['470RK', 'Ω', 470, 10],
    ['4\u03bc7M', 'F', 4.7e-6, 20],
  ] as const)('%s in %s is %d ± %d per cent', (code, unit, value, percent) => {
    expect(parseRkm(code, unit)).toEqual({
      ok: true,
      value,
      tolerance: { minus: percent, plus: percent, absolute: false },
    });
  });

  it.each(['', '4K7X', '4K7JJ', 'J', '4700', '4x7', 'K', '4K7 J'.repeat(5)])('refuses %j with a sentence', (code) => {
    const parsed = parseRkm(code, 'Ω');
    expect(parsed.ok).toBe(false);
    if (!parsed.ok) expect(parsed.message).toMatch(/^[A-Z“].*\.$/);
  });
});
