import { buildNetwork } from '@/canvas/network/network';
import { magnitude, quotient, type Phasor } from '@/canvas/network/phasor';
import type { SheetDocument } from '@/canvas/document/types';
import { solve, type Element } from '@/solver';

/** New numbers for elements, by id: `{ C1: { capacitance: 0 } }` takes C1 out. */
export type Change = Readonly<Record<string, object>>;

export type Solved = {
  readonly v: (node: string) => Phasor;
  readonly i: (element: string) => Phasor;
  readonly across: (element: string) => Phasor;
  readonly s: (element: string) => Phasor;
};

const lists = new WeakMap<SheetDocument, readonly Element[]>();

function elementsOf(sheet: SheetDocument): readonly Element[] {
  const known = lists.get(sheet);
  if (known) return known;
  const { elements } = buildNetwork(sheet).list;
  lists.set(sheet, elements);
  return elements;
}

/** Solves a sheet's network at a frequency in hertz, with some elements changed. Throws where it cannot be solved. */
export function solved(sheet: SheetDocument, frequency: number, change: Change = {}): Solved {
  const elements = elementsOf(sheet).map((element) => ({ ...element, ...change[element.id] }) as Element);
  const answer = solve({ version: 1, elements }, { frequency });
  if (!answer.ok) throw new Error(answer.message);
  if (answer.problems.length > 0) throw new Error(answer.problems.map(({ message }) => message).join(' '));
  const found = (value: Phasor | undefined, what: string): Phasor => {
    if (!value) throw new Error(`${what} is not determined`);
    return value;
  };
  return {
    v: (node) => found(answer.voltage(node), `node ${node}`),
    i: (element) => found(answer.current(element), `the current of ${element}`),
    across: (element) => found(answer.elementVoltage(element), `the voltage of ${element}`),
    s: (element) => found(answer.power(element), `the power of ${element}`),
  };
}

export function decibels(ratio: number): number {
  return 20 * Math.log10(ratio);
}

/** |a / b| in decibels. */
export function level(a: Phasor, b: Phasor): number {
  return decibels(magnitude(a) / magnitude(b));
}

/** Return loss of an impedance against a real reference, dB. */
export function returnLoss(impedance: Phasor, reference: number): number {
  const { re, im } = impedance;
  return -decibels(magnitude(quotient({ re: re - reference, im }, { re: re + reference, im })));
}

/** The frequency between two others at which a function crosses zero, by bisection on a logarithmic axis. */
export function crossing(of: (frequency: number) => number, from: number, to: number): number {
  let [low, high] = [from, to];
  const sign = Math.sign(of(low));
  if (Math.sign(of(high)) === sign) throw new Error('the function does not change its sign between these frequencies');
  for (let step = 0; step < 50; step += 1) {
    const middle = Math.sqrt(low * high);
    if (Math.sign(of(middle)) === sign) low = middle;
    else high = middle;
  }
  return Math.sqrt(low * high);
}

/** Where a function is greatest on a logarithmic axis: looked for in steps of 2 %, then ever closer round the best. */
export function greatest(of: (frequency: number) => number, from: number, to: number): { readonly at: number; readonly value: number } {
  let best = { at: from, value: of(from) };
  let [low, high, ratio] = [from, to, 1.02];
  while (ratio > 1 + 1e-7) {
    for (let at = low; at <= high; at *= ratio) {
      const value = of(at);
      if (value > best.value) best = { at, value };
    }
    low = Math.max(from, best.at / ratio);
    high = Math.min(to, best.at * ratio);
    ratio = 1 + (ratio - 1) / 10;
  }
  return best;
}
