import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Unit } from '@/solver';
import { formatQuantity, parseQuantity } from '@/solver';

/** Text, unit, and the value that it has to be to the last bit. */
const ACCEPTED: readonly (readonly [string, Unit, number])[] = [
  ['4k7', 'Ω', 4700],
  ['4.7k', 'Ω', 4700],
  ['4,7 kΩ', 'Ω', 4700],
  ['4.7 kOhm', 'Ω', 4700],
  ['4.7 kohm', 'Ω', 4700],
  ['4.7 k\u03a9', 'Ω', 4700],
  ['4.7 k\u2126', 'Ω', 4700],
  ['4.7 k Ω', 'Ω', 4700],
  ['4k7Ω', 'Ω', 4700],
  ['2u2', 'F', 2.2e-6],
  ['2\u00b52', 'F', 2.2e-6],
  ['2\u03bc2', 'F', 2.2e-6],
  ['2.2uF', 'F', 2.2e-6],
  ['2.2 µF', 'F', 2.2e-6],
  ['2n2F', 'F', 2.2e-9],
  ['100n', 'F', 100e-9],
  ['100 nF', 'F', 100e-9],
  ['100nf', 'F', 100e-9],
  ['p33', 'F', 0.33e-12],
  ['1e-6', 'F', 1e-6],
  ['1e-6 F', 'F', 1e-6],
  ['1E-6F', 'F', 1e-6],
  ['1,5e-6', 'F', 1.5e-6],
  ['1M', 'Ω', 1e6],
  ['1 MΩ', 'Ω', 1e6],
  ['1m', 'Ω', 1e-3],
  ['1 mΩ', 'Ω', 1e-3],
  ['R47', 'Ω', 0.47],
  ['4R7', 'Ω', 4.7],
  ['470R', 'Ω', 470],
  ['4L7', 'Ω', 4.7e-3],
  ['5L', 'Ω', 5e-3],
  ['10K', 'Ω', 10_000],
  ['4K7', 'Ω', 4700],
  ['1M5', 'Ω', 1.5e6],
  ['3G3', 'Ω', 3.3e9],
  ['1.5 mH', 'H', 1.5e-3],
  ['10mh', 'H', 10e-3],
  ['50 Hz', 'Hz', 50],
  ['50hz', 'Hz', 50],
  ['13.56MHz', 'Hz', 13.56e6],
  ['2 krad/s', 'rad/s', 2000],
  ['3V3', 'V', 3.3],
  ['230 V', 'V', 230],
  ['-12 V', 'V', -12],
  ['\u221212 V', 'V', -12],
  ['\u2013 12 V', 'V', -12],
  ['+5', 'V', 5],
  ['\u221230°', '°', -30],
  ['-30 deg', '°', -30],
  ['120', '°', 120],
  ['1\u2009000\u2009000', 'Ω', 1e6],
  ['1 000 000', 'Ω', 1e6],
  ['1\u202f000,5', 'Ω', 1000.5],
  ['0.000 001', 'F', 1e-6],
  ['\u00a0 47\u2009k \u00a0', 'Ω', 47_000],
  ['.5', 'V', 0.5],
  ['5.', 'V', 5],
  ['1,000', 'Ω', 1],
  ['1.000', 'Ω', 1],
  ['0', 'Ω', 0],
  ['-0', 'V', 0],
  ['20 ms', 's', 0.02],
  ['10 mS', 'S', 0.01],
  ['2 kvar', 'var', 2000],
  ['10 kVA', 'VA', 10_000],
  ['0.5 J', 'J', 0.5],
  ['-3 dB', 'dB', -3],
  ['2.5', '', 2.5],
  ['10k', '', 10_000],
  ['7e1', '', 70],
];

/** Text, unit, and words that the sentence has to have. */
const REFUSED: readonly (readonly [string, Unit, RegExp])[] = [
  ['', 'Ω', /type a value, such as 4k7/i],
  ['   ', 'F', /type a value/i],
  ['abc', 'V', /no number/],
  ['Ω', 'Ω', /no number/],
  ['∞', 'Ω', /no number/],
  ['NaN', 'Ω', /no number/],
  ['100 nF', 'Ω', /^That is a capacitance \(F\); this field wants a resistance \(Ω\)\.$/],
  ['10 mH', 'F', /an inductance \(H\).*a capacitance \(F\)/],
  ['50 Hz', 'rad/s', /a frequency \(Hz\).*an angular frequency \(rad\/s\)/],
  ['5 s', 'S', /a time \(s\).*a conductance \(S\)/],
  ['3V3', 'Ω', /a voltage/],
  ['4R7', 'F', /a resistance/],
  ['2n2 Ω', 'F', /a resistance/],
  ['5 V', '', /a voltage.*a plain number/],
  ['1.2.3', 'V', /two decimal signs/],
  ['1,000.5', 'Ω', /two decimal signs/],
  ['1.000,5', 'Ω', /two decimal signs/],
  ['1,000,000', 'Ω', /two decimal signs/],
  ['4.7k7', 'Ω', /decimal sign and a letter/],
  ['4k7k', 'Ω', /not understood/],
  ['4k7 kΩ', 'Ω', /not understood/],
  ['4x7', 'Ω', /not understood/],
  ['5 %', 'V', /not understood/],
  ['12 V today', 'V', /not understood/],
  ['1 Mega', 'Ω', /M is mega, m is milli/],
  ['1 meg', 'Ω', /M is mega, m is milli/],
  ['2 kilo', 'Ω', /as a letter/],
  ['1e400', 'Ω', /too large/],
  ['1e-400', 'V', /too small/],
  ['1e', 'V', /power of ten is missing/],
  ['1E', 'Ω', /power of ten is missing/],
  ['--5', 'V', /two signs/],
  ['+-5', 'V', /two signs/],
  ['4 7k', 'Ω', /groups of three/],
  ['1 0000', 'Ω', /groups of three/],
  ['1k 5', 'Ω', /not understood/],
  ['30 m°', '°', /prefix is not used/],
  ['9'.repeat(65), 'Ω', /over 64 characters/],
];

const UNITS: readonly Unit[] = ['Ω', 'F', 'H', 'V', 'A', 'Hz', 'rad/s', '°', 'W', 'var', 'VA', 'S', 's', 'J', 'dB', ''];

describe('parseQuantity', () => {
  it.each(ACCEPTED)('reads %j in %j as %j', (text, unit, value) => {
    expect(parseQuantity(text, unit)).toMatchObject({ ok: true, value });
  });

  it.each(REFUSED)('refuses %j in %j with a sentence', (text, unit, words) => {
    const parsed = parseQuantity(text, unit);
    expect(parsed.ok).toBe(false);
    if (parsed.ok) return;
    expect(parsed.message).toMatch(words);
    expect(parsed.message).toMatch(/^[A-Z“].*[.]$/);
  });

  it('never gives a negative zero', () => {
    const parsed = parseQuantity('-0', 'V');
    expect(parsed.ok && Object.is(parsed.value, 0)).toBe(true);
  });

  it('tells mega from milli by case alone', () => {
    expect(parseQuantity('1 MΩ', 'Ω')).toMatchObject({ value: 1e6 });
    expect(parseQuantity('1 mΩ', 'Ω')).toMatchObject({ value: 1e-3 });
    expect(parseQuantity('1M0', 'Hz')).toMatchObject({ value: 1e6 });
    expect(parseQuantity('1m0', 'Hz')).toMatchObject({ value: 1e-3 });
  });

  it('echoes what it understood with all digits, so that a comma taken for a decimal sign is seen', () => {
    expect(parseQuantity('1,000', 'Ω')).toMatchObject({ echo: '1\u2009Ω' });
    expect(parseQuantity('4k7', 'Ω')).toMatchObject({ echo: '4.7\u2009kΩ' });
    expect(parseQuantity('1 000 000.5', 'Ω')).toMatchObject({ echo: '1.0000005\u2009MΩ' });
    expect(parseQuantity('-30', '°')).toMatchObject({ echo: '\u221230°' });
  });

  it('never throws, and gives a finite value or a sentence, for any text', () => {
    const typed = fc.string({
      unit: fc.constantFrom(...'0123456789.,+-−eE kKmMµuμnpRLΩFHVAHzrad/s°xX\u2009\u00a0'.split('')),
      maxLength: 12,
    });
    fc.assert(
      fc.property(
        fc.oneof(typed, fc.string({ unit: 'binary', maxLength: 80 })),
        fc.constantFrom(...UNITS),
        (text, unit) => {
          const parsed = parseQuantity(text, unit);
          if (parsed.ok) return Number.isFinite(parsed.value) && parsed.echo.length > 0;
          return parsed.message.length > 10 && parsed.message.length < 200;
        },
      ),
      { seed: 20260101, numRuns: 5000 },
    );
  });

  it('reads back its own echo as the same value, to the last bit', () => {
    const values = fc.double({ noNaN: true, noDefaultInfinity: true, min: -1e20, max: 1e20 });
    fc.assert(
      fc.property(values, fc.constantFrom(...UNITS), (value, unit) => {
        const first = parseQuantity(String(value), unit);
        if (!first.ok) return false;
        const again = parseQuantity(first.echo, unit);
        return again.ok && again.value === first.value;
      }),
      { seed: 20260102, numRuns: 3000 },
    );
  });

  it('reads back what formatQuantity set, within half a unit of the last digit shown', () => {
    const sizes = fc.tuple(
      fc.double({ min: 1, max: 9.999, noNaN: true }),
      fc.integer({ min: -17, max: 19 }),
      fc.boolean(),
    );
    fc.assert(
      fc.property(
        sizes,
        fc.integer({ min: 1, max: 17 }),
        fc.constantFrom(...UNITS),
        ([mantissa, power, negative], digits, unit) => {
          const value = (negative ? -1 : 1) * mantissa * 10 ** power;
          const parsed = parseQuantity(formatQuantity(value, unit, digits), unit);
          return (
            parsed.ok && Math.abs(parsed.value - value) <= Math.abs(value) * (5.01 * 10 ** -digits + 2 * Number.EPSILON)
          );
        },
      ),
      { seed: 20260103, numRuns: 3000 },
    );
  });
});
