import type { Element, ElementList } from '../elements/element-list';
import type { Found } from './sweep-exact';
import type { Sensitivity, SensitivityOutput, SensitivityTrace } from './sensitivity';
import { sensitivity } from './sensitivity';
import type { SweepOutput, SweepTransfer } from './sweep-output';

interface Slope {
  readonly value: { readonly re: number; readonly im: number };
  /** By the element's value, or s·dH/ds. */
  readonly slope: { readonly re: number; readonly im: number };
}

/** How a value of an element enters together with s: sⁿ·value; 0 for one that does not. */
function powerOfS({ field }: SensitivityTrace): number {
  switch (field) {
    case 'capacitance':
    case 'inductance':
    case 'inductances':
    case 'delay':
      return 1;
    case 'gainBandwidth':
      return -1;
    case 'loss':
      // It grows as the square root of the frequency.
      return 0.5;
    default:
      return 0;
  }
}

/**
 * A derivative or a group delay at one frequency, by `sensitivity`: s·dH/ds is the sum of p·∂H/∂p over the values that
 * stand beside s. Undefined where it is not determined, and for a group delay where tables take part: their points are
 * not values.
 */
export function exactDerivative(
  list: ElementList,
  output: Extract<SweepOutput, { quantity: 'groupDelay' | 'derivative' }>,
  frequency: number,
): Found {
  const id = output.quantity === 'derivative' ? output.element : undefined;
  if (id === undefined && (frequency === 0 || list.elements.some(isTable))) return undefined;
  const found = slopeOf(list, output.of, frequency, id);
  if (found === undefined) return undefined;
  if (id !== undefined) return found.slope;
  const { value, slope } = found;
  const square = value.re * value.re + value.im * value.im;
  const delay = -(slope.im * value.re - slope.re * value.im) / square / (2 * Math.PI * frequency);
  return Number.isFinite(delay) ? { re: delay, im: 0 } : undefined;
}

function isTable({ kind }: Element): boolean {
  return kind === 'impedance' || kind === 'twoPort';
}

function slopeOf(list: ElementList, of: SweepTransfer, frequency: number, id: string | undefined): Slope | undefined {
  switch (of.quantity) {
    case 'ratio': {
      const above = slopeOf(list, of.of, frequency, id);
      const below = slopeOf(list, of.to, frequency, id);
      return above === undefined || below === undefined ? undefined : quotient(above, below);
    }
    case 'admittance': {
      const below = slopeOf(list, { ...of, quantity: 'impedance' }, frequency, id);
      return below === undefined ? undefined : quotient({ value: { re: 1, im: 0 }, slope: { re: 0, im: 0 } }, below);
    }
    default:
      return plainSlope(list, of, frequency, id);
  }
}

function plainSlope(list: ElementList, of: SensitivityOutput, frequency: number, id: string | undefined): Slope | undefined {
  const result = sensitivity(list, of, [frequency]);
  if (!result.ok || result.determined[0] !== 1) return undefined;
  const { re, im }: Sensitivity = result;
  let [sumRe, sumIm] = [0, 0];
  for (const trace of result.traces) {
    const factor = id === undefined ? powerOfS(trace) * trace.value : Number(trace.element === id);
    if (factor === 0) continue;
    if (trace.determined[0] !== 1) return undefined;
    sumRe += factor * (trace.re[0] ?? 0);
    sumIm += factor * (trace.im[0] ?? 0);
  }
  return { value: { re: re[0] ?? 0, im: im[0] ?? 0 }, slope: { re: sumRe, im: sumIm } };
}

/** (a/b)′ = (a′ − (a/b)·b′)/b. */
function quotient(above: Slope, below: Slope): Slope | undefined {
  const value = over(above.value, below.value);
  if (value === undefined) return undefined;
  const part = {
    re: value.re * below.slope.re - value.im * below.slope.im,
    im: value.re * below.slope.im + value.im * below.slope.re,
  };
  const slope = over({ re: above.slope.re - part.re, im: above.slope.im - part.im }, below.value);
  return slope === undefined ? undefined : { value, slope };
}

function over(a: { re: number; im: number }, b: { re: number; im: number }): { re: number; im: number } | undefined {
  const square = b.re * b.re + b.im * b.im;
  if (square === 0 || !Number.isFinite(square)) return undefined;
  return { re: (a.re * b.re + a.im * b.im) / square, im: (a.im * b.re - a.re * b.im) / square };
}
