import { mutualInductance } from '../elements/coupled-inductors';
import type { ComplexPair, CoupledInductors, Element } from '../elements/element-list';
import type { Law, Term } from '../elements/law';

/** What of a law changes with a value, and how fast, at one frequency. `port` counts within the element. */
export type Effect =
  /** dR, dC or dL of the port's law is `by` times the value's change. */
  | { readonly of: 'resistance' | 'capacitance' | 'inductance'; readonly port: number; readonly by: number }
  /** The coefficient of a term in the equation of the port. */
  | { readonly of: 'term'; readonly port: number; readonly term: Omit<Term, 'coefficient'>; readonly by: ComplexPair };

/** A number of an element that a person may change: by its field, and its place where the field holds several. */
export interface ValueField {
  readonly element: string;
  readonly field: string;
  /** The place in a field of several numbers, from 0; undefined in a field of one. */
  readonly index: number | undefined;
  readonly value: number;
}

/** A value, and what it does to the laws at a frequency. */
export interface ValueEffects extends ValueField {
  readonly effects: (frequency: number) => readonly Effect[];
}

/**
 * The values of an element, all that a kind has but what sources deliver and points of tables. `laws` are the element's
 * own. The line's loss is one of them, its loss frequency is not: that says where the loss was measured.
 */
export function valuesOf(element: Element, laws: readonly Law[]): readonly ValueEffects[] {
  const one = (field: string, value: number, effects: ValueEffects['effects']): ValueEffects => ({
    element: element.id,
    field,
    index: undefined,
    value,
    effects,
  });
  const term = (port: number, of: Term['of'], target: Term['port'], by: ComplexPair): Effect => ({
    of: 'term',
    port,
    term: { port: target, of },
    by,
  });
  switch (element.kind) {
    case 'resistor':
      return [one('resistance', element.resistance, () => [{ of: 'resistance', port: 0, by: 1 }])];
    case 'capacitor':
      return [one('capacitance', element.capacitance, () => [{ of: 'capacitance', port: 0, by: 1 }])];
    case 'inductor':
      return [one('inductance', element.inductance, () => [{ of: 'inductance', port: 0, by: 1 }])];
    case 'coupledInductors':
      return valuesOfCoils(element);
    case 'idealTransformer':
      return [
        one('ratio', element.ratio, () => [term(0, 'voltage', 1, [-1, 0]), term(1, 'current', 0, [1, 0])]),
      ];
    case 'voltageControlledVoltageSource':
      return [one('gain', element.gain, () => [term(0, 'voltage', 1, [-1, 0])])];
    case 'voltageControlledCurrentSource':
      return [one('transconductance', element.transconductance, () => [term(0, 'voltage', 1, [-1, 0])])];
    case 'currentControlledVoltageSource': {
      const sensed = { element: element.sensedElement };
      return [one('transresistance', element.transresistance, () => [term(0, 'current', sensed, [-1, 0])])];
    }
    case 'currentControlledCurrentSource': {
      const sensed = { element: element.sensedElement };
      return [one('gain', element.gain, () => [term(0, 'current', sensed, [-1, 0])])];
    }
    case 'operationalAmplifier': {
      // (1/A + s/(2π·f_T))·(v_out − R_out·i) − v_in = 0
      const { openLoopGain: gain, gainBandwidth: bandwidth, outputResistance } = element;
      const output = (by: ComplexPair): readonly Effect[] => [
        term(1, 'voltage', 1, by),
        term(1, 'current', 1, [-by[0] * (outputResistance ?? 0), -by[1] * (outputResistance ?? 0)]),
      ];
      const loss = (frequency: number): ComplexPair => [gain === undefined ? 0 : 1 / gain, bandwidth === undefined ? 0 : frequency / bandwidth];
      const values: ValueEffects[] = [];
      if (gain !== undefined) values.push(one('openLoopGain', gain, () => output([-1 / gain / gain, 0])));
      if (bandwidth !== undefined) values.push(one('gainBandwidth', bandwidth, (f) => output([0, -f / bandwidth / bandwidth])));
      if (outputResistance !== undefined && values.length > 0) {
        values.push(
          one('outputResistance', outputResistance, (f) => {
            const [re, im] = loss(f);
            return [term(1, 'current', 1, [-re, -im])];
          }),
        );
      }
      return values;
    }
    case 'line': {
      const { impedance, delay, loss, lossFrequency = 1 } = element;
      /** The same change at both ends: of the own voltage and current, and of what comes over. */
      const both = (ownCurrent: number, overVoltage: ComplexPair, overCurrent: ComplexPair): readonly Effect[] =>
        [0, 1].flatMap((port) => [
          term(port, 'current', port, [ownCurrent, 0]),
          term(port, 'voltage', 1 - port, overVoltage),
          term(port, 'current', 1 - port, overCurrent),
        ]);
      const through = (frequency: number): ComplexPair => {
        const [law] = laws;
        const coefficient = law?.law === 'equation' ? law.terms.find(({ port, of }) => port === 1 && of === 'voltage')?.coefficient : undefined;
        const [re, im] = coefficient !== undefined && 'at' in coefficient ? (coefficient.at(frequency) ?? [0, 0]) : [0, 0];
        return [-re, -im];
      };
      const scaled = ([re, im]: ComplexPair, by: number): ComplexPair => [re * by, im * by];
      const ofThrough = (change: ComplexPair): readonly Effect[] => both(0, scaled(change, -1), scaled(change, -impedance));
      const values = [
        one('impedance', impedance, (f) => both(-1, [0, 0], scaled(through(f), -1))),
        one('delay', delay, (f) => {
          const [re, im] = through(f);
          // d/dτ e^(−jωτ) = −jω·e^(−jωτ)
          return ofThrough(scaled([im, -re], 2 * Math.PI * f));
        }),
      ];
      if (loss !== undefined) {
        values.push(one('loss', loss, (f) => ofThrough(scaled(through(f), (-Math.LN10 / 20) * Math.sqrt(f / lossFrequency)))));
      }
      return values;
    }
    case 'impedance':
    case 'twoPort':
    case 'voltageSource':
    case 'currentSource':
      return [];
  }
}

/** v_i = s·Σ_j M_ij·i_j with M_ij = k_ij·√(L_i·L_j). */
function valuesOfCoils({ id, inductances, coupling }: CoupledInductors): readonly ValueEffects[] {
  const coils = inductances.length;
  /** The effect of a change of M_ij: the coefficient is −s·M_ij. */
  const mutual = (frequency: number, i: number, j: number, by: number): Effect => ({
    of: 'term',
    port: i,
    term: { port: j, of: 'current' },
    by: [0, -2 * Math.PI * frequency * by],
  });
  const values = inductances.map(
    (value, i): ValueEffects => ({
      element: id,
      field: 'inductances',
      index: i,
      value,
      effects: (f) =>
        inductances.flatMap((_, j) => {
          if (j === i) return [mutual(f, i, i, 1)];
          const by = mutualInductance(inductances, coupling, i, j) / (2 * value);
          return [mutual(f, i, j, by), mutual(f, j, i, by)];
        }),
    }),
  );
  let pair = 0;
  for (let i = 0; i < coils; i++) {
    for (let j = i + 1; j < coils; j++, pair++) {
      const by = Math.sqrt(inductances[i] ?? 0) * Math.sqrt(inductances[j] ?? 0);
      const single = typeof coupling === 'number';
      values.push({
        element: id,
        field: 'coupling',
        index: single ? undefined : pair,
        value: single ? coupling : (coupling[pair] ?? 0),
        effects: (f) => [mutual(f, i, j, by), mutual(f, j, i, by)],
      });
    }
  }
  return values;
}
