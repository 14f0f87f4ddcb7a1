import type { ElementDefinition } from './element-definition';
import { faultOfPositive, firstFault, twoPorts } from './element-definition';
import type { ComplexPair, TwoPort } from './element-list';
import type { Law, Tabulated, Term } from './law';
import { faultOfPoints, isFiniteNumber, tabulated } from './tabulated';

/**
 * b = S·a with the waves a = (v + R·i)/2√R and b = (v − R·i)/2√R at each port, i entering (real reference impedance R):
 * (v_p − R·i_p) − Σ_q S_pq·(v_q + R·i_q) = 0. These equations hold whatever S is, also where no impedance or
 * admittance matrix exists.
 */
export const twoPort: ElementDefinition<TwoPort> = {
  name: 'two-port block',
  nodeCount: 4,
  faultOf: (fields) =>
    firstFault(
      faultOfPositive(fields, 'reference', 'ohms'),
      faultOfPoints(
        fields,
        ({ s11, s12, s21, s22 }) => [s11, s12, s21, s22].every(isPair),
        'a frequency and s11, s12, s21 and s22 as pairs of finite numbers',
      ),
    ),
  ports: twoPorts,
  laws: ({ reference, points }) => {
    const frequencies = points.map(({ frequency }) => frequency);
    const of = (pick: (point: (typeof points)[number]) => ComplexPair): Tabulated => tabulated(frequencies, points.map(pick));
    return [
      waveLaw(reference, 0, of(({ s11 }) => s11), of(({ s12 }) => s12)),
      waveLaw(reference, 1, of(({ s22 }) => s22), of(({ s21 }) => s21)),
    ];
  },
};

/** The equation of the wave that leaves `port`: what is reflected there, and what comes over from the other port. */
export function waveLaw(reference: number, port: number, reflected: Tabulated, transmitted: Tabulated): Law {
  const other = 1 - port;
  return {
    law: 'equation',
    terms: [
      term(port, 'voltage', reflected, (re, im) => [1 - re, -im]),
      term(port, 'current', reflected, (re, im) => [-reference * (1 + re), -reference * im]),
      term(other, 'voltage', transmitted, (re, im) => [-re, -im]),
      term(other, 'current', transmitted, (re, im) => [-reference * re, -reference * im]),
    ],
  };
}

function term(port: number, of: Term['of'], wave: Tabulated, turn: (re: number, im: number) => ComplexPair): Term {
  return {
    port,
    of,
    coefficient: {
      at: (frequency) => {
        const value = wave(frequency);
        return value === undefined ? undefined : turn(...value);
      },
    },
  };
}

function isPair(value: unknown): boolean {
  return Array.isArray(value) && value.length === 2 && value.every(isFiniteNumber);
}
