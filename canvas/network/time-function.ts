import { formatAngle, formatFull, formatQuantity } from '@/solver';
import { TWO_PI } from '../parts/read-values';
import { angleDegrees, magnitude, type Phasor } from './phasor';

/** A line of text as shown, and the same with every digit and in plain characters, to be copied. */
export type CopiedText = { readonly shown: string; readonly full: string };

/**
 * The voltage or current of an rms phasor over time, in cosine form: `i(t) = 1.327 mA · cos(ωt − 45.6°)`. The amplitude
 * is √2 times rms, in whichever form readings are shown. At 0 Hz it is the direct value.
 */
export function timeFunction(symbol: 'i' | 'u', phasor: Phasor, unit: 'A' | 'V', frequencyHz: number): CopiedText {
  if (frequencyHz === 0) {
    return {
      shown: `${symbol}(t) = ${formatQuantity(phasor.re, unit, 4)}`,
      full: `${symbol}(t) = ${formatFull(phasor.re)} ${unit}`,
    };
  }
  const amplitude = magnitude(phasor) * Math.SQRT2;
  if (amplitude === 0) return { shown: `${symbol}(t) = 0 ${unit}`, full: `${symbol}(t) = 0 ${unit}` };
  const degrees = angleDegrees(phasor);
  const angle = formatAngle(Math.abs(degrees), 1);
  const shift = Number(angle.replace('°', '')) === 0 ? '' : ` ${degrees < 0 ? '−' : '+'} ${angle}`;
  const fullShift = degrees === 0 ? '' : ` ${degrees < 0 ? '-' : '+'} ${formatFull(Math.abs(degrees))}°`;
  return {
    shown: `${symbol}(t) = ${formatQuantity(amplitude, unit, 4)} · cos(ωt${shift})`,
    full: `${symbol}(t) = ${formatFull(amplitude)} ${unit} · cos(2π · ${formatFull(frequencyHz)} Hz · t${fullShift})`,
  };
}

/** The angular frequency that the time functions mean by ω. */
export function angularFrequency(frequencyHz: number): CopiedText {
  const omega = TWO_PI * frequencyHz;
  return { shown: `ω = ${formatQuantity(omega, 'rad/s', 4)}`, full: `ω = ${formatFull(omega)} rad/s` };
}
