import type { Polar } from './figures';

/**
 * The network of the stories: a source V in series with R, and C across the output. Its readings by the formulas of any
 * textbook, written out here without anything of the application: I = V / (R + 1/jωC), and the output over C is V / (1 + jωRC).
 */
export type LowPass = { readonly volts: number; readonly ohms: number; readonly farads: number };

const degrees = (radians: number) => (radians * 180) / Math.PI;

/** The current through R, entering from the source: it leads the source. */
export function currentOf({ volts, ohms, farads }: LowPass, hertz: number): Polar {
  const reactance = 1 / (2 * Math.PI * hertz * farads);
  return { size: volts / Math.hypot(ohms, reactance), degrees: degrees(Math.atan2(reactance, ohms)) };
}

/** The voltage over C: it lags the source. */
export function outputOf({ volts, ohms, farads }: LowPass, hertz: number): Polar {
  const turn = 2 * Math.PI * hertz * ohms * farads;
  return { size: volts / Math.hypot(1, turn), degrees: degrees(-Math.atan(turn)) };
}
