import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Element, ElementList, Solution } from '@/solver';
import { solve } from '@/solver';
import { EVERY, FREQUENCY, networks, PASSIVE, RECIPROCAL } from './support/arbitrary-networks';
import type { ComplexLike } from './support/expect';

/*
 * What holds of every linear network, whatever its elements and values, over random ones. Differences are measured in
 * units of ε·(1 + condition) of the largest quantity of their kind in the network.
 */

const RUNS = { numRuns: 300, seed: 20261201 };
const UNITS = 20;

/** Solutions that are complete and not near to having no unique one; the share of those is held to below. */
function solvable(list: ElementList): Solution {
  const answer = solve(list, { frequency: FREQUENCY });
  fc.pre(answer.ok && answer.problems.length === 0 && (answer.condition ?? Infinity) < 1e5);
  if (!answer.ok) throw new Error('passed by');
  return answer;
}

function nodesOf(list: ElementList): string[] {
  return [...new Set(list.elements.flatMap(({ nodes }) => nodes))];
}

function largestVoltage(list: ElementList, solution: Solution): number {
  return Math.max(...nodesOf(list).map((node) => solution.voltage(node)?.abs() ?? 0));
}

function largestCurrent(list: ElementList, solution: Solution): number {
  return Math.max(...list.elements.map(({ id }) => solution.current(id)?.abs() ?? 0));
}

function expectSame(a: ComplexLike | undefined, b: ComplexLike | undefined, scale: number, condition: number): void {
  if (a === undefined || b === undefined) throw new Error('not determined');
  const off = Math.hypot(a.re - b.re, a.im - b.im);
  expect(off).toBeLessThanOrEqual(UNITS * Number.EPSILON * (1 + condition) * scale);
}

/** Holds two solutions of networks with the same names to each other, the second one's times a factor. */
function expectSameReadings(list: ElementList, one: Solution, other: Solution, voltageTimes = 1, currentTimes = 1): void {
  const condition = Math.max(one.condition ?? 1, other.condition ?? 1);
  const volts = largestVoltage(list, one);
  const amperes = largestCurrent(list, one);
  for (const node of nodesOf(list)) {
    expectSame(one.voltage(node), other.voltage(node)?.mul(voltageTimes), volts, condition);
  }
  for (const { id } of list.elements) {
    expectSame(one.current(id), other.current(id)?.mul(currentTimes), amperes, condition);
  }
}

function mapSources(list: ElementList, change: (id: string, rms: number) => number): ElementList {
  return {
    version: 1,
    elements: list.elements.map((element): Element =>
      element.kind === 'voltageSource' || element.kind === 'currentSource'
        ? { ...element, value: { ...element.value, rms: change(element.id, element.value.rms) } }
        : element,
    ),
  };
}

describe('every linear network', () => {
  it('is mostly solvable as these are drawn, so that what follows says something', () => {
    const counts = { solved: 0, of: 0 };
    fc.assert(
      fc.property(networks({ kinds: EVERY }), (list) => {
        const answer = solve(list, { frequency: FREQUENCY });
        counts.of += 1;
        if (answer.ok && answer.problems.length === 0 && (answer.condition ?? Infinity) < 1e5) counts.solved += 1;
      }),
      RUNS,
    );
    expect(counts.solved / counts.of).toBeGreaterThan(0.7);
  });

  it('answers with finite numbers or a problem in words, and never throws', () => {
    fc.assert(
      fc.property(networks({ kinds: EVERY, decades: 12, sources: 3 }), fc.constantFrom(0, 1e-6, 50, FREQUENCY, 1e9), (list, frequency) => {
        const answer = solve(list, { frequency });
        if (!answer.ok) {
          expect(answer.message.length).toBeGreaterThan(10);
          return;
        }
        for (const node of nodesOf(list)) {
          const value = answer.voltage(node);
          if (value !== undefined) expect(Number.isFinite(value.re) && Number.isFinite(value.im)).toBe(true);
        }
        for (const { id } of list.elements) {
          const value = answer.current(id);
          if (value !== undefined) expect(Number.isFinite(value.re) && Number.isFinite(value.im)).toBe(true);
        }
      }),
      RUNS,
    );
  });

  it('balances: the sum of V·I* over all elements is zero (Tellegen 1952)', () => {
    fc.assert(
      fc.property(networks({ kinds: EVERY, sources: 2 }), (list) => {
        const { balance, condition = 1 } = solvable(list);
        expect(balance.sum.abs()).toBeLessThanOrEqual(UNITS * Number.EPSILON * (1 + condition) * balance.scale);
      }),
      RUNS,
    );
  });

  it('is linear: sources three times as large give three times everything', () => {
    fc.assert(
      fc.property(networks({ kinds: EVERY, sources: 2 }), (list) => {
        const one = solvable(list);
        const three = solvable(mapSources(list, (_id, rms) => 3 * rms));
        expectSameReadings(list, one, three, 1 / 3, 1 / 3);
      }),
      RUNS,
    );
  });

  it('superposes: the effects of its sources one by one add up', () => {
    fc.assert(
      fc.property(networks({ kinds: EVERY, sources: 3 }), (list) => {
        const all = solvable(list);
        const sources = list.elements.filter(({ kind }) => kind === 'voltageSource' || kind === 'currentSource');
        const parts = sources.map(({ id: live }) => solvable(mapSources(list, (id, rms) => (id === live ? rms : 0))));
        const scale = Math.max(...parts.map((part) => largestVoltage(list, part)));
        for (const node of nodesOf(list)) {
          const sum = parts.reduce(
            (total, part) => {
              const value = part.voltage(node);
              return { re: total.re + (value?.re ?? NaN), im: total.im + (value?.im ?? NaN) };
            },
            { re: 0, im: 0 },
          );
          expectSame(all.voltage(node), sum, scale, all.condition ?? 1);
        }
      }),
      RUNS,
    );
  });

  it('does not depend on how nodes are named and in which order elements come', () => {
    fc.assert(
      fc.property(networks({ kinds: EVERY, sources: 2 }), (list) => {
        const one = solvable(list);
        const renamed = (node: string): string => (node === '0' ? '0' : `n${97 - Number(node)}`);
        const turned: ElementList = {
          version: 1,
          elements: list.elements.toReversed().map((element) => ({ ...element, nodes: element.nodes.map(renamed) }) as Element),
        };
        const other = solvable(turned);
        const condition = Math.max(one.condition ?? 1, other.condition ?? 1);
        for (const node of nodesOf(list)) {
          expectSame(one.voltage(node), other.voltage(renamed(node)), largestVoltage(list, one), condition);
        }
        for (const { id } of list.elements) {
          expectSame(one.current(id), other.current(id), largestCurrent(list, one), condition);
        }
      }),
      RUNS,
    );
  });
});

describe('networks without controlled sources', () => {
  it('are reciprocal: a current here drives the voltage there that the same current there drives here', () => {
    fc.assert(
      fc.property(networks({ kinds: RECIPROCAL }), fc.nat(), fc.nat(), (list, p, q) => {
        const nodes = nodesOf(list).filter((node) => node !== '0');
        const [one, other] = [nodes[p % nodes.length] ?? '1', nodes[q % nodes.length] ?? '1'];
        const quiet = mapSources(list, () => 0);
        const driven = (at: string): ElementList => ({
          version: 1,
          elements: [
            ...quiet.elements,
            { id: 'IS', kind: 'currentSource', nodes: ['0', at], value: { rms: 1, phase: 0, frequency: null } },
          ],
        });
        const there = solvable(driven(one));
        const here = solvable(driven(other));
        const scale = Math.max(largestVoltage(list, there), largestVoltage(list, here));
        expectSame(there.voltage(other), here.voltage(one), scale, Math.max(there.condition ?? 1, here.condition ?? 1));
      }),
      RUNS,
    );
  });

  it('are passive: a source into one never takes power out in the mean', () => {
    fc.assert(
      fc.property(networks({ kinds: RECIPROCAL }), (list) => {
        const solution = solvable(list);
        const { re = NaN } = solution.power('VS1') ?? {};
        expect(re).toBeLessThanOrEqual(UNITS * Number.EPSILON * (1 + (solution.condition ?? 1)) * solution.balance.scale);
      }),
      RUNS,
    );
  });

  it('keep their voltages when all impedances grow together, and their currents shrink as much', () => {
    fc.assert(
      fc.property(networks({ kinds: PASSIVE }), fc.double({ min: 0.001, max: 1000, noNaN: true }), (list, times) => {
        const scaled: ElementList = { version: 1, elements: list.elements.map((element) => scaleImpedance(element, times)) };
        expectSameReadings(list, solvable(list), solvable(scaled), 1, times);
      }),
      RUNS,
    );
  });

  it('are the same at another frequency when their inductances and capacitances shrink as it grows', () => {
    fc.assert(
      fc.property(
        networks({ kinds: ['resistor', 'capacitor', 'inductor', 'coupledInductors', 'idealTransformer'] }),
        fc.double({ min: 0.001, max: 100, noNaN: true }),
        (list, times) => {
          const one = solvable(list);
          const scaled = solve({ version: 1, elements: list.elements.map((element) => scaleFrequency(element, times)) }, { frequency: FREQUENCY * times });
          if (!scaled.ok) throw new Error(scaled.message);
          expectSameReadings(list, one, scaled);
        },
      ),
      RUNS,
    );
  });
});

function scaleImpedance(element: Element, times: number): Element {
  switch (element.kind) {
    case 'resistor':
      return { ...element, resistance: element.resistance * times };
    case 'inductor':
      return { ...element, inductance: element.inductance * times };
    case 'capacitor':
      return { ...element, capacitance: element.capacitance / times };
    case 'impedance':
      return {
        ...element,
        points: element.points.map(({ frequency, resistance, reactance }) => ({
          frequency,
          resistance: resistance * times,
          reactance: reactance * times,
        })),
      };
    default:
      return element;
  }
}

function scaleFrequency(element: Element, times: number): Element {
  switch (element.kind) {
    case 'inductor':
      return { ...element, inductance: element.inductance / times };
    case 'capacitor':
      return { ...element, capacitance: element.capacitance / times };
    case 'coupledInductors':
      return { ...element, inductances: element.inductances.map((inductance) => inductance / times) };
    case 'impedance':
      return {
        ...element,
        points: element.points.map((point) => ({ ...point, frequency: point.frequency * times })),
      };
    default:
      return element;
  }
}
