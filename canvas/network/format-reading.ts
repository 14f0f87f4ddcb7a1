import { formatPolar, formatQuantity, formatRectangular, type Unit } from '@/solver';
import type { Convention } from '../document/types';
import { magnitude, scaled, type Phasor } from './phasor';

/** How a reading is set: as the sheet says or, at 0 Hz, as a direct value, which is neither rms nor peak. */
export type ReadingConvention = Convention | 'direct';

/** The convention that holds at a frequency, in hertz. A direct value has a sign and no angle, and peak means nothing. */
export function conventionAt(convention: Convention, frequencyHz: number): ReadingConvention {
  return frequencyHz === 0 ? 'direct' : convention;
}

/** Peak is √2 times rms; that holds for voltages and currents only, never for powers and impedances. */
export function amplitudeFactor(unit: Unit, convention: ReadingConvention): number {
  if (convention === 'direct' || convention.amplitude === 'rms') return 1;
  return unit === 'V' || unit === 'A' ? Math.SQRT2 : 1;
}

/**
 * A reading as text in the convention: `637 µA ∠ −3.0°`, `10.6 + j0.7 mA`, and direct: `−5.00 V`.
 *
 * @param phasor rms on the cosine, in `unit`; at 0 Hz the direct value is its real part.
 * @param digits significant digits of the magnitude, or of the larger part.
 */
export function formatReading(phasor: Phasor, unit: Unit, convention: ReadingConvention, digits = 3): string {
  if (convention === 'direct') return formatQuantity(phasor.re, unit, digits);
  const { re, im } = scaled(phasor, amplitudeFactor(unit, convention));
  switch (convention.form) {
    case 'polar':
      return formatPolar(re, im, unit, digits);
    case 'rectangular':
      return formatRectangular(re, im, unit, digits);
  }
}

/**
 * A part of a complex power below this share of the apparent power is what rounding left of a cancellation (the active
 * power of a lossless part, the reactive power of a resistor), and is shown as the zero that it is.
 */
const POWER_ROUNDING = 1e-12;

/** The complex power with rounding's leavings taken out of its parts. */
export function withoutRounding(power: Phasor): Phasor {
  const least = magnitude(power) * POWER_ROUNDING;
  return { re: Math.abs(power.re) < least ? 0 : power.re, im: Math.abs(power.im) < least ? 0 : power.im };
}

/**
 * Active and reactive power as text: `10.6 µW, 664 µvar`; positive where the part absorbs. Powers have no peak form.
 * In the direct convention there is no reactive power, and none is shown.
 */
export function formatPower(power: Phasor, convention: ReadingConvention, digits = 3): string {
  const { re, im } = withoutRounding(power);
  const active = formatQuantity(re, 'W', digits);
  return convention === 'direct' ? active : `${active}, ${formatQuantity(im, 'var', digits)}`;
}
