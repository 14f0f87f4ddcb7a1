import { describe, expect, it } from 'vitest';
import { axisTicks, handlePlace, hertzAt, shareOf } from '@/canvas/react/band/axis';

const AUDIO = { fromHz: 100, toHz: 100_000 };

function labels(band: { fromHz: number; toHz: number }, lengthPx: number): readonly string[] {
  return axisTicks(band, lengthPx).flatMap(({ label }) => (label === null ? [] : [label.replace(/\u2009/g, ' ')]));
}

describe('places on the axis', () => {
  it('are logarithmic, and lead back to their frequency', () => {
    expect(shareOf(AUDIO, 100)).toBe(0);
    expect(shareOf(AUDIO, 100_000)).toBe(1);
    expect(shareOf(AUDIO, 1_000)).toBeCloseTo(1 / 3, 14);
    for (const hz of [100, 234.5, 2_000, 99_999]) {
      expect(Math.abs(hertzAt(AUDIO, shareOf(AUDIO, hz)) / hz - 1)).toBeLessThan(64 * Number.EPSILON);
    }
  });

  it('park the handle at an end when its frequency is not on the axis', () => {
    expect(handlePlace(AUDIO, 0)).toEqual({ share: 0, parked: 'below' });
    expect(handlePlace(AUDIO, 1e6)).toEqual({ share: 1, parked: 'above' });
    expect(handlePlace(AUDIO, 100)).toEqual({ share: 0, parked: null });
  });
});

describe('marks of the axis', () => {
  it('are labelled at 1, 2 and 5 where there is room', () => {
    expect(labels(AUDIO, 1296)).toEqual([
      '100 Hz', '200 Hz', '500 Hz', '1 kHz', '2 kHz', '5 kHz', '10 kHz', '20 kHz', '50 kHz', '100 kHz',
    ]);
  });

  it('are labelled at decades only on a short axis, and never closer than a label is long', () => {
    expect(labels(AUDIO, 400)).toEqual(['100 Hz', '1 kHz', '10 kHz', '100 kHz']);
    for (const band of [AUDIO, { fromHz: 1e-6, toHz: 1e15 }, { fromHz: 20, toHz: 50 }, { fromHz: 900, toHz: 1100 }]) {
      for (const length of [300, 700, 1296]) {
        const shares = axisTicks(band, length).flatMap((tick) => (tick.label === null ? [] : [tick.share]));
        const gaps = shares.slice(1).map((share, index) => (share - (shares[index] ?? 0)) * length);
        expect(Math.min(...gaps, Infinity)).toBeGreaterThan(54);
      }
    }
  });

  it('are even on a band too narrow for decades, and inside it', () => {
    expect(labels({ fromHz: 900, toHz: 1100 }, 500)).toEqual(['900 Hz', '950 Hz', '1 kHz', '1.05 kHz', '1.1 kHz']);
    const shares = axisTicks({ fromHz: 937, toHz: 1073 }, 500).map(({ share }) => share);
    expect(Math.min(...shares)).toBeGreaterThanOrEqual(0);
    expect(Math.max(...shares)).toBeLessThanOrEqual(1);
  });
});
