import { describe, expect, it } from 'vitest';
import { readBand, widenedBand } from '@/canvas/react/band/read-band';
import { frequencyAfterKey } from '@/canvas/react/band/step-frequency';

const BAND = { fromHz: 100, toHz: 100_000 };

describe('keys on the handle', () => {
  it('step by about one per cent, and with Shift or Page by a third of an octave', () => {
    expect(frequencyAfterKey(BAND, 1000, { key: 'ArrowRight', shiftKey: false })).toBeCloseTo(1009.6, 1);
    expect(frequencyAfterKey(BAND, 1000, { key: 'ArrowLeft', shiftKey: true })).toBeCloseTo(794.3, 1);
    expect(frequencyAfterKey(BAND, 1000, { key: 'PageUp', shiftKey: false })).toBeCloseTo(1258.9, 1);
  });

  it('go to the ends and not beyond, and come back from off the Band', () => {
    expect(frequencyAfterKey(BAND, 1000, { key: 'Home', shiftKey: false })).toBe(100);
    expect(frequencyAfterKey(BAND, 1000, { key: 'End', shiftKey: false })).toBe(100_000);
    expect(frequencyAfterKey(BAND, 100_000, { key: 'ArrowUp', shiftKey: true })).toBe(100_000);
    expect(frequencyAfterKey(BAND, 5e6, { key: 'ArrowLeft', shiftKey: false })).toBe(100_000);
  });

  it('enter the Band from direct current, and do not fall below it', () => {
    expect(frequencyAfterKey(BAND, 0, { key: 'ArrowRight', shiftKey: false })).toBe(100);
    expect(frequencyAfterKey(BAND, 0, { key: 'ArrowLeft', shiftKey: false })).toBe(0);
  });

  it('leave other keys to others', () => {
    expect(frequencyAfterKey(BAND, 1000, { key: 'r', shiftKey: false })).toBeNull();
  });
});

describe('the range of the Band as typed', () => {
  it('is read in hertz or radians a second', () => {
    expect(readBand('20', '20k')).toEqual({ ok: true, band: { fromHz: 20, toHz: 20_000 } });
    const angular = readBand('1 krad/s', '1 MHz');
    expect(angular.ok && angular.band.fromHz).toBeCloseTo(1000 / (2 * Math.PI), 10);
  });

  it.each([
    ['0', '1k', 'from', /logarithmic/],
    ['10', '10', 'to', /rises/],
    ['10', 'x', 'to', /no number/],
    ['10', '1e18', 'to', /between 1 µHz and 1 PHz/],
  ])('refuses %s to %s at its %s end, in words', (from, to, end, words) => {
    const read = readBand(from, to);
    expect(read.ok).toBe(false);
    expect(!read.ok && read.end).toBe(end);
    expect(!read.ok && read.message).toMatch(words);
  });

  it('widens by whole decades to hold a frequency', () => {
    expect(widenedBand(BAND, 2.5e6)).toEqual({ fromHz: 100, toHz: 1e7 });
    expect(widenedBand(BAND, 3)).toEqual({ fromHz: 1, toHz: 100_000 });
  });
});
