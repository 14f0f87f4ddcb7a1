import { describe, expect, it } from 'vitest';
import { angularFrequency, timeFunction } from '@/canvas/network/time-function';

function plain(text: string): string {
  return text.replace(/\u2009/g, ' ');
}

function polar(magnitude: number, degrees: number) {
  const radians = (degrees * Math.PI) / 180;
  return { re: magnitude * Math.cos(radians), im: magnitude * Math.sin(radians) };
}

describe('a phasor as a time function', () => {
  it('is a cosine with √2 times the rms value, and the angle', () => {
    expect(plain(timeFunction('i', polar(938.2e-6, -45.6), 'A', 2000).shown)).toBe('i(t) = 1.327 mA · cos(ωt − 45.6°)');
    expect(plain(timeFunction('u', polar(0.7075, 43.5), 'V', 2000).shown)).toBe('u(t) = 1.001 V · cos(ωt + 43.5°)');
  });

  it('has no angle where it is zero, also after rounding', () => {
    expect(plain(timeFunction('u', { re: 1, im: 0 }, 'V', 50).shown)).toBe('u(t) = 1.414 V · cos(ωt)');
    expect(plain(timeFunction('u', polar(1, -0.04), 'V', 50).shown)).toBe('u(t) = 1.414 V · cos(ωt)');
  });

  it('is copied with every digit: the copied amplitude and angle give the phasor back', () => {
    const phasor = polar(0.123456789, -77.7654321);
    const { full } = timeFunction('i', phasor, 'A', 2000);
    const match = /^i\(t\) = (\S+) A · cos\(2π · 2000 Hz · t - (\S+)°\)$/.exec(full);
    const amplitude = Number(match?.[1]);
    const degrees = -Number(match?.[2]);
    const back = polar(amplitude / Math.SQRT2, degrees);
    expect(Math.abs(back.re - phasor.re)).toBeLessThan(8 * Number.EPSILON * 0.123456789);
    expect(Math.abs(back.im - phasor.im)).toBeLessThan(8 * Number.EPSILON * 0.123456789);
  });

  it('is the direct value at 0 Hz, with its sign', () => {
    expect(plain(timeFunction('u', { re: -5, im: 0 }, 'V', 0).shown)).toBe('u(t) = −5.000 V');
    expect(timeFunction('u', { re: -5, im: 0 }, 'V', 0).full).toBe('u(t) = -5 V');
  });

  it('is zero for a zero phasor', () => {
    expect(timeFunction('i', { re: 0, im: 0 }, 'A', 50).shown).toBe('i(t) = 0 A');
  });
});

describe('the angular frequency', () => {
  it('is 2πf, short to be read and whole to be copied', () => {
    expect(plain(angularFrequency(2000).shown)).toBe('ω = 12.57 krad/s');
    expect(angularFrequency(2000).full).toBe(`ω = ${2 * Math.PI * 2000} rad/s`);
  });
});
