import type { BandRange } from '../../document/types';
import { readFrequency } from '../../parts/read-values';

/** What the sheet's schema allows for the ends of the Band, in hertz. */
const LEAST_HZ = 1e-6;
const MOST_HZ = 1e15;
/** Ends closer than this, as a ratio, leave nothing to drag along. */
const LEAST_RATIO = 1.01;

export type ReadBand =
  | { readonly ok: true; readonly band: BandRange }
  | { readonly ok: false; readonly end: 'from' | 'to'; readonly message: string };

/** Reads the two ends of the Band as typed, in hertz or radians a second. */
export function readBand(from: string, to: string): ReadBand {
  const low = readEnd(from);
  if (!low.ok) return { ok: false, end: 'from', message: low.message };
  const high = readEnd(to);
  if (!high.ok) return { ok: false, end: 'to', message: high.message };
  if (high.value < low.value * LEAST_RATIO) {
    return { ok: false, end: 'to', message: 'The Band rises: its end lies above its beginning by one per cent or more.' };
  }
  return { ok: true, band: { fromHz: low.value, toHz: high.value } };
}

function readEnd(text: string): ReturnType<typeof readFrequency> {
  const read = readFrequency(text);
  if (!read.ok) return read;
  if (read.value === 0) return { ok: false, message: 'The axis is logarithmic and cannot hold 0 Hz; begin above it, such as at 1 Hz.' };
  if (read.value < LEAST_HZ || read.value > MOST_HZ) return { ok: false, message: 'The Band lies between 1 µHz and 1 PHz.' };
  return read;
}

/** The Band widened to whole decades so that it holds a frequency. */
export function widenedBand(band: BandRange, hz: number): BandRange {
  return {
    fromHz: Math.max(LEAST_HZ, Math.min(band.fromHz, Number(`1e${Math.floor(Math.log10(hz))}`))),
    toHz: Math.min(MOST_HZ, Math.max(band.toHz, Number(`1e${Math.ceil(Math.log10(hz))}`))),
  };
}
