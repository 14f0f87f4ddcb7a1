import { describe, expect, it } from 'vitest';
import { solve } from '@/solver';
import { solved } from './support/expect';
import { capacitor, currentSource, inductor, network, resistor, voltageSource } from './support/networks';

/** A current that can only be nothing must be nothing, or its rounding shows as a reading with a phase. */
describe('what carries no current', () => {
  it('is exactly nothing behind an element that lies in no loop, and everything there is at one voltage', () => {
    const list = network(
      voltageSource('V1', '1', '0', 1),
      resistor('R1', '1', '2', 1000),
      capacitor('C1', '2', '3', 1e-7),
      // Two in parallel at the end of the chain: a loop, but one that nothing drives.
      resistor('R2', '3', '4', 330),
      resistor('R3', '3', '4', 470),
    );
    const solution = solved(solve(list, { frequency: 50 }));
    for (const id of ['V1', 'R1', 'C1', 'R2', 'R3']) expect(solution.current(id)).toMatchObject({ re: 0, im: 0 });
    for (const id of ['R1', 'C1', 'R2', 'R3']) expect(solution.elementVoltage(id)).toMatchObject({ re: 0, im: 0 });
    expect(solution.balance).toMatchObject({ scale: 0, sum: { re: 0, im: 0 } });
  });

  it('is so in an island without a reference too', () => {
    const list = network(
      voltageSource('V1', '7', '8', 1),
      capacitor('C1', '2', '8', 1e-7),
      resistor('R1', '1', '2', 1000),
      resistor('R4', '1', '2', 1000),
      resistor('R5', '11', '7', 1000),
    );
    const solution = solved(solve(list, { frequency: 50 }));
    for (const id of ['V1', 'C1', 'R1', 'R4', 'R5']) expect(solution.current(id)).toMatchObject({ re: 0, im: 0 });
    expect(solution.balance.scale).toBe(0);
  });

  it('leaves what a source drives as it is, on both sides of a node that joins two loops', () => {
    const list = network(
      voltageSource('V1', '1', '0', 2),
      resistor('R1', '1', '0', 4),
      resistor('R2', '1', '2', 8),
      voltageSource('V2', '2', '1', 16),
      resistor('R3', '2', '5', 1),
    );
    const solution = solved(solve(list, { frequency: 50 }));
    expect(solution.current('R1')).toMatchObject({ re: 0.5, im: 0 });
    expect(solution.current('R2')).toMatchObject({ re: -2, im: 0 });
    expect(solution.current('R3')).toMatchObject({ re: 0, im: 0 });
    expect(solution.voltage('5')).toMatchObject({ re: 18, im: 0 });
  });

  it('does not hide that a lossless loop at its own resonance may carry any current', () => {
    const list = network(
      voltageSource('V1', '1', '0', 1),
      resistor('R1', '1', '2', 10),
      inductor('L1', '2', '3', 1),
      capacitor('C1', '2', '3', 1 / (4 * Math.PI ** 2)),
    );
    const answer = solve(list, { frequency: 1 });
    const solution = solved(answer);
    expect(solution.problems.map(({ kind }) => kind)).toContain('resonance');
    expect(solution.current('L1')).toBeUndefined();
  });

  it('concludes nothing where a given current has no way on, since Kirchhoff’s law does not hold there', () => {
    const list = network(
      resistor('R1', '1', '0', 1000),
      currentSource('I1', '2', '3', 1),
      voltageSource('V1', '4', '2', 1),
      currentSource('I2', '1', '2', 1),
    );
    const solution = solved(solve(list, { frequency: 1000 }));
    expect(solution.problems.length).toBeGreaterThan(0);
    expect(solution.current('R1')).toMatchObject({ re: -1, im: 0 });
  });
});
