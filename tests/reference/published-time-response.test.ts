import { describe, expect, it } from 'vitest';
import type { PolesAndZeros } from '@/solver';
import { impulseResponse, polesAndZeros } from '@/solver';
import { network } from '../solver/support/networks';
import { figuresOf } from './support/describe-figure';
import { expectPrinted } from './support/expect-figure';
import { crossing } from './support/measure';
import type { Circuit, DecayFigure } from './support/records';

/** Published times in which a capacitor left to itself is discharged. */
function acrossOf({ elements }: Circuit, { node }: DecayFigure): PolesAndZeros {
  const found = polesAndZeros(network(...elements), { kind: 'impedance', nodes: [node, '0'] });
  if (!found.ok) throw new Error(found.message);
  return found;
}

describe.each(figuresOf<DecayFigure>(['decay']))('%s', (_title, circuit, figures) => {
  it.each(figures)('%s, by the one pole of the impedance', (_words, figure) => {
    const [pole, ...others] = acrossOf(circuit, figure).poles;
    expect(others).toEqual([]);
    expect(pole?.s.im).toBe(0);
    expectPrinted(Math.log(figure.from / figure.to) / -(pole?.s.re ?? 0), figure);
  });

  it.each(figures)('%s, by the response in time to a charge', (_words, figure) => {
    const response = impulseResponse(acrossOf(circuit, figure));
    // A charge at once makes the voltage that is left to fall.
    const left = (time: number): number => {
      const found = response.evaluate([time]);
      if (!found.ok) throw new Error(found.message);
      return (figure.from * (found.values[0] ?? NaN)) / response.initial;
    };
    expect(Math.abs(left(0) / figure.from - 1)).toBeLessThanOrEqual(2 * Number.EPSILON);
    expectPrinted(
      crossing((time) => left(time) - figure.to, 1e-6, 100),
      figure,
    );
  });
});
