import type { BandRange } from '../../document/types';

/** A fine step is about one per cent; a coarse one a third of an octave. */
const FINE_DECADES = 1 / 240;
const COARSE_DECADES = 0.1;

export type SliderKey = { readonly key: string; readonly shiftKey: boolean };

/**
 * Where a key takes the operating frequency, in hertz, or null for a key that means nothing here. Steps stay on the
 * Band; one from off it comes back to its nearer end.
 */
export function frequencyAfterKey(band: BandRange, hz: number, { key, shiftKey }: SliderKey): number | null {
  const step = shiftKey ? COARSE_DECADES : FINE_DECADES;
  const by = (decades: number) => {
    // At 0 Hz there is no ratio to go by: any step up enters the Band.
    if (hz === 0) return decades > 0 ? band.fromHz : 0;
    return Math.min(band.toHz, Math.max(band.fromHz, hz * 10 ** decades));
  };
  switch (key) {
    case 'ArrowRight':
    case 'ArrowUp':
      return by(step);
    case 'ArrowLeft':
    case 'ArrowDown':
      return by(-step);
    case 'PageUp':
      return by(COARSE_DECADES);
    case 'PageDown':
      return by(-COARSE_DECADES);
    case 'Home':
      return band.fromHz;
    case 'End':
      return band.toHz;
    default:
      return null;
  }
}
