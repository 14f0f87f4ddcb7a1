import { describe, expect, it } from 'vitest';
import type { Element, SweepOutput, SweepTrace } from '@/solver';
import { sweep } from '@/solver';
import type { ComplexLike } from '../solver/support/expect';
import { network } from '../solver/support/networks';
import { figuresOf } from './support/describe-figure';
import { expectAngle, expectPhasor, expectPrinted } from './support/expect-figure';
import { difference, magnitude, NOTHING, read } from './support/measure';
import type { ExactFigure, Output, PhasorFigure, ReadingFigure } from './support/records';

/** Every published phasor and reading, by one sweep of a network over all the frequencies of its figures. */
type SweptFigure = ReadingFigure | PhasorFigure | ExactFigure;

/** The outputs of a sweep that make up an output of the data, and how; undefined where a sweep has no such thing. */
function sweptAs(output: Output): { readonly outputs: readonly SweepOutput[]; readonly value: (of: readonly ComplexLike[]) => ComplexLike } | undefined {
  const first = (of: readonly ComplexLike[]): ComplexLike => of[0] ?? NOTHING;
  const sum = (of: readonly ComplexLike[]): ComplexLike =>
    of.reduce((total, { re, im }) => ({ re: total.re + re, im: total.im + im }), NOTHING);
  switch (output.of) {
    case 'voltage':
      return {
        outputs: [
          output.over === undefined
            ? { quantity: 'voltage', node: output.node }
            : { quantity: 'voltageBetween', nodes: [output.node, output.over] },
        ],
        value: first,
      };
    case 'sum':
      return { outputs: output.nodes.map((node) => ({ quantity: 'voltage', node })), value: sum };
    case 'ratio':
      return {
        outputs: [
          {
            quantity: 'ratio',
            of: { quantity: 'voltage', node: output.node },
            to: { quantity: 'voltage', node: output.to },
          },
        ],
        value: first,
      };
    case 'current':
    case 'elementVoltage':
      return { outputs: [{ quantity: output.of, element: output.element }], value: first };
    case 'power':
      return { outputs: output.elements.map((element) => ({ quantity: 'power', element })), value: sum };
    case 'impedance':
      return { outputs: [{ quantity: 'impedance', nodes: [output.node, output.over ?? '0'] }], value: first };
    case 'impedanceSeen':
      return {
        outputs: [
          {
            quantity: 'ratio',
            of: { quantity: 'elementVoltage', element: output.element },
            to: { quantity: 'current', element: output.element },
          },
        ],
        // The current of a source enters it.
        value: (of) => difference(NOTHING, first(of)),
      };
    case 'powerShare':
    case 'reflection':
    case 'insertion':
      return undefined;
  }
}

function outputsOf({ output }: SweptFigure): readonly SweepOutput[] {
  return sweptAs(output)?.outputs ?? [];
}

function frequenciesOf(figure: SweptFigure): readonly number[] {
  const against = figure.kind === 'reading' ? figure.against : undefined;
  return typeof against === 'object' ? [figure.frequency, against.frequency] : [figure.frequency];
}

/** What a sweep of all frequencies answers for a figure's output at one of them. */
function measured(elements: readonly Element[], figures: readonly SweptFigure[]): (figure: SweptFigure, frequency: number) => ComplexLike {
  const frequencies = [...new Set(figures.flatMap(frequenciesOf))].sort((a, b) => a - b);
  const found = sweep(network(...elements), { frequencies, outputs: figures.flatMap(outputsOf) });
  if (!found.ok) throw new Error(found.message);
  const traces = new Map<SweptFigure, readonly SweepTrace[]>();
  let next = 0;
  for (const figure of figures) {
    const count = outputsOf(figure).length;
    traces.set(figure, found.traces.slice(next, next + count));
    next += count;
  }
  return (figure, frequency) => {
    const place = frequencies.indexOf(frequency);
    const parts = (traces.get(figure) ?? []).map(({ re, im, determined }): ComplexLike => {
      expect(determined[place]).toBe(1);
      return { re: re[place] ?? NaN, im: im[place] ?? NaN };
    });
    return sweptAs(figure.output)?.value(parts) ?? NOTHING;
  };
}

const CASES = figuresOf<SweptFigure>(['reading', 'phasor', 'exact']).flatMap(([title, circuit, figures]) => {
  const swept = figures.filter(([, figure]) => sweptAs(figure.output) !== undefined);
  return swept.length === 0 ? [] : [[title, circuit, swept] as const];
});

describe.each(CASES)('%s', (_title, { elements }, figures) => {
  const valueOf = measured(elements, figures.map(([, figure]) => figure));

  it.each(figures)('%s', (_words, figure) => {
    const value = valueOf(figure, figure.frequency);
    switch (figure.kind) {
      case 'reading': {
        const { against = 1 } = figure;
        const size = typeof against === 'number' ? against : magnitude(valueOf(figure, against.frequency));
        if (figure.read === 'degrees') expectAngle(read(value, figure.read, size), figure);
        else expectPrinted(read(value, figure.read, size), figure);
        break;
      }
      case 'phasor':
        expectPhasor(value, figure);
        break;
      case 'exact': {
        const off = magnitude(difference(value, figure.value));
        expect(off / (magnitude(figure.value) || 1)).toBeLessThanOrEqual(figure.units * Number.EPSILON);
      }
    }
  });
});
