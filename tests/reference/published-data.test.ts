import { describe, expect, it } from 'vitest';
import { validateElementList } from '@/solver';
import { network } from '../solver/support/networks';
import { CIRCUITS } from './data/circuits';
import { PROBLEM_CASES } from './data/problem-cases';
import { nodesOf } from './support/random-elements';
import type { Output } from './support/records';

/** The data itself: whole, valid, and every figure of something that is there. */

/** The starters of the library that have figures. */
const STARTERS = [
  1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12, 13, 14, 15, 17, 18, 19, 20, 21, 22, 23, 24, 25, 26, 28, 29, 30, 31, 32, 33, 34,
  35, 37, 38, 40, 41, 42, 43, 45, 46, 49, 50,
];

/** The names of nodes and elements that an output speaks of. */
function namesIn(output: Output): { readonly nodes: readonly string[]; readonly elements: readonly string[] } {
  switch (output.of) {
    case 'voltage':
    case 'impedance':
      return { nodes: [output.node, output.over ?? '0'], elements: [] };
    case 'sum':
      return { nodes: output.nodes, elements: [] };
    case 'ratio':
      return { nodes: [output.node, output.to], elements: [] };
    case 'insertion':
      return { nodes: [output.from, output.to], elements: [] };
    case 'current':
    case 'elementVoltage':
    case 'impedanceSeen':
      return { nodes: [], elements: [output.element] };
    case 'power':
      return { nodes: [], elements: output.elements };
    case 'powerShare':
      return { nodes: [], elements: [output.element, output.source] };
    case 'reflection':
      return { nodes: [], elements: [output.source] };
  }
}

describe('the published networks', () => {
  it('have every starter among them, and no name twice', () => {
    const ids = CIRCUITS.map(({ id }) => id);
    expect(new Set(ids).size).toBe(ids.length);
    const numbers = new Set(ids.flatMap((id) => /^ST-(\d+)/.exec(id)?.slice(1).map(Number) ?? []));
    expect([...numbers].sort((a, b) => a - b)).toEqual(STARTERS);
  });

  it.each(CIRCUITS.map((circuit) => [circuit.id, circuit] as const))('%s has figures of what is in it', (_id, circuit) => {
    expect(validateElementList(network(...circuit.elements))).toMatchObject({ ok: true });
    expect(circuit.figures.length).toBeGreaterThan(0);
    expect(circuit.source).not.toBe('');
    const nodes = ['0', ...nodesOf(circuit.elements)];
    const elements = circuit.elements.map(({ id }) => id);
    for (const figure of circuit.figures) {
      if (!('output' in figure)) continue;
      const names = namesIn(figure.output);
      expect(nodes).toEqual(expect.arrayContaining([...names.nodes]));
      expect(elements).toEqual(expect.arrayContaining([...names.elements]));
    }
  });
});

describe('the networks to be diagnosed', () => {
  it('are told apart, each with a problem or with figures', () => {
    expect(new Set(PROBLEM_CASES.map(({ id }) => id)).size).toBe(PROBLEM_CASES.length);
    for (const { problem, figures } of PROBLEM_CASES) expect(problem !== undefined || figures.length > 0).toBe(true);
    const letters = new Set(PROBLEM_CASES.map(({ id }) => id.split(' ')[0]));
    for (const letter of 'abcdefghijk') expect(letters).toContain(letter);
  });
});
