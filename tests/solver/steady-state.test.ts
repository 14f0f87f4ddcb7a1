import { Complex } from 'complex.js';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Element } from '@/solver';
import { solve } from '@/solver';
import { expectClose, polar, solved } from './support/expect';
import { capacitor, currentSource, inductor, network, resistor, voltageSource } from './support/networks';
import { Random } from './support/random';

describe('conventions', () => {
  it('counts a current positive into the first node, for a source too, and power as absorbed', () => {
    const list = network(voltageSource('V1', '1', '0', 10), resistor('R1', '1', '0', 5));
    const solution = solved(solve(list, { frequency: 50 }));
    expectClose(solution.current('R1'), { re: 2, im: 0 }, 1);
    expectClose(solution.current('V1'), { re: -2, im: 0 }, 1);
    expectClose(solution.power('R1'), { re: 20, im: 0 }, 2);
    expectClose(solution.power('V1'), { re: -20, im: 0 }, 2);
  });

  it('lets a current source’s current flow through it from its first node to its second', () => {
    const list = network(currentSource('I1', '0', '1', 2), resistor('R1', '1', '0', 5));
    const solution = solved(solve(list, { frequency: 50 }));
    expectClose(solution.voltage('1'), { re: 10, im: 0 }, 1);
    expectClose(solution.elementVoltage('I1'), { re: -10, im: 0 }, 1);
    expectClose(solution.power('I1'), { re: -20, im: 0 }, 2);
  });

  it('has the voltage and the power of a current source and an open circuit between parts that only the reference node joins', () => {
    const list = network(
      voltageSource('V1', '1', '0', 10),
      currentSource('I1', '1', '2', 2),
      currentSource('I2', '1', '2', 3, 0, 400),
      capacitor('C1', '1', '2', 0),
      resistor('R1', '2', '0', 3),
    );
    const solution = solved(solve(list, { frequency: 50 }));
    for (const id of ['I1', 'I2', 'C1']) expectClose(solution.elementVoltage(id), { re: 4, im: 0 }, 1);
    expectClose(solution.power('I1'), { re: 8, im: 0 }, 2);
    expect(solution.power('I2')).toMatchObject({ re: 0, im: 0 });
  });

  it('has a positive reactive power in an inductor and a negative one in a capacitor', () => {
    const list = network(
      voltageSource('V1', '1', '0', 10),
      inductor('L1', '1', '0', 0.1),
      capacitor('C1', '1', '0', 1e-5),
    );
    const solution = solved(solve(list, { frequency: 50 }));
    const omega = 100 * Math.PI;
    expectClose(solution.power('L1'), { re: 0, im: 100 / (omega * 0.1) }, 4);
    expectClose(solution.power('C1'), { re: 0, im: -100 * omega * 1e-5 }, 4);
  });

  it('takes 10 V peak across 50 Ω for 1 W, and 10 cos(ωt − 30°) for 7.0711∠−30° V', () => {
    const list = network(voltageSource('V1', '1', '0', 10 / Math.SQRT2, -30), resistor('R1', '1', '0', 50));
    const solution = solved(solve(list, { frequency: 1000 }));
    expectClose(solution.power('R1'), { re: 1, im: 0 }, 4);
    expectClose(solution.voltage('1'), polar(7.071067811865475, -30), 2);
  });

  it('holds given voltages to the last bit, quarter turns too', () => {
    const list = network(
      voltageSource('V1', '1', '0', 230, 90),
      voltageSource('V2', '2', '0', 0.1, 180),
      voltageSource('V3', '3', '2', 0.2, -90),
      resistor('R1', '1', '2', 3),
      resistor('R2', '3', '0', 7),
    );
    const solution = solved(solve(list, { frequency: 50 }));
    expect(solution.voltage('1')).toMatchObject({ re: 0, im: 230 });
    expect(solution.voltage('2')).toMatchObject({ re: -0.1, im: 0 });
    expect(solution.voltage('3')).toMatchObject({ re: -0.1, im: -0.2 });
    expect(solution.elementVoltage('V3')).toMatchObject({ re: 0, im: -0.2 });
    expect(solution.voltage('0')).toMatchObject({ re: 0, im: 0 });
  });

  it('does not answer for names that are not in the list', () => {
    const solution = solved(
      solve(network(voltageSource('V1', '1', '0', 1), resistor('R1', '1', '0', 1)), { frequency: 1 }),
    );
    expect(solution.voltage('7')).toBeUndefined();
    expect(solution.current('R7')).toBeUndefined();
    expect(solution.power('R7')).toBeUndefined();
    expect(solution.elementVoltage('R7')).toBeUndefined();
  });

  it('solves an empty list: the reference node is at 0 V', () => {
    const solution = solved(solve(network(), { frequency: 50 }));
    expect(solution.voltage('0')).toMatchObject({ re: 0, im: 0 });
    expect(solution).toMatchObject({ problems: [], residual: 0, balance: { scale: 0 } });
  });
});

describe('sources and their frequencies', () => {
  const list = network(
    voltageSource('V50', '1', '0', 10, 0, 50),
    resistor('R1', '1', '2', 10),
    currentSource('I100', '0', '2', 1, 0, 100),
    voltageSource('V', '3', '0', 4),
    resistor('R2', '2', '3', 10),
  );

  it('has a dead voltage source as an ideal connection and a dead current source open', () => {
    const at50 = solved(solve(list, { frequency: 50 }));
    expectClose(at50.voltage('2'), { re: 7, im: 0 }, 2);
    expect(at50.current('I100')).toMatchObject({ re: 0, im: 0 });
    const at100 = solved(solve(list, { frequency: 100 }));
    expectClose(at100.voltage('1'), { re: 0, im: 0 }, 0);
    expectClose(at100.voltage('2'), { re: 7, im: 0 }, 2);
    const at60 = solved(solve(list, { frequency: 60 }));
    expectClose(at60.voltage('2'), { re: 2, im: 0 }, 2);
    expect(at60.problems).toEqual([]);
  });

  it('knows its own frequency after a way through radians per second', () => {
    const frequency = ((50 * (2 * Math.PI)) / 2 / Math.PI) * (1 + Number.EPSILON);
    expectClose(solved(solve(list, { frequency })).voltage('1'), { re: 10, im: 0 }, 0);
  });

  it('has a real direct value, and the limit of an operating source, at 0 Hz', () => {
    const both = network(
      voltageSource('V1', '1', '0', 12, 60, 0),
      voltageSource('V2', '2', '0', 12, 90),
      resistor('R1', '1', '2', 1),
    );
    const solution = solved(solve(both, { frequency: 0 }));
    expectClose(solution.voltage('1'), { re: 6, im: 0 }, 2);
    expect(solution.voltage('2')).toMatchObject({ re: 0, im: 12 });
  });

  it('has a direct source at 0 Hz and nowhere else', () => {
    const direct = network(
      voltageSource('V1', '1', '0', 12, 0, 0),
      resistor('R1', '1', '2', 1),
      resistor('R2', '2', '0', 2),
    );
    expectClose(solved(solve(direct, { frequency: 0 })).voltage('2'), { re: 8, im: 0 }, 2);
    expectClose(solved(solve(direct, { frequency: 50 })).voltage('2'), { re: 0, im: 0 }, 0);
  });
});

describe('0 Hz and zero values', () => {
  it('has a capacitor open and an inductor closed at 0 Hz, exactly', () => {
    const list = network(
      voltageSource('V1', '1', '0', 9),
      inductor('L1', '1', '2', 1e-3),
      resistor('R1', '2', '3', 1000),
      capacitor('C1', '3', '0', 1e-6),
      resistor('R2', '3', '0', 2000),
    );
    const solution = solved(solve(list, { frequency: 0 }));
    expect(solution.voltage('2')).toMatchObject({ re: 9, im: 0 });
    expectClose(solution.voltage('3'), { re: 6, im: 0 }, 1);
    expectClose(solution.current('L1'), { re: 3e-3, im: 0 }, 2);
    expect(solution.current('C1')).toMatchObject({ re: 0, im: 0 });
    expect(solution.power('C1')).toMatchObject({ re: 0, im: 0 });
    expect(solution.problems).toEqual([]);
  });

  it('lets a zero resistance and a zero inductance carry the current that Kirchhoff’s law wants', () => {
    const list = network(
      voltageSource('V1', '1', '0', 6),
      resistor('R0', '1', '2', 0),
      inductor('L0', '2', '3', 0),
      resistor('R1', '3', '0', 2),
      resistor('R2', '2', '0', 3),
    );
    const solution = solved(solve(list, { frequency: 50 }));
    expectClose(solution.current('R0'), { re: 5, im: 0 }, 2);
    expectClose(solution.current('L0'), { re: 3, im: 0 }, 2);
    expectClose(solution.current('V1'), { re: -5, im: 0 }, 2);
    expect(solution.elementVoltage('R0')).toMatchObject({ re: 0, im: 0 });
    expect(solution.power('L0')).toMatchObject({ re: 0, im: 0 });
    expect(solution.problems).toEqual([]);
  });

  it('has a zero capacitance open', () => {
    const list = network(
      voltageSource('V1', '1', '0', 6),
      resistor('R1', '1', '2', 2),
      capacitor('C0', '2', '0', 0),
      resistor('R2', '2', '0', 1),
    );
    const solution = solved(solve(list, { frequency: 50 }));
    expectClose(solution.voltage('2'), { re: 2, im: 0 }, 1);
    expect(solution.current('C0')).toMatchObject({ re: 0, im: 0 });
  });

  it('solves negative values as they stand', () => {
    const list = network(voltageSource('V1', '1', '0', 6), resistor('R1', '1', '2', 3), resistor('R2', '2', '0', -1));
    expectClose(solved(solve(list, { frequency: 50 })).voltage('2'), { re: -3, im: 0 }, 2);
  });

  it('has no voltage and no current in an impedance with both ends on one node', () => {
    const list = network(voltageSource('V1', '1', '0', 6), resistor('R1', '1', '0', 3), resistor('R2', '1', '1', 5));
    const solution = solved(solve(list, { frequency: 50 }));
    expect(solution.current('R2')).toMatchObject({ re: 0, im: 0 });
    expect(solution.problems).toEqual([]);
  });
});

describe('small things between large ones', () => {
  it('reads the current of a microhm between megohms to the last digits', () => {
    const list = network(
      voltageSource('V1', '1', '0', 1000),
      resistor('Ra', '1', '2', 1e6),
      resistor('Shunt', '2', '3', 1e-6),
      resistor('Rb', '3', '0', 1e6),
    );
    const solution = solved(solve(list, { frequency: 50 }));
    expectClose(solution.current('Shunt'), { re: 1000 / (2e6 + 1e-6), im: 0 }, 4);
    expectClose(solution.elementVoltage('Shunt'), { re: 1e-3 / (2e6 + 1e-6), im: 0 }, 4);
  });

  it('does not lose a weak tie to the reference beside strong ties between nodes', () => {
    const list = network(
      currentSource('I1', '0', '1', 1e-9),
      resistor('R1', '1', '2', 1e-3),
      resistor('R2', '2', '3', 1e-3),
      resistor('R3', '1', '3', 1e-3),
      resistor('Leak', '3', '0', 1e15),
    );
    expectClose(solved(solve(list, { frequency: 50 })).voltage('1'), { re: 1e6, im: 0 }, 4);
  });

  it('keeps a source’s own current apart from a large one that only circulates at its node', () => {
    const list = network(
      voltageSource('V1', '1', '0', 1),
      currentSource('I1', '1', '2', 1000),
      resistor('R1', '2', '1', 0.001),
      resistor('R2', '1', '0', 1e9),
    );
    expectClose(solved(solve(list, { frequency: 50 })).current('V1'), { re: -1e-9, im: 0 }, 2);
  });

  it('has a source between two nodes that are each tied elsewhere', () => {
    const list = network(
      voltageSource('V1', '1', '0', 10),
      resistor('Ra', '1', '2', 1000),
      voltageSource('V2', '3', '2', 5, 90),
      resistor('Rb', '2', '0', 1000),
      resistor('Rc', '3', '0', 50),
    );
    const solution = solved(solve(list, { frequency: 50 }));
    // One unknown, v2: (v2 − 10)/1000 + v2/1000 + (v2 + j5)/50 = 0.
    expectClose(solution.voltage('2'), { re: 10 / 22, im: -100 / 22 }, 4);
    expectClose(solution.voltage('3'), { re: 10 / 22, im: 5 - 100 / 22 }, 16);
    expect(solution.elementVoltage('V2')).toMatchObject({ re: 0, im: 5 });
  });
});

describe('a chain whose reactances cancel in pairs', () => {
  // Found by the random networks of properties.test.ts: node 4 came out of a difference of products of 10¹⁰.
  it('has the voltages of its inner nodes to rounding', () => {
    const omega = 2 * Math.PI * 1000;
    const list = network(
      voltageSource('V1', '1', '0', 1),
      resistor('R1', '1', '2', 0.5),
      resistor('R2', '2', '0', 1),
      capacitor('C1', '3', '2', 1 / omega),
      inductor('L1', '4', '3', 1 / omega),
      capacitor('C2', '4', '1', (1 + 2e-10) / omega),
    );
    const solution = solved(solve(list, { frequency: 1000 }));
    // The inductor and the first capacitor cancel, so nodes 4 and 2 are at one voltage: v₂·(3 + 1/jX) = 2 + 1/jX.
    const x = -1 / (1 + 2e-10);
    const v2 = new Complex(2, -1 / x).div(new Complex(3, -1 / x));
    const i = new Complex(1).sub(v2).div(new Complex(0, x));
    expectClose(solution.voltage('2'), v2, 8);
    expectClose(solution.voltage('4'), v2, 8);
    expectClose(solution.voltage('3'), v2.sub(i.mul(new Complex(0, 1))), 16);
    expect(solution.residual).toBeLessThanOrEqual(1e-14);
  });
});

describe('the balance of complex power', () => {
  it('is zero to rounding on random networks, and the residual is small', () => {
    const random = new Random(20260110);
    for (let run = 0; run < 200; run++) {
      const list = network(...randomElements(random));
      const solution = solved(solve(list, { frequency: random.pick([0.1, 50, 1e6]) }));
      const { sum, scale } = solution.balance;
      expect(Math.hypot(sum.re, sum.im)).toBeLessThanOrEqual(64 * Number.EPSILON * scale);
      expect(solution.residual).toBeLessThanOrEqual(1e5 * Number.EPSILON);
      expect(solution.problems).toEqual([]);
    }
  });
});

/** A connected network with a source on node 1, at moderate spread. */
function randomElements(random: Random): Element[] {
  const elements: Element[] = [voltageSource('V1', '1', '0', 10, random.between(-180, 180))];
  const nodes = random.whole(3, 12);
  const join = (a: number, b: number): void => {
    const id = `Z${elements.length}`;
    const [one, other] = [String(a), String(b)];
    const size = 10 ** random.between(-3, 3);
    const kind = random.whole(0, 2);
    if (kind === 0) elements.push(resistor(id, one, other, size));
    else if (kind === 1) elements.push(inductor(id, one, other, size * 1e-3));
    else elements.push(capacitor(id, one, other, size * 1e-6));
  };
  for (let node = 2; node <= nodes; node++) join(node, random.whole(0, node - 1));
  for (let extra = 0; extra < nodes; extra++) join(random.whole(0, nodes), random.whole(0, nodes));
  elements.push(currentSource('I1', String(random.whole(0, nodes)), String(random.whole(0, nodes)), 0.1));
  return elements;
}

describe('what never happens', () => {
  it('is an exception, or a number that is not finite, for any valid list', () => {
    const value = fc.double({ noNaN: true, noDefaultInfinity: true });
    const node = fc.constantFrom('0', '1', '2', '3', '4');
    const pair = fc.tuple(node, node);
    const source = fc.record({ rms: value, phase: value, frequency: fc.constantFrom(null, 0, 50) });
    const element = fc.oneof(
      fc.tuple(pair, value).map(([nodes, resistance]) => ({ kind: 'resistor', nodes, resistance })),
      fc.tuple(pair, value).map(([nodes, capacitance]) => ({ kind: 'capacitor', nodes, capacitance })),
      fc.tuple(pair, value).map(([nodes, inductance]) => ({ kind: 'inductor', nodes, inductance })),
      fc.tuple(pair, source).map(([nodes, given]) => ({ kind: 'voltageSource', nodes, value: given })),
      fc.tuple(pair, source).map(([nodes, given]) => ({ kind: 'currentSource', nodes, value: given })),
      fc
        .tuple(pair, fc.constantFrom(0, 1, -1, 2))
        .map(([nodes, resistance]) => ({ kind: 'resistor', nodes, resistance })),
    );
    const list = fc
      .array(element, { maxLength: 9 })
      .map(
        (parts) =>
          ({ version: 1, elements: parts.map((part, at) => ({ ...part, id: `X${at}` })) as Element[] }) as const,
      );
    const frequency = fc.oneof(fc.constantFrom(0, 50), fc.double({ min: 0, noNaN: true, noDefaultInfinity: true }));
    fc.assert(
      fc.property(list, frequency, (valid, at) => {
        const result = solve(valid, { frequency: at });
        if (!result.ok) return result.message.length > 0;
        const readings = valid.elements.flatMap(({ id, nodes }) => [
          result.current(id),
          result.elementVoltage(id),
          result.power(id),
          result.voltage(nodes[0]),
        ]);
        return (
          Number.isFinite(result.residual) &&
          Number.isFinite(result.balance.scale) &&
          readings.every(
            (reading) => reading === undefined || (Number.isFinite(reading.re) && Number.isFinite(reading.im)),
          )
        );
      }),
      { seed: 20260106, numRuns: 2000 },
    );
  }, 60_000);
});
