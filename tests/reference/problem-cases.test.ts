import { describe, expect, it } from 'vitest';
import type { Problem } from '@/solver';
import { polesAndZeros, solve } from '@/solver';
import { solved, unsolved } from '../solver/support/expect';
import { network } from '../solver/support/networks';
import type { ProblemCase } from './data/problem-cases';
import { PROBLEM_CASES } from './data/problem-cases';
import { expectPrinted } from './support/expect-figure';
import { readingOf } from './support/measure';

function expectProblem(problem: Problem | undefined, expected: NonNullable<ProblemCase['problem']>): void {
  expect(problem?.kind).toBe(expected.kind);
  const message = problem?.message ?? '';
  if (expected.kind === 'invalid') {
    // A list that is refused is refused in words.
    for (const element of expected.elements) expect(message).toContain(element);
    expect(problem?.elements).toEqual(expected.elements);
  } else {
    expect([...(problem?.elements ?? [])].sort()).toEqual([...expected.elements].sort());
    expect([...(problem?.nodes ?? [])].sort()).toEqual([...expected.nodes].sort());
  }
  expect(message).toMatch(expected.words);
  // One or two sentences, each ended.
  expect(message).toMatch(/^[A-Z].*\.$/);
  expect(message.split(/\. (?=[A-Z])/).length).toBeLessThanOrEqual(2);
}

describe('networks that have to be diagnosed', () => {
  it.each(PROBLEM_CASES.map((one) => [`(${one.id}) ${one.title}`, one] as const))('%s', (_title, one) => {
    const { elements, frequency, problem, isSolved, figures, undetermined } = one;
    const answer = solve(network(...elements), { frequency });
    if (!isSolved) {
      if (problem === undefined) throw new Error('a network that is not solved has a problem');
      expectProblem(unsolved(answer), problem);
      return;
    }
    const solution = solved(answer);
    expect(solution.problems).toHaveLength(problem === undefined ? 0 : 1);
    if (problem !== undefined) expectProblem(solution.problems[0], problem);
    for (const figure of figures) expectPrinted(readingOf(elements, figure)(figure.frequency), figure);
    for (const node of undetermined?.voltages ?? []) expect(solution.voltage(node), node).toBeUndefined();
    for (const element of undetermined?.currents ?? []) expect(solution.current(element), element).toBeUndefined();
  });
});

/** (g): what grows without bound at its resonance has poles on the imaginary axis, there. */
describe('a lossless circuit', () => {
  it.each(['g series', 'g parallel'])('(%s) has its poles on the imaginary axis', (wanted) => {
    const one = PROBLEM_CASES.find(({ id }) => id === wanted);
    const [source] = one?.elements ?? [];
    if (one === undefined || source === undefined) throw new Error('no such case');
    const list = network(...one.elements);
    const found = polesAndZeros(list, {
      kind: 'transfer',
      source: source.id,
      output: { quantity: 'voltage', node: wanted === 'g series' ? '2' : '1' },
    });
    if (!found.ok) throw new Error(found.message);
    expect(found.stability).toBe('marginal');
    expect(found.poles).toHaveLength(2);
    for (const { s, frequency, uncertainty } of found.poles) {
      expect(Math.abs(s.re)).toBeLessThanOrEqual(8 * uncertainty);
      expect(Math.abs(frequency / one.frequency - 1)).toBeLessThanOrEqual(1e-12);
    }
  });
});
