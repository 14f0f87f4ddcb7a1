import { Complex } from 'complex.js';
import type { PortReferences, TwoPortMatrix } from './two-port-parameters';
import { newMatrix, renormalise } from './two-port-parameters';

/**
 * Figures of a two-port at one frequency. Where a figure has no finite value (the return loss of a perfect match, the
 * insertion loss of what lets nothing through) the answer is undefined.
 */

const decibels = (ratio: number): number => 20 * Math.log10(ratio);

function finite(value: number): number | undefined {
  return Number.isFinite(value) ? value : undefined;
}

/** Return loss of a reflection coefficient, dB: −20 lg|Γ|, positive for a passive one (IEV 702-07-25). */
export function returnLoss(reflection: Complex): number | undefined {
  return finite(-decibels(reflection.abs()));
}

/** Standing-wave ratio (1 + |Γ|)/(1 − |Γ|); undefined where all is reflected, or more. */
export function standingWaveRatio(reflection: Complex): number | undefined {
  const size = reflection.abs();
  return size < 1 ? finite((1 + size) / (1 - size)) : undefined;
}

/**
 * Insertion loss between resistances of source and load, dB: the level at the load without the two-port over that with
 * it. Negative where the two-port makes the level rise. From scattering parameters with any references.
 */
export function insertionLoss(
  scattering: TwoPortMatrix,
  references: PortReferences,
  terminations: PortReferences,
): number | undefined {
  const loss = transducerLoss(scattering, references, terminations);
  const [source, load] = terminations;
  const direct = decibels((2 * Math.sqrt(source * load)) / (source + load));
  return loss === undefined ? undefined : finite(loss + direct);
}

/** The power that the source could give over what the load gets, dB, between the same resistances. */
export function transducerLoss(
  scattering: TwoPortMatrix,
  references: PortReferences,
  terminations: PortReferences,
): number | undefined {
  const terminated = newMatrix();
  if (!renormalise(scattering, references, terminations, terminated)) return undefined;
  return finite(-decibels(Math.hypot(terminated[4] ?? 0, terminated[5] ?? 0)));
}

export interface ImageParameters {
  /** Ω; each end sees its own when the other is closed by its own (IEV 131-15-23). Of two roots those with a real part ≥ 0. */
  readonly impedances: readonly [Complex, Complex];
  /**
   * ½·ln of the complex power in over the complex power out, V₁·I₁/(V₂·I₂), so terminated (IEV 131-15-25): attenuation in
   * nepers and phase in radians. From port 1 to port 2.
   */
  readonly transfer: Complex;
}

/**
 * Image parameters from a chain matrix: Z₁² = A·B/(C·D), Z₂ = Z₁·D/A, e^γ = (A + B/Z₂)·√(Z₂/Z₁). Undefined where an
 * impedance would be nothing or infinite. A quarter-wave section, with A = D = 0, has many pairs; the equal one is given.
 */
export function imageParameters(chain: TwoPortMatrix): ImageParameters | undefined {
  const [a, b, c, d] = [0, 2, 4, 6].map((at) => new Complex(chain[at] ?? 0, chain[at + 1] ?? 0)) as [
    Complex,
    Complex,
    Complex,
    Complex,
  ];
  const isQuarterWave = a.abs() * d.abs() <= (8 * Number.EPSILON) ** 2 * b.abs() * c.abs();
  if (b.isZero() || c.isZero() || (!isQuarterWave && (a.isZero() || d.isZero()))) return undefined;
  const ratio = isQuarterWave ? new Complex(1, 0) : d.div(a);
  const transferWith = (first: Complex): Complex => a.add(b.div(first.mul(ratio))).mul(ratio.sqrt());
  const root = b.div(c).div(ratio).sqrt();
  const principal = root.re < 0 ? root.neg() : root;
  // Of a reactive root rounding chooses the sign; there the attenuation decides.
  const isReactive = Math.abs(principal.re) <= 8 * Number.EPSILON * Math.abs(principal.im);
  const first = isReactive && transferWith(principal).abs() < 1 ? principal.neg() : principal;
  const second = first.mul(ratio);
  const transfer = transferWith(first).log();
  const all = [first.re, first.im, second.re, second.im, transfer.re, transfer.im];
  return all.every(Number.isFinite) ? { impedances: [first, second], transfer } : undefined;
}

export interface RollettStability {
  /** (1 − |S₁₁|² − |S₂₂|² + |Δ|²) / (2·|S₁₂·S₂₁|). */
  readonly factor: number;
  /** |Δ| = |S₁₁·S₂₂ − S₁₂·S₂₁|. Stable with every passive load if the factor is above 1 and this below 1. */
  readonly determinant: number;
}

/** Rollett's stability factor (IRE Trans. Circuit Theory 9 (1962) 29, doi 10.1109/TCT.1962.1086854); undefined where S₁₂·S₂₁ = 0. */
export function rollettStability(scattering: TwoPortMatrix): RollettStability | undefined {
  const { s11, s22, through, delta } = parts(scattering);
  const factor = (1 - s11 * s11 - s22 * s22 + delta * delta) / (2 * through);
  return Number.isFinite(factor) ? { factor, determinant: delta } : undefined;
}

/**
 * Edwards and Sinsky's µ (IEEE Trans. Microwave Theory Tech. 40 (1992) 2303, doi 10.1109/22.179894): the distance from
 * the centre of the chart of load reflections to the nearest that makes the input unstable. Above 1: stable with every
 * passive load and source. (1 − |S₁₁|²) / (|S₂₂ − Δ·S₁₁*| + |S₁₂·S₂₁|); undefined where the denominator is 0.
 */
export function stabilityDistance(scattering: TwoPortMatrix): number | undefined {
  const { s11, through, rest } = parts(scattering);
  return finite((1 - s11 * s11) / (rest + through));
}

function parts(m: TwoPortMatrix): { s11: number; s22: number; through: number; delta: number; rest: number } {
  const [s11, s12, s21, s22] = [0, 2, 4, 6].map((at) => new Complex(m[at] ?? 0, m[at + 1] ?? 0)) as [
    Complex,
    Complex,
    Complex,
    Complex,
  ];
  const through = s12.mul(s21);
  const delta = s11.mul(s22).sub(through);
  return {
    s11: s11.abs(),
    s22: s22.abs(),
    through: through.abs(),
    delta: delta.abs(),
    rest: s22.sub(delta.mul(s11.conjugate())).abs(),
  };
}
