import { withoutRounding } from './format-reading';
import { magnitude, type Phasor } from './phasor';

/** |P| / |S| and whether the current lags or leads the voltage; neither where there is no reactive power. */
export type PowerFactor = { readonly value: number; readonly sense: 'lagging' | 'leading' | null };

/**
 * The power factor of V·I*. A part that absorbs lags where it absorbs reactive power; one that delivers is judged by
 * the current it delivers, so a source is as lagging as the load that it feeds. `null` where there is no power.
 */
export function powerFactor(power: Phasor): PowerFactor | null {
  const { re, im } = withoutRounding(power);
  const apparent = magnitude(power);
  if (apparent === 0) return null;
  const value = Math.abs(re) / apparent;
  if (im === 0) return { value, sense: null };
  const absorbs = re >= 0;
  return { value, sense: im > 0 === absorbs ? 'lagging' : 'leading' };
}
