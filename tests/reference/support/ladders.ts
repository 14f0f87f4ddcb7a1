import type { Element } from '@/solver';
import { capacitor, inductor, resistor, voltageSource } from '../../solver/support/networks';
import { wire } from './parts';

/**
 * Low-pass ladders of 1 rad/s and 1 Ω by the closed forms of Matthaei, Young and Jones, *Microwave Filters,
 * Impedance-Matching Networks, and Coupling Structures* (1964), sections 4.03 to 4.06, and Weinberg, *Network Analysis
 * and Synthesis* (1962) [memory, confirmed by calculation]. The element nearest the source comes first.
 */
export interface Ladder {
  readonly g: readonly number[];
  /** A resistance if the last element is a shunt capacitor, a conductance if it is a series inductor. */
  readonly load: number;
}

/** a_k = sin((2k − 1)π/2n). */
function sineOf(n: number): (k: number) => number {
  return (k) => Math.sin(((2 * k - 1) * Math.PI) / (2 * n));
}

/** g_1 = first, g_k = a_{k−1}·a_k/(b_{k−1}·g_{k−1}). */
function recursion(n: number, first: number, next: (k: number) => number): number[] {
  const g = [first];
  for (let k = 2; k <= n; k++) g.push(next(k) / (g[k - 2] ?? 1));
  return g;
}

/** g_k = 2 sin((2k − 1)π/2n). */
export function butterworth(n: number): Ladder {
  const a = sineOf(n);
  return { g: Array.from({ length: n }, (_, k) => 2 * a(k + 1)), load: 1 };
}

/** On an ideal voltage source; with c_k = cos²(kπ/2n) and from the load: g_1 = a_1, g_k = a_{k−1}·a_k/(c_{k−1}·g_{k−1}). */
export function butterworthOnVoltageSource(n: number): Ladder {
  const a = sineOf(n);
  const c = (k: number): number => Math.cos((k * Math.PI) / (2 * n)) ** 2;
  return { g: recursion(n, a(1), (k) => (a(k - 1) * a(k)) / c(k - 1)).reverse(), load: 1 };
}

/** Nepers of ripple to the β of the formulas: β = ln coth(ripple/17.37 dB), 17.37 dB being two nepers. */
export const TWO_NEPERS = 40 / Math.LN10;

function betaOf(rippleDecibels: number, twoNepers: number): number {
  return Math.log(1 / Math.tanh(rippleDecibels / twoNepers));
}

/** With γ = sinh(β/2n), b_k = γ² + sin²(kπ/n): g_1 = 2a_1/γ, g_k = 4a_{k−1}·a_k/(b_{k−1}·g_{k−1}); load coth²(β/4) for even n. */
export function chebyshev(n: number, rippleDecibels: number, twoNepers = TWO_NEPERS): Ladder {
  const beta = betaOf(rippleDecibels, twoNepers);
  const gamma = Math.sinh(beta / (2 * n));
  const a = sineOf(n);
  const b = (k: number): number => gamma ** 2 + Math.sin((k * Math.PI) / n) ** 2;
  const g = recursion(n, (2 * a(1)) / gamma, (k) => (4 * a(k - 1) * a(k)) / b(k - 1));
  return { g, load: n % 2 === 1 ? 1 : 1 / Math.tanh(beta / 4) ** 2 };
}

/** On an ideal voltage source; from the load, with d_k = (γ² + sin²(kπ/2n))·cos²(kπ/2n): g_1 = a_1/γ, g_k = a_{k−1}·a_k/(d_{k−1}·g_{k−1}). */
export function chebyshevOnVoltageSource(n: number, rippleDecibels: number): Ladder {
  const gamma = Math.sinh(betaOf(rippleDecibels, TWO_NEPERS) / (2 * n));
  const a = sineOf(n);
  const d = (k: number): number => {
    const angle = (k * Math.PI) / (2 * n);
    return (gamma ** 2 + Math.sin(angle) ** 2) * Math.cos(angle) ** 2;
  };
  return { g: recursion(n, a(1) / gamma, (k) => (a(k - 1) * a(k)) / d(k - 1)).reverse(), load: 1 };
}

/** T_n(ω)² without the cancellation of the polynomial's terms. */
export function chebyshevSquared(n: number, omega: number): number {
  return omega <= 1 ? Math.cos(n * Math.acos(omega)) ** 2 : Math.cosh(n * Math.acosh(omega)) ** 2;
}

/** ε² of a ripple. */
export function rippleSquared(rippleDecibels: number): number {
  return Math.expm1((rippleDecibels * Math.LN10) / 10);
}

export interface BuiltLadder {
  readonly elements: readonly Element[];
  /** The node of the load, and its ohms. */
  readonly out: string;
  readonly loadOhms: number;
}

/** The ladder on an EMF of 1 V behind `source` ohms (0 for an ideal source); `shuntFirst` or its dual. */
export function ladderNetwork({ g, load }: Ladder, shuntFirst: boolean, source = 1): BuiltLadder {
  const elements: Element[] = [voltageSource('V1', 'emf', '0', 1), resistor('Rs', 'emf', 'n0', source)];
  g.forEach((value, k) => {
    if ((k % 2 === 0) === shuntFirst) {
      elements.push(wire(`W${k}`, `n${k}`, `n${k + 1}`), capacitor(`C${k}`, `n${k + 1}`, '0', value));
    } else elements.push(inductor(`L${k}`, `n${k}`, `n${k + 1}`, value));
  });
  const lastIsShunt = (g.length % 2 === 1) === shuntFirst;
  const loadOhms = lastIsShunt ? load : 1 / load;
  const out = `n${g.length}`;
  elements.push(resistor('RL', out, '0', loadOhms));
  return { elements, out, loadOhms };
}
