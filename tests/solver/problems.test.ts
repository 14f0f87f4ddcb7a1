import { describe, expect, it } from 'vitest';
import type { Element, Problem, ProblemKind } from '@/solver';
import { solve } from '@/solver';
import { expectClose, solved, unsolved } from './support/expect';
import { capacitor, currentSource, inductor, network, resistor, voltageSource } from './support/networks';

/** The one problem of a network that is otherwise solved. */
function onlyProblem(elements: readonly Element[], frequency: number): Problem {
  const { problems } = solved(solve(network(...elements), { frequency }));
  expect(problems).toHaveLength(1);
  const [problem] = problems;
  if (problem === undefined) throw new Error('no problem');
  return problem;
}

function expectProblem(
  problem: Problem,
  kind: ProblemKind,
  elements: readonly string[],
  nodes: readonly string[],
  words: RegExp,
): void {
  expect(problem).toMatchObject({ ok: false, kind });
  expect([...problem.elements].sort()).toEqual([...elements].sort());
  expect([...problem.nodes].sort()).toEqual([...nodes].sort());
  expect(problem.message).toMatch(words);
  // One or two sentences, each ended.
  expect(problem.message).toMatch(/^[A-Z].*\.$/);
  expect(problem.message.split(/\. (?=[A-Z])/).length).toBeLessThanOrEqual(2);
}

const rest = [voltageSource('V9', '9', '0', 10), resistor('R9', '9', '0', 5)];

describe('no reference node', () => {
  it('leaves node voltages open, and still has currents, powers and element voltages', () => {
    const list = network(voltageSource('V1', 'a', 'b', 10), resistor('R1', 'a', 'b', 5));
    const solution = solved(solve(list, { frequency: 50 }));
    expectProblem(solution.problems[0] ?? unsolved(solution), 'noReference', ['V1', 'R1'], ['a', 'b'], /reference/);
    expect(solution.voltage('a')).toBeUndefined();
    expectClose(solution.current('R1'), { re: 2, im: 0 }, 1);
    expectClose(solution.power('R1'), { re: 20, im: 0 }, 2);
    expectClose(solution.elementVoltage('R1'), { re: 10, im: 0 }, 1);
  });

  it('does not keep the rest from being solved', () => {
    const list = network(...rest, voltageSource('V1', 'a', 'b', 10), resistor('R1', 'a', 'b', 5));
    const solution = solved(solve(list, { frequency: 50 }));
    expect(solution.problems.map(({ kind }) => kind)).toEqual(['noReference']);
    expectClose(solution.current('R9'), { re: 2, im: 0 }, 1);
    expectClose(solution.current('R1'), { re: 2, im: 0 }, 1);
  });

  it('is said once for an island of several parts', () => {
    const list = network(
      ...rest,
      voltageSource('V1', 'a', 'b', 10),
      resistor('R1', 'b', 'c', 5),
      capacitor('C1', 'c', 'a', 1e-6),
    );
    const solution = solved(solve(list, { frequency: 0 }));
    expect(solution.problems.map(({ kind }) => kind)).toEqual(['noReference']);
    expect(solution.current('C1')).toMatchObject({ re: 0, im: 0 });
  });
});

describe('floating nodes', () => {
  it('finds the node between two capacitors at 0 Hz, and solves the rest', () => {
    const parts = [...rest, capacitor('C1', '9', 'x', 1e-6), capacitor('C2', 'x', '0', 1e-6)];
    expectProblem(onlyProblem(parts, 0), 'floatingNode', ['C1', 'C2'], ['x'], /open at 0 Hz/);
    const solution = solved(solve(network(...parts), { frequency: 0 }));
    expect(solution.voltage('x')).toBeUndefined();
    expect(solution.elementVoltage('C1')).toBeUndefined();
    expect(solution.current('C1')).toMatchObject({ re: 0, im: 0 });
    expectClose(solution.current('R9'), { re: 2, im: 0 }, 1);
    expect(solved(solve(network(...parts), { frequency: 1 })).problems).toEqual([]);
  });

  it('finds the far end of a dangling capacitor at 0 Hz, and of one of 0 F', () => {
    expectProblem(
      onlyProblem([...rest, capacitor('C1', '9', 'x', 1e-6)], 0),
      'floatingNode',
      ['C1'],
      ['x'],
      /Only C1 \(open at 0 Hz\) leads/,
    );
    expectProblem(onlyProblem([...rest, capacitor('C1', '9', 'x', 0)], 50), 'floatingNode', ['C1'], ['x'], /0 F/);
  });

  it('finds a current source into an open node, and what its current would enter is not solved', () => {
    const alone = unsolved(solve(network(currentSource('I1', '0', 'x', 1)), { frequency: 50 }));
    expectProblem(alone, 'floatingNode', ['I1'], ['x'], /no way on from node x/);
    const parts = [...rest, resistor('R1', '9', 'y', 1), resistor('R2', 'y', '0', 1), currentSource('I1', 'y', 'x', 1)];
    expect(unsolved(solve(network(...parts), { frequency: 50 }))).toMatchObject({
      kind: 'floatingNode',
      elements: ['I1'],
    });
    const grounded = solved(solve(network(...rest, currentSource('I1', '0', 'x', 1)), { frequency: 50 }));
    expectClose(grounded.current('R9'), { re: 2, im: 0 }, 1);
    expect(grounded.current('I1')).toBeUndefined();
  });

  it('leaves a floating part its own currents', () => {
    const parts = [
      ...rest,
      capacitor('C1', '9', 'a', 1e-6),
      voltageSource('V1', 'a', 'b', 6),
      resistor('R1', 'a', 'b', 3),
    ];
    const solution = solved(solve(network(...parts), { frequency: 0 }));
    expect(solution.problems.map(({ kind }) => kind)).toEqual(['floatingNode']);
    expectClose(solution.current('R1'), { re: 2, im: 0 }, 1);
    expect(solution.voltage('a')).toBeUndefined();
  });

  it('has no current in a dangling impedance, and its far node at the same voltage', () => {
    const parts = [...rest, resistor('R1', '9', 'x', 100), inductor('L1', 'x', 'y', 1e-3)];
    const solution = solved(solve(network(...parts), { frequency: 50 }));
    expect(solution.problems).toEqual([]);
    expect(solution.current('R1')).toMatchObject({ re: 0, im: 0 });
    expect(solution.voltage('y')).toMatchObject({ re: 10, im: 0 });
  });
});

describe('loops of given voltages', () => {
  it('says of equal sources in parallel that their currents are not determined, and solves the rest', () => {
    const parts = [...rest, voltageSource('V1', '9', '0', 10)];
    expectProblem(onlyProblem(parts, 50), 'voltageLoop', ['V9', 'V1'], ['9', '0'], /not determined/);
    const solution = solved(solve(network(...parts), { frequency: 50 }));
    expect(solution.current('V1')).toBeUndefined();
    expect(solution.current('V9')).toBeUndefined();
    expect(solution.voltage('9')).toMatchObject({ re: 10, im: 0 });
    expectClose(solution.current('R9'), { re: 2, im: 0 }, 1);
    expect(Math.abs(solution.balance.sum.re)).toBeLessThanOrEqual(4 * Number.EPSILON * solution.balance.scale);
  });

  it('says of unequal sources in parallel that there is no solution', () => {
    const problem = unsolved(solve(network(...rest, voltageSource('V1', '9', '0', 11)), { frequency: 50 }));
    expectProblem(problem, 'voltageLoop', ['V9', 'V1'], ['9', '0'], /do not add up to zero/);
  });

  it('finds a loop of inductors and a source at 0 Hz, and not above it', () => {
    const parts = [
      voltageSource('V1', '1', '0', 10),
      inductor('L1', '1', '2', 1e-3),
      inductor('L2', '2', '0', 1e-3),
      resistor('R1', '2', '0', 1),
    ];
    const problem = unsolved(solve(network(...parts), { frequency: 0 }));
    expectProblem(
      problem,
      'voltageLoop',
      ['V1', 'L1', 'L2'],
      ['0', '1', '2'],
      /L1 \(an ideal connection at 0 Hz\).*short-circuits V1/,
    );
    expect(solved(solve(network(...parts), { frequency: 50 })).problems).toEqual([]);
  });

  it('leaves the current of a source outside the loop determined', () => {
    const parts = [
      voltageSource('V1', '1', '0', 10),
      resistor('R1', '1', '0', 5),
      resistor('Ra', '1', '2', 0),
      resistor('Rb', '1', '2', 0),
      resistor('R2', '2', '0', 10),
    ];
    const problem = onlyProblem(parts, 50);
    expectProblem(problem, 'voltageLoop', ['Ra', 'Rb'], ['1', '2'], /Ra \(0 Ω\) and Rb \(0 Ω\)/);
    const solution = solved(solve(network(...parts), { frequency: 50 }));
    expectClose(solution.current('V1'), { re: -3, im: 0 }, 2);
    expect(solution.current('Ra')).toBeUndefined();
    expect(solution.power('Ra')).toMatchObject({ re: 0, im: 0 });
  });

  it('says of a short-circuited source just that', () => {
    const problem = unsolved(
      solve(network(voltageSource('V1', '1', '1', 10), resistor('R1', '1', '0', 1)), { frequency: 50 }),
    );
    expectProblem(problem, 'voltageLoop', ['V1'], ['1'], /Voltage source V1 has both ends on node 1.*short/);
  });

  it('takes loops that agree but for rounding as agreeing', () => {
    const parts = [
      voltageSource('Va', '1', '0', 0.1),
      voltageSource('Vb', '2', '1', 0.2),
      voltageSource('Vc', '2', '0', 0.3),
      resistor('R1', '2', '0', 1),
    ];
    expect(onlyProblem(parts, 50).message).toMatch(/not determined/);
  });
});

describe('cut sets of current sources', () => {
  it('says of unequal current sources in series that there is no solution', () => {
    const parts = [currentSource('I1', '0', 'x', 1), currentSource('I2', 'x', 'y', 2), resistor('R1', 'y', '0', 1)];
    const problem = solved(solve(network(...parts, ...rest), { frequency: 50 })).problems[0];
    if (problem !== undefined) expectProblem(problem, 'currentCutSet', ['I1', 'I2'], ['x'], /do not add up to zero/);
    expect(problem).toBeDefined();
  });

  it('says of equal ones that the voltage between them is not determined, and solves the rest', () => {
    const parts = [currentSource('I1', '0', 'x', 2), currentSource('I2', 'x', 'y', 2), resistor('R1', 'y', '0', 3)];
    expectProblem(onlyProblem(parts, 50), 'currentCutSet', ['I1', 'I2'], ['x'], /not determined/);
    const solution = solved(solve(network(...parts), { frequency: 50 }));
    expectClose(solution.voltage('y'), { re: 6, im: 0 }, 1);
    expectClose(solution.current('I1'), { re: 2, im: 0 }, 0);
    expect(solution.voltage('x')).toBeUndefined();
    expect(solution.power('I1')).toBeUndefined();
    const { sum, scale } = solution.balance;
    expect(Math.hypot(sum.re, sum.im)).toBeLessThanOrEqual(4 * Number.EPSILON * scale);
  });
});

describe('resonance exactly at the drive', () => {
  const L = 1e-3;
  const C = 1e-6;
  const f0 = 1 / (2 * Math.PI * Math.sqrt(L * C));

  it('says that a lossless series circuit across a source has no bounded response', () => {
    const parts = [voltageSource('V1', '1', '0', 1), inductor('L1', '1', '2', L), capacitor('C1', '2', '0', C)];
    const problem = unsolved(solve(network(...parts), { frequency: f0 }));
    expectProblem(
      problem,
      'resonance',
      ['V1', 'L1', 'C1'],
      ['2'],
      /L1 and C1 resonate without loss.*grows without bound/,
    );
  });

  it('says that a lossless parallel circuit on a current source has no bounded response', () => {
    const parts = [currentSource('I1', '0', '1', 1), inductor('L1', '1', '0', L), capacitor('C1', '1', '0', C)];
    expectProblem(
      unsolved(solve(network(...parts), { frequency: f0 })),
      'resonance',
      ['L1', 'C1'],
      ['1'],
      /resonate without loss/,
    );
  });

  it('solves a lossless series circuit in series with a resistance: only its middle node cancels', () => {
    const parts = [
      voltageSource('V1', '1', '0', 10),
      inductor('L1', '1', '2', L),
      capacitor('C1', '2', '3', C),
      resistor('R1', '3', '0', 5),
    ];
    const solution = solved(solve(network(...parts), { frequency: f0 }));
    expect(solution.problems).toEqual([]);
    const impedance = Math.sqrt(L / C);
    expectClose(solution.current('R1'), { re: 2, im: 0 }, 64);
    expectClose(solution.voltage('2'), { re: 10, im: -2 * impedance }, 64);
  });

  it('solves a lossless parallel circuit in parallel with a resistance', () => {
    const parts = [
      currentSource('I1', '0', '1', 2),
      inductor('L1', '1', '0', L),
      capacitor('C1', '1', '0', C),
      resistor('R1', '1', '0', 50),
    ];
    expectClose(solved(solve(network(...parts), { frequency: f0 })).voltage('1'), { re: 100, im: 0 }, 64);
  });

  it('says that a tank nobody drives may oscillate, and solves the rest', () => {
    const parts = [...rest, inductor('L1', 'a', '0', L), capacitor('C1', 'a', '0', C)];
    const problem = onlyProblem(parts, f0);
    expectProblem(problem, 'resonance', ['L1', 'C1'], ['a'], /not determined by the sources/);
    const solution = solved(solve(network(...parts), { frequency: f0 }));
    expect(solution.voltage('a')).toBeUndefined();
    expectClose(solution.current('R9'), { re: 2, im: 0 }, 4);
    expect(solved(solve(network(...parts), { frequency: 1.01 * f0 })).problems).toEqual([]);
  });

  it('solves close beside the resonance with the accuracy that is left', () => {
    const parts = [voltageSource('V1', '1', '0', 1), inductor('L1', '1', '2', L), capacitor('C1', '2', '0', C)];
    for (const detuning of [1e-3, 1e-6, 1e-9]) {
      const frequency = f0 * (1 + detuning);
      const omega = 2 * Math.PI * frequency;
      const solution = solved(solve(network(...parts), { frequency }));
      // 1 − ω²LC, without the cancellation: ω²LC = (1 + d)², but for the rounding of f0.
      const exact = -1 / (detuning * (2 + detuning));
      const off = Math.abs((solution.voltage('2')?.re ?? 0) / exact - 1);
      expect(off).toBeLessThanOrEqual((8 * Number.EPSILON) / detuning);
      expect(solution.current('C1')?.im).toBeCloseTo(omega * C * (solution.voltage('2')?.re ?? 0), 6);
    }
  });
});

describe('other singular equations', () => {
  it('finds a resistance and its negative in parallel on a current source', () => {
    const parts = [currentSource('I1', '0', '1', 1), resistor('R1', '1', '0', 50), resistor('R2', '1', '0', -50)];
    expectProblem(
      unsolved(solve(network(...parts), { frequency: 50 })),
      'singular',
      ['R1', 'R2'],
      ['1'],
      /no unique solution/,
    );
  });

  it('sees cancellation that rounding hides: ten tenths against a whole', () => {
    const tenths = Array.from({ length: 10 }, (_, k) => resistor(`R${k}`, '1', '0', 10));
    const parts = [currentSource('I1', '0', '1', 1), ...tenths, resistor('N', '1', '0', -1)];
    expect(unsolved(solve(network(...parts), { frequency: 50 })).kind).toBe('singular');
  });
});

describe('values out of range', () => {
  it('names the element whose value cannot be computed with', () => {
    const parts = [voltageSource('V1', '1', '0', 1), resistor('R1', '1', '0', 1e-300)];
    expectProblem(
      unsolved(solve(network(...parts), { frequency: 50 })),
      'notFinite',
      ['R1'],
      ['1', '0'],
      /power of ten/,
    );
    const huge = [voltageSource('V1', '1', '0', 1e200), resistor('R1', '1', '0', 1)];
    expect(unsolved(solve(network(...huge), { frequency: 50 }))).toMatchObject({ kind: 'notFinite', elements: ['V1'] });
  });
});
