import { mutualInductance } from '../elements/coupled-inductors';
import type { Element } from '../elements/element-list';
import type { Law } from '../elements/law';

/**
 * Coefficients of equations as a hand would write them: sums of products of symbols. A token says what it stands for,
 * not how it looks.
 */
export type Factor =
  /** A field of an element: its resistance, the second of its inductances. Its number is the field's own. */
  | { readonly symbol: 'value'; readonly element: string; readonly field: string; readonly index?: number }
  /** The mutual inductance of two coils of an element, M = k·√(L_one·L_other), H. */
  | { readonly symbol: 'mutualInductance'; readonly element: string; readonly coils: readonly [number, number] }
  /** What a table or a line makes of the frequency: Z of an impedance, S₁₁ … S₂₂ of a block, e^(−θ) of a line. */
  | { readonly symbol: 'impedance' | 's11' | 's12' | 's21' | 's22' | 'propagation'; readonly element: string }
  /** What an independent source delivers at the frequency, V or A rms. */
  | { readonly symbol: 'source'; readonly element: string }
  /** j. */
  | { readonly symbol: 'imaginaryUnit' }
  /** ω, rad/s. */
  | { readonly symbol: 'angularFrequency' }
  /** f, Hz. */
  | { readonly symbol: 'frequency' };

/** sign · Π numerator / Π denominator; 1 where both are empty. */
export interface Product {
  readonly sign: 1 | -1;
  readonly numerator: readonly Factor[];
  readonly denominator: readonly Factor[];
}

export type Sum = readonly Product[];

/** A term of a port's own equation: a coefficient times the voltage or the current of a port. */
export interface SymbolicTerm {
  readonly of: 'voltage' | 'current';
  /** A port of the element, or another element, whose first port it is. */
  readonly port: number | { readonly element: string };
  readonly coefficient: Sum;
}

export const ONE: Product = { sign: 1, numerator: [], denominator: [] };
const J: Factor = { symbol: 'imaginaryUnit' };
const OMEGA: Factor = { symbol: 'angularFrequency' };

export function product(...numerator: readonly Factor[]): Product {
  return { sign: 1, numerator, denominator: [] };
}

export function over(above: readonly Factor[], ...denominator: readonly Factor[]): Product {
  return { sign: 1, numerator: above, denominator };
}

export function negated(sum: Sum): Sum {
  return sum.map((one) => ({ ...one, sign: one.sign === 1 ? -1 : 1 }));
}

/** Every product of the sum with one more factor. */
function times(sum: Sum, factor: Factor): Sum {
  return sum.map((one) => ({ ...one, numerator: [factor, ...one.numerator] }));
}

/** The admittance of a port that is described by one: 1/R, jωC or 1/(jωL). */
export function admittanceSymbol({ id }: Element, law: Law): Sum {
  switch (law.law) {
    case 'resistance':
      return [over([], { symbol: 'value', element: id, field: 'resistance' })];
    case 'capacitance':
      return [product(J, OMEGA, { symbol: 'value', element: id, field: 'capacitance' })];
    case 'inductance':
      return [over([], J, OMEGA, { symbol: 'value', element: id, field: 'inductance' })];
    default:
      return [];
  }
}

/** The equation of a port that has its current as an unknown: Σ terms = what `sourceOf` its law says, or nothing. */
export function equationSymbols(element: Element, port: number, law: Law, isDirect: boolean): readonly SymbolicTerm[] {
  const { id } = element;
  const voltage = (coefficient: Sum): SymbolicTerm => ({ of: 'voltage', port, coefficient });
  const current = (coefficient: Sum): SymbolicTerm => ({ of: 'current', port, coefficient });
  switch (law.law) {
    case 'resistance':
      return [voltage([ONE]), current(negated([product({ symbol: 'value', element: id, field: 'resistance' })]))];
    case 'capacitance':
      return [voltage(negated([product(J, OMEGA, { symbol: 'value', element: id, field: 'capacitance' })])), current([ONE])];
    case 'inductance':
      if (isDirect) return [voltage([ONE])];
      return [voltage([ONE]), current(negated([product(J, OMEGA, { symbol: 'value', element: id, field: 'inductance' })]))];
    case 'impedance':
      return [voltage([ONE]), current(negated([product({ symbol: 'impedance', element: id })]))];
    case 'voltage':
    case 'short':
      return [voltage([ONE])];
    case 'current':
    case 'open':
      return [current([ONE])];
    case 'equation':
      return equationOfKind(element, port, isDirect);
  }
}

/** The equations of the kinds that have such, in symbols; the laws say the same in numbers. */
function equationOfKind(element: Element, port: number, isDirect: boolean): readonly SymbolicTerm[] {
  const { id } = element;
  const value = (field: string): Factor => ({ symbol: 'value', element: id, field });
  const term = (of: SymbolicTerm['of'], target: SymbolicTerm['port'], coefficient: Sum): SymbolicTerm => ({ of, port: target, coefficient });
  const follows = (of: SymbolicTerm['of'], sensedOf: SymbolicTerm['of'], target: SymbolicTerm['port'], field: string) => [
    term(of, 0, [ONE]),
    term(sensedOf, target, negated([product(value(field))])),
  ];
  switch (element.kind) {
    case 'coupledInductors': {
      const own = term('voltage', port, [ONE]);
      if (isDirect) return [own];
      const couples = (other: number): boolean => mutualInductance(element.inductances, element.coupling, port, other) !== 0;
      return [
        own,
        ...element.inductances.flatMap((_, other) => {
          if (other === port) return [term('current', port, negated([product(J, OMEGA, { ...value('inductances'), index: port } as Factor)]))];
          if (!couples(other)) return [];
          const coils = [Math.min(port, other), Math.max(port, other)] as const;
          return [term('current', other, negated([product(J, OMEGA, { symbol: 'mutualInductance', element: id, coils })]))];
        }),
      ];
    }
    case 'idealTransformer':
      return port === 0
        ? [term('voltage', 0, [ONE]), term('voltage', 1, negated([product(value('ratio'))]))]
        : [term('current', 0, [product(value('ratio'))]), term('current', 1, [ONE])];
    case 'voltageControlledVoltageSource':
      return follows('voltage', 'voltage', 1, 'gain');
    case 'voltageControlledCurrentSource':
      return follows('current', 'voltage', 1, 'transconductance');
    case 'currentControlledVoltageSource':
      return follows('voltage', 'current', { element: element.sensedElement }, 'transresistance');
    case 'currentControlledCurrentSource':
      return follows('current', 'current', { element: element.sensedElement }, 'gain');
    case 'operationalAmplifier': {
      const { openLoopGain, gainBandwidth, outputResistance = 0 } = element;
      if (openLoopGain === undefined && gainBandwidth === undefined) return [term('voltage', 0, [ONE])];
      const loss: Sum = [
        ...(openLoopGain === undefined ? [] : [over([], value('openLoopGain'))]),
        ...(gainBandwidth === undefined || isDirect ? [] : [over([J, { symbol: 'frequency' }], value('gainBandwidth'))]),
      ];
      return [
        term('voltage', 0, negated([ONE])),
        ...(loss.length === 0 ? [] : [term('voltage', 1, loss)]),
        ...(loss.length === 0 || outputResistance === 0 ? [] : [term('current', 1, negated(times(loss, value('outputResistance'))))]),
      ];
    }
    case 'twoPort': {
      const [own, over2] = port === 0 ? (['s11', 's12'] as const) : (['s22', 's21'] as const);
      const reflected: Product = product({ symbol: own, element: id });
      const transmitted: Product = product({ symbol: over2, element: id });
      return waves(port, [reflected], [transmitted], value('reference'));
    }
    case 'line':
      return waves(port, [], [product({ symbol: 'propagation', element: id })], value('impedance'));
    case 'resistor':
    case 'capacitor':
    case 'inductor':
    case 'impedance':
    case 'voltageSource':
    case 'currentSource':
      return [];
  }
}

/** (1 − S_pp)·v_p − R·(1 + S_pp)·i_p − S_pq·v_q − R·S_pq·i_q = 0. */
function waves(port: number, reflected: Sum, transmitted: Sum, reference: Factor): readonly SymbolicTerm[] {
  return [
    { of: 'voltage', port, coefficient: [ONE, ...negated(reflected)] },
    { of: 'current', port, coefficient: negated(times([ONE, ...reflected], reference)) },
    { of: 'voltage', port: 1 - port, coefficient: negated(transmitted) },
    { of: 'current', port: 1 - port, coefficient: negated(times(transmitted, reference)) },
  ];
}
