import { describe, expect, it } from 'vitest';
import { conventionAt, formatPower, formatReading } from '@/canvas/network/format-reading';

const POLAR = { amplitude: 'rms', form: 'polar' } as const;
const POLAR_PEAK = { amplitude: 'peak', form: 'polar' } as const;
const RECTANGULAR = { amplitude: 'rms', form: 'rectangular' } as const;
const RECTANGULAR_PEAK = { amplitude: 'peak', form: 'rectangular' } as const;

/** Thin spaces would make the expectations unreadable. */
function plain(text: string): string {
  return text.replace(/\u2009/g, ' ');
}

describe('a reading as text', () => {
  it('is magnitude and angle in polar form', () => {
    const phasor = { re: 637e-6 * Math.cos(-3 * (Math.PI / 180)), im: 637e-6 * Math.sin(-3 * (Math.PI / 180)) };
    expect(plain(formatReading(phasor, 'A', POLAR))).toBe('637 µA ∠ −3.0°');
  });

  it('is real and imaginary part under one prefix in rectangular form', () => {
    expect(plain(formatReading({ re: 10.6e-3, im: 0.7e-3 }, 'A', RECTANGULAR))).toBe('10.6 + j0.7 mA');
  });

  it('is √2 times larger as peak, in either form, for voltages and currents', () => {
    expect(plain(formatReading({ re: 1, im: 0 }, 'V', POLAR_PEAK, 4))).toBe('1.414 V ∠ 0.00°');
    expect(plain(formatReading({ re: 0, im: -1 }, 'A', RECTANGULAR_PEAK, 4))).toBe('0 − j1.414 A');
  });

  it('never makes a power or an impedance peak', () => {
    expect(plain(formatReading({ re: 3, im: 4 }, 'VA', POLAR_PEAK))).toBe('5.00 VA ∠ 53.1°');
    expect(plain(formatReading({ re: 3, im: 4 }, 'Ω', RECTANGULAR_PEAK))).toBe('3.00 + j4.00 Ω');
  });

  it('is a signed value without angle at 0 Hz, and never multiplied', () => {
    expect(plain(formatReading({ re: -5, im: 0 }, 'V', conventionAt(POLAR_PEAK, 0)))).toBe('−5.00 V');
    expect(conventionAt(POLAR_PEAK, 50)).toBe(POLAR_PEAK);
  });
});

describe('a power as text', () => {
  it('is active and reactive power, each under its own prefix', () => {
    expect(plain(formatPower({ re: 10.6e-6, im: 664e-6 }, POLAR))).toBe('10.6 µW, 664 µvar');
    expect(plain(formatPower({ re: -2, im: -1e-3 }, POLAR_PEAK))).toBe('−2.00 W, −1.00 mvar');
  });

  it('shows what rounding left as zero, and nothing larger', () => {
    expect(plain(formatPower({ re: 1e-17, im: 1 }, POLAR))).toBe('0 W, 1.00 var');
    expect(plain(formatPower({ re: 1, im: 2e-12 }, POLAR))).toBe('1.00 W, 2.00 pvar');
  });

  it('has no reactive part at 0 Hz', () => {
    expect(plain(formatPower({ re: 0.25, im: 0 }, 'direct'))).toBe('250 mW');
  });
});
