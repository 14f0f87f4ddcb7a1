import type { BandRange } from '../../document/types';
import { formatWhole } from '../figures/echo';

/** The Band's axis is logarithmic: places on it are shares of its length, 0 at `fromHz` and 1 at `toHz`. */
export function shareOf(band: BandRange, hz: number): number {
  return Math.log(hz / band.fromHz) / Math.log(band.toHz / band.fromHz);
}

/** A share as a length for a style. Rounded, since the server's logarithms and the browser's differ in the last digit. */
export function percentOf(share: number): string {
  return `${(share * 100).toFixed(3)}%`;
}

export function hertzAt(band: BandRange, share: number): number {
  return band.fromHz * (band.toHz / band.fromHz) ** share;
}

export type Tick = {
  readonly hz: number;
  readonly share: number;
  readonly label: string | null;
  readonly weight: 'decade' | 'labelled' | 'minor';
};

/** A label such as "200 Hz" with some air, in px. */
const LABEL_ROOM = 64;
/** From this length of a decade on, 2 and 5 find room between 1 and 10. */
const ROOM_FOR_TWO_AND_FIVE = 190;
const ROOM_FOR_MINOR = 60;
/** A band narrower than this many decades has no two decade marks to be read between. */
const FEW_DECADES = 0.75;

/** The marks of the axis for its length in px: decades, their 2 and 5 where there is room, and the rest without labels. */
export function axisTicks(band: BandRange, lengthPx: number): readonly Tick[] {
  const decades = Math.log10(band.toHz / band.fromHz);
  return decades < FEW_DECADES ? evenTicks(band, lengthPx) : decadeTicks(band, lengthPx / decades);
}

function decadeTicks(band: BandRange, decadePx: number): readonly Tick[] {
  const ticks: Tick[] = [];
  const stride = Math.max(1, Math.ceil(LABEL_ROOM / decadePx));
  const first = Math.floor(Math.log10(band.fromHz));
  const last = Math.ceil(Math.log10(band.toHz));
  for (let exponent = first; exponent <= last; exponent += 1) {
    for (let digit = 1; digit <= 9; digit += 1) {
      // Read from text: 10 ** −6 is not the number that 1e-6 is.
      const hz = Number(`${digit}e${exponent}`);
      if (hz < band.fromHz || hz > band.toHz) continue;
      if (digit === 1) {
        const isLabelled = exponent % stride === 0;
        ticks.push(tickAt(band, hz, isLabelled, 'decade'));
      } else if ((digit === 2 || digit === 5) && decadePx >= ROOM_FOR_TWO_AND_FIVE) {
        ticks.push(tickAt(band, hz, true, 'labelled'));
      } else if (decadePx >= ROOM_FOR_MINOR) {
        ticks.push(tickAt(band, hz, false, 'minor'));
      }
    }
  }
  return ticks;
}

/** Even steps of 1, 2 or 5 times a power of ten, five minor ones to each. */
function evenTicks(band: BandRange, lengthPx: number): readonly Tick[] {
  const most = Math.max(2, Math.floor(lengthPx / (1.5 * LABEL_ROOM)));
  const rough = (band.toHz - band.fromHz) / most;
  const power = 10 ** Math.floor(Math.log10(rough));
  const step = [1, 2, 5, 10].map((factor) => factor * power).find((candidate) => candidate >= rough) ?? 10 * power;
  const minor = step / 5;
  const ticks: Tick[] = [];
  for (let count = Math.ceil(band.fromHz / minor); count * minor <= band.toHz; count += 1) {
    const hz = Number((count * minor).toPrecision(12));
    const isLabelled = count % 5 === 0;
    ticks.push(tickAt(band, hz, isLabelled, isLabelled ? 'labelled' : 'minor'));
  }
  return ticks;
}

function tickAt(band: BandRange, hz: number, isLabelled: boolean, weight: Tick['weight']): Tick {
  return { hz, share: shareOf(band, hz), label: isLabelled ? formatWhole(hz, 'Hz', 1) : null, weight };
}

/** Where the handle stands: on the axis, or parked at an end because the operating frequency is not on it. */
export type HandlePlace = { readonly share: number; readonly parked: 'below' | 'above' | null };

export function handlePlace(band: BandRange, hz: number): HandlePlace {
  if (hz < band.fromHz) return { share: 0, parked: 'below' };
  if (hz > band.toHz) return { share: 1, parked: 'above' };
  return { share: shareOf(band, hz), parked: null };
}
