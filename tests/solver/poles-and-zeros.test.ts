import { describe, expect, it } from 'vitest';
import type { Element, ElementList, NetworkReading } from '@/solver';
import { polesAndZeros } from '@/solver/analysis/poles-and-zeros';
import { capacitor, currentSource, inductor, network, resistor, voltageSource } from './support/networks';
import { amplifier, buffer, expectRoots, found, refused, toNode } from './support/roots';

describe('poles and zeros of simple networks', () => {
  it('of a series R-L-C are those of its formula, with the gain', () => {
    const [r, l, c] = [10, 1e-3, 1e-8];
    const list = network(voltageSource('V1', '1', '0', 5), resistor('R1', '1', '2', r), inductor('L1', '2', '3', l), capacitor('C1', '3', '0', c));
    const sigma = -r / (2 * l);
    const omega = Math.sqrt(1 / (l * c) - sigma ** 2);
    const low = found(polesAndZeros(list, toNode('3')));
    expectRoots(low.poles, [[sigma, omega], [sigma, -omega]]);
    expect(low.zeros).toEqual([]);
    expect(Math.abs((low.gain ?? 0) * l * c - 1)).toBeLessThanOrEqual(16 * Number.EPSILON);
    const [pole] = low.poles;
    expect(Math.abs((pole?.frequency ?? 0) * 2 * Math.PI * Math.sqrt(l * c) - 1)).toBeLessThanOrEqual(8 * Number.EPSILON);
    // The damping, and so the quality, depends on R, L and C by its own order, not by that of the frequency.
    expect(Math.abs((pole?.q ?? 0) / (Math.sqrt(l / c) / r) - 1)).toBeLessThanOrEqual(64 * Number.EPSILON * (Math.sqrt(l / c) / r));
    const [upper, lower] = low.poles;
    expect(lower?.s.re).toBe(upper?.s.re);
    expect(lower?.s.im).toBe(-(upper?.s.im ?? 0));
    expect(low.stability).toBe('stable');
    // Across the resistance: a zero at the origin. Across the inductor: two.
    expectRoots(found(polesAndZeros(list, toNode('1', 'V1', '2'))).zeros, [[0, 0]]);
    expect(found(polesAndZeros(list, toNode('2', 'V1', '3'))).zeros.map(({ s, multiplicity }) => [s.re, s.im, multiplicity])).toEqual([[0, 0, 2], [0, 0, 2]]);
    // The current entering the source is that through R1, turned round.
    const current = found(polesAndZeros(list, { kind: 'transfer', source: 'V1', output: { quantity: 'current', element: 'V1' } }));
    expect(Math.abs((current.gain ?? 0) * l + 1)).toBeLessThanOrEqual(16 * Number.EPSILON);
  });

  it('of an overdamped one are real, with a quality of 0.5 each', () => {
    const list = network(voltageSource('V1', '1', '0', 1), resistor('R1', '1', '2', 1000), inductor('L1', '2', '3', 1e-3), capacitor('C1', '3', '0', 1e-8));
    const { poles } = found(polesAndZeros(list, toNode('3')));
    const root = Math.sqrt(2.5e11 - 1e11);
    expectRoots(poles, [[-5e5 - root, 0], [-5e5 + root, 0]]);
    expect(poles.map(({ q, s }) => [q, s.im])).toEqual([[0.5, 0], [0.5, 0]]);
  });

  it('of a critically damped one are two in one place', () => {
    const list = network(voltageSource('V1', '1', '0', 1), resistor('R1', '1', '2', 2), inductor('L1', '2', '3', 1), capacitor('C1', '3', '0', 1));
    const { poles } = found(polesAndZeros(list, toNode('3')));
    expect(poles.map(({ s, multiplicity }) => [s.im, multiplicity])).toEqual([[0, 2], [0, 2]]);
    for (const { s } of poles) expect(Math.abs(s.re + 1)).toBeLessThanOrEqual(64 * Number.EPSILON);
  });

  it('of a nearly critically damped one are two places', () => {
    const list = network(voltageSource('V1', '1', '0', 1), resistor('R1', '1', '2', 2 * (1 - 1e-12)), inductor('L1', '2', '3', 1), capacitor('C1', '3', '0', 1));
    const { poles } = found(polesAndZeros(list, toNode('3')));
    expect(poles.map(({ multiplicity }) => multiplicity)).toEqual([1, 1]);
    const omega = Math.sqrt(1 - (1 - 1e-12) ** 2);
    expect(Math.abs((poles[0]?.s.im ?? 0) - omega)).toBeLessThanOrEqual(8 * (poles[0]?.uncertainty ?? 0));
  });

  it('of three buffered equal sections are three in one place', () => {
    const elements: Element[] = [voltageSource('V1', 'n0', '0', 1)];
    for (let k = 0; k < 3; k++) {
      elements.push(resistor(`R${k}`, `n${k}`, `m${k}`, 3300), capacitor(`C${k}`, `m${k}`, '0', 4.7e-9), buffer(`E${k}`, `m${k}`, `n${k + 1}`));
    }
    const { poles, gain } = found(polesAndZeros(network(...elements), toNode('n3')));
    const rc = 3300 * 4.7e-9;
    expect(poles.map(({ multiplicity }) => multiplicity)).toEqual([3, 3, 3]);
    for (const { s } of poles) {
      expect(s.im).toBe(0);
      expect(Math.abs(s.re * rc + 1)).toBeLessThanOrEqual(64 * Number.EPSILON);
    }
    expect(Math.abs((gain ?? 0) * rc ** 3 - 1)).toBeLessThanOrEqual(256 * Number.EPSILON);
  });

  it('of a ladder that is critically damped to the third order are three in one place', () => {
    // 1/(s + 1)³: (s³ + 3s)/(3s² + 1) is the continued fraction s/3 + 1/(9s/8 + 1/(8s/3)).
    const list = network(voltageSource('V1', 's', '0', 1), inductor('L1', 's', 'a', 8 / 3), capacitor('C1', 'a', '0', 9 / 8), inductor('L2', 'a', 'o', 1 / 3), resistor('R1', 'o', '0', 1));
    const { poles, gain } = found(polesAndZeros(list, toNode('o')));
    expect(poles.map(({ s, multiplicity }) => [s.im, multiplicity])).toEqual([[0, 3], [0, 3], [0, 3]]);
    for (const { s } of poles) expect(Math.abs(s.re + 1)).toBeLessThanOrEqual(256 * Number.EPSILON);
    expect(Math.abs((gain ?? 0) - 1)).toBeLessThanOrEqual(1024 * Number.EPSILON);
  });

  it('of two equal resonances behind a buffer are two pairs, each twice in its place', () => {
    const tank = (id: string, from: string, to: string): Element[] => [
      resistor(`R${id}`, from, `${id}a`, 30),
      inductor(`L${id}`, `${id}a`, to, 1e-3),
      capacitor(`C${id}`, to, '0', 1e-7),
    ];
    const list = network(voltageSource('V1', 's', '0', 1), ...tank('1', 's', 'm'), buffer('CS1', 'm', 'n'), ...tank('2', 'n', 'o'));
    const { poles, stability } = found(polesAndZeros(list, toNode('o')));
    const sigma = -30 / 2e-3;
    const omega = Math.sqrt(1e10 - sigma ** 2);
    expectRoots(poles, [[sigma, omega], [sigma, omega], [sigma, -omega], [sigma, -omega]]);
    expect(poles.map(({ multiplicity }) => multiplicity)).toEqual([2, 2, 2, 2]);
    expect(stability).toBe('stable');
  });

  it('of a first-order all-pass: a pole left and a zero right, and a gain of −1', () => {
    const list = network(
      voltageSource('V1', 's', '0', 1),
      resistor('R1', 's', 'm', 1e4),
      resistor('R2', 'm', 'out', 1e4),
      resistor('R3', 's', 'p', 12e3),
      capacitor('C1', 'p', '0', 4.7e-9),
      amplifier('A1', 'p', 'm', 'out'),
    );
    const { poles, zeros, gain } = found(polesAndZeros(list, toNode('out')));
    const corner = 1 / (12e3 * 4.7e-9);
    expectRoots(poles, [[-corner, 0]]);
    expectRoots(zeros, [[corner, 0]]);
    expect(Math.abs((gain ?? 0) + 1)).toBeLessThanOrEqual(16 * Number.EPSILON);
  });

  it('of an amplifier of finite gain: the integrator of its own makes a pole of its own', () => {
    const list = network(
      voltageSource('V1', 's', '0', 1),
      { id: 'A1', kind: 'operationalAmplifier', nodes: ['s', 'out', 'out'], openLoopGain: 1e5, gainBandwidth: 1e6 },
      resistor('RL', 'out', '0', 1e3),
    );
    const { poles, zeros } = found(polesAndZeros(list, toNode('out')));
    expectRoots(poles, [[-2 * Math.PI * 1e6 * (1 + 1e-5), 0]]);
    expect(zeros).toEqual([]);
  });

  it('of coils coupled completely have the pole of one coil, and with less coupling of both', () => {
    const build = (coupling: number): ElementList =>
      network(
        voltageSource('V1', 's', '0', 1),
        resistor('R1', 's', 'a', 50),
        { id: 'T1', kind: 'coupledInductors', nodes: ['a', '0', 'b', '0'], inductances: [1e-3, 3e-3], coupling },
        resistor('R2', 'b', '0', 200),
      );
    // L1/R1 and L2/R2 in one time constant, their sum.
    const [whole] = found(polesAndZeros(build(1), toNode('b'))).poles;
    const t = [1e-3 / 50, 3e-3 / 200] as const;
    expect(found(polesAndZeros(build(1), toNode('b'))).poles.length).toBe(1);
    expect(Math.abs((whole?.s.re ?? 0) * (t[0] + t[1]) + 1)).toBeLessThanOrEqual(16 * Number.EPSILON);
    // t₁t₂(1 − k²)s² + (t₁ + t₂)s + 1 = 0.
    const k = 0.9;
    const a = t[0] * t[1] * (1 - k ** 2);
    const b = t[0] + t[1];
    const far = (-b - Math.sqrt(b ** 2 - 4 * a)) / (2 * a);
    expectRoots(found(polesAndZeros(build(k), toNode('b'))).poles, [[far, 0], [1 / (a * far), 0]]);
  });
});

describe('driving-point impedances', () => {
  it('have poles where the network left open resonates, and zeros where it does short-circuited', () => {
    const elements = [resistor('R1', '1', '2', 4), inductor('L1', '2', '0', 1e-3), capacitor('C1', '1', '0', 1e-6)];
    const { poles, zeros, gain } = found(polesAndZeros(network(...elements), { kind: 'impedance', nodes: ['1', '0'] }));
    const sigma = -4 / 2e-3;
    const omega = Math.sqrt(1e9 - sigma ** 2);
    expectRoots(poles, [[sigma, omega], [sigma, -omega]]);
    expectRoots(zeros, [[-4e3, 0]]);
    expect(Math.abs((gain ?? 0) * 1e-6 - 1)).toBeLessThanOrEqual(16 * Number.EPSILON);
    // The sign: entering at the first node, voltage of the first over the second.
    const turned = found(polesAndZeros(network(...elements), { kind: 'impedance', nodes: ['0', '1'] }));
    expect(Math.abs((turned.gain ?? 0) * 1e-6 - 1)).toBeLessThanOrEqual(16 * Number.EPSILON);
  });

  it('exist for a part of its own, without a reference node', () => {
    const list = network(
      resistor('R1', 'a', 'b', 100),
      capacitor('C1', 'a', 'b', 1e-6),
      resistor('R2', 'x', '0', 1),
      // What has nothing to do with the two nodes may have its own troubles.
      capacitor('C9', 'y', 'z', 1e-9),
    );
    const { poles, gain } = found(polesAndZeros(list, { kind: 'impedance', nodes: ['a', 'b'] }));
    expectRoots(poles, [[-1e4, 0]]);
    expect(Math.abs((gain ?? 0) * 1e-6 - 1)).toBeLessThanOrEqual(16 * Number.EPSILON);
  });

  it('of an inductor grow without bound: a zero and no pole', () => {
    const { poles, zeros, gain } = found(polesAndZeros(network(inductor('L1', '1', '0', 0.5)), { kind: 'impedance', nodes: ['1', '0'] }));
    expect(poles).toEqual([]);
    expect(zeros.map(({ s }) => [s.re, s.im])).toEqual([[0, 0]]);
    expect(gain).toBe(0.5);
  });
});

describe('what a transfer function does not show', () => {
  it('is told apart: the pole and the zero at −ω₀ of a twin-T', () => {
    const [r, c] = [46.4e3, 68e-9];
    const list = network(
      voltageSource('V1', 's', '0', 1),
      resistor('R1', 's', 'a', r),
      resistor('R2', 'a', 'out', r),
      capacitor('C1', 'a', '0', 2 * c),
      capacitor('C2', 's', 'b', c),
      capacitor('C3', 'b', 'out', c),
      resistor('R3', 'b', '0', r / 2),
    );
    const { poles, zeros, cancelled, gain } = found(polesAndZeros(list, toNode('out')));
    const omega = 1 / (r * c);
    expectRoots(cancelled.map(({ pole }) => pole), [[-omega, 0]]);
    expectRoots(cancelled.map(({ zero }) => zero), [[-omega, 0]]);
    // s² + 4ω₀s + ω₀² below, s² + ω₀² above.
    expectRoots(poles, [[-(2 + Math.sqrt(3)) * omega, 0], [-omega / (2 + Math.sqrt(3)), 0]]);
    expectRoots(zeros, [[0, omega], [0, -omega]]);
    expect(zeros.map(({ q }) => q)).toEqual([undefined, undefined]);
    expect(Math.abs((gain ?? 0) - 1)).toBeLessThanOrEqual(32 * Number.EPSILON);
    // One value off by a part in a thousand, and nothing cancels.
    const off = network(...list.elements.map((element) => (element.kind === 'resistor' && element.id === 'R3' ? { ...element, resistance: 1.001 * element.resistance } : element)));
    expect(found(polesAndZeros(off, toNode('out'))).cancelled).toEqual([]);
  });

  it('may be unstable, and then the network is', () => {
    const list = network(
      voltageSource('V1', 's', '0', 1),
      resistor('R1', 's', 'a', 1e3),
      capacitor('C1', 'a', '0', 1e-6),
      buffer('CS1', 's', 'b'),
      resistor('R2', 'b', 'c', -1e3),
      capacitor('C2', 'c', '0', 1e-6),
    );
    const result = found(polesAndZeros(list, toNode('a')));
    expectRoots(result.poles, [[-1e3, 0]]);
    expectRoots(result.cancelled.map(({ pole }) => pole), [[1e3, 0]]);
    expect([result.stability, result.networkStability]).toEqual(['stable', 'unstable']);
    expect(found(polesAndZeros(list, toNode('c'))).stability).toBe('unstable');
  });

  it('may be all: a balanced bridge answers with a gain of 0', () => {
    const list = network(
      voltageSource('V1', 's', '0', 1),
      resistor('R1', 's', 'a', 10),
      resistor('R2', 'a', '0', 30),
      resistor('R3', 's', 'b', 7),
      resistor('R4', 'b', '0', 21),
      capacitor('C1', 'a', 'b', 1e-6),
    );
    const { gain, scaledGain, poles, zeros } = found(polesAndZeros(list, toNode('a', 'V1', 'b')));
    expect([gain, scaledGain, poles, zeros]).toEqual([0, 0, [], []]);
    // Two separate circuits share the reference node and nothing else.
    const apart = network(voltageSource('V1', 's', '0', 1), resistor('R1', 's', '0', 10), resistor('R2', 'x', '0', 10), capacitor('C2', 'x', '0', 1e-6));
    expect(found(polesAndZeros(apart, toNode('x'))).gain).toBe(0);
  });
});

describe('what a transfer function may give', () => {
  it('is a voltage of a node, between two, or of a port, or a current, as all analyses name them', () => {
    const coils: Element = { id: 'TR', kind: 'coupledInductors', nodes: ['a', '0', 'b', 'c'], inductances: [1e-3, 4e-3], coupling: 0.9 };
    const list = network(voltageSource('V1', 's', '0', 1), resistor('R1', 's', 'a', 10), coils, resistor('R2', 'b', 'c', 50), capacitor('C', 'c', '0', 1e-9));
    const of = (output: NetworkReading) => found(polesAndZeros(list, { kind: 'transfer', source: 'V1', output }));
    const between = of({ quantity: 'voltageBetween', nodes: ['b', 'c'] });
    expect(of({ quantity: 'elementVoltage', element: 'R2' })).toEqual(between);
    expect(of({ quantity: 'elementVoltage', element: 'TR', port: 1 })).toEqual(between);
    expect(of({ quantity: 'elementVoltage', element: 'TR' })).toEqual(of({ quantity: 'voltage', node: 'a' }));
    const gainOf = (output: NetworkReading): number => (of(output).gain ?? NaN) / (between.gain ?? NaN);
    expect(gainOf({ quantity: 'current', element: 'R2' }) * 50).toBeCloseTo(1, 12);
    expect(gainOf({ quantity: 'current', element: 'TR', port: 1 }) * -50).toBeCloseTo(1, 12);
    const refusal = polesAndZeros(list, { kind: 'transfer', source: 'V1', output: { quantity: 'elementVoltage', element: 'TR', port: 2 } });
    expect(refused(refusal).message).toMatch(/TR has no port 2/);
  });
});

describe('what hangs together with a transfer function', () => {
  it('is also a source with both ends on the reference node, where it senses and is sensed', () => {
    // N takes half of the current of R1 out of the node that R1 leads to, by way of M.
    const list = network(
      voltageSource('V1', 'a', '0', 1),
      resistor('R1', 'a', 'b', 1),
      resistor('R2', 'b', '0', 1),
      { id: 'M', kind: 'currentControlledCurrentSource', nodes: ['0', '0'], sensedElement: 'R1', gain: 1 },
      { id: 'N', kind: 'currentControlledCurrentSource', nodes: ['b', '0'], sensedElement: 'M', gain: 0.5 },
    );
    // v_b = (1 − 0.5)·(1 − v_b)
    expect(found(polesAndZeros(list, toNode('b'))).gain).toBeCloseTo(1 / 3, 14);
  });
});

describe('stability', () => {
  it('is marginal with single poles on the axis, and unstable with a double one', () => {
    const tank = network(voltageSource('V1', '1', '0', 1), inductor('L1', '1', '2', 1e-3), capacitor('C1', '2', '0', 1e-7));
    const lossless = found(polesAndZeros(tank, toNode('2')));
    expect(lossless.stability).toBe('marginal');
    expect(lossless.poles.map(({ s }) => s.re)).toEqual([0, 0]);
    const integrators = network(
      voltageSource('V1', 's', '0', 1),
      resistor('R1', 's', 'm', 1e3),
      capacitor('C1', 'm', 'o', 1e-6),
      amplifier('A1', '0', 'm', 'o'),
      resistor('R2', 'o', 'n', 2e3),
      capacitor('C2', 'n', 'out', 3e-6),
      amplifier('A2', '0', 'n', 'out'),
    );
    expect(found(polesAndZeros(integrators, toNode('o'))).stability).toBe('marginal');
    const twice = found(polesAndZeros(integrators, toNode('out')));
    expect(twice.poles.map(({ s, multiplicity }) => [s.re, s.im, multiplicity])).toEqual([[0, 0, 2], [0, 0, 2]]);
    expect(twice.stability).toBe('unstable');
    expect(Math.abs((twice.gain ?? 0) * 1e-3 * 6e-3 - 1)).toBeLessThanOrEqual(32 * Number.EPSILON);
  });
});

describe('problems of poles and zeros', () => {
  const list = network(voltageSource('V1', '1', '0', 1), resistor('R1', '1', '2', 10), capacitor('C1', '2', '0', 1e-6));

  it('say which name is not in the list, or what is no source', () => {
    expect(refused(polesAndZeros(list, toNode('7'))).message).toBe('There is no node 7 in the element list.');
    expect(refused(polesAndZeros(list, toNode('2', 'V9'))).message).toBe('There is no element V9 in the element list.');
    expect(refused(polesAndZeros(list, toNode('2', 'R1')))).toMatchObject({ kind: 'invalid', elements: ['R1'] });
    expect(refused(polesAndZeros(list, { kind: 'impedance', nodes: ['1', 'x'] })).message).toContain('node x');
    const output = { quantity: 'current', element: 'R1', port: 1 } as const;
    expect(refused(polesAndZeros(list, { kind: 'transfer', source: 'V1', output })).message).toContain('no port 1');
    expect(refused(polesAndZeros({ version: 1, elements: [resistor('R1', '1', '0', Number.NaN)] }, toNode('1'))).kind).toBe('invalid');
  });

  it('name the elements that have no polynomial', () => {
    const line: Element = { id: 'T1', kind: 'line', nodes: ['2', '0', '3', '0'], impedance: 50, delay: 1e-9 };
    const table: Element = { id: 'Z1', kind: 'impedance', nodes: ['3', '0'], points: [{ frequency: 1, resistance: 1, reactance: 0 }] };
    const problem = refused(polesAndZeros(network(...list.elements, line, table), toNode('2')));
    expect(problem).toMatchObject({ kind: 'invalid', elements: ['T1', 'Z1'] });
    expect(problem.message).toContain('not a polynomial');
    // Elsewhere they do no harm.
    expect(polesAndZeros(network(...list.elements, { ...table, nodes: ['x', '0'] }), toNode('2')).ok).toBe(true);
  });

  it('name what floats at all frequencies, and an amplifier without feedback', () => {
    const floating = refused(polesAndZeros(network(...list.elements, { id: 'CS1', kind: 'voltageControlledVoltageSource', nodes: ['3', '0', '2', 'x'], gain: 2 }, resistor('R3', '3', '2', 5)), toNode('3')));
    expect(floating).toMatchObject({ kind: 'singular', nodes: expect.arrayContaining(['x']) as unknown });
    const open = refused(polesAndZeros(network(...list.elements, amplifier('A1', '2', '0', 'o'), resistor('R2', 'o', '0', 10)), toNode('o')));
    expect(open).toMatchObject({ kind: 'singular', elements: expect.arrayContaining(['A1']) as unknown });
    expect(open.message).toContain('At no frequency');
  });

  it('say that a current has no way back, and that parts are not joined', () => {
    const stuck = network(currentSource('I1', '0', 'a', 1), resistor('R1', 'a', 'b', 1), resistor('R2', 'c', '0', 1));
    expect(refused(polesAndZeros(stuck, toNode('a', 'I1')))).toMatchObject({ kind: 'floatingNode', nodes: ['0', 'a'] });
    const secondary: Element = { id: 'T1', kind: 'idealTransformer', nodes: ['2', '0', 'x', 'y'], ratio: 2 };
    const isolated = network(...list.elements, secondary, resistor('R2', 'x', 'y', 5));
    expect(refused(polesAndZeros(isolated, toNode('x')))).toMatchObject({ kind: 'noReference', nodes: ['x', '0'] });
    const across = found(polesAndZeros(isolated, toNode('x', 'V1', 'y')));
    expectRoots(across.poles, [[-(1 / 10 + 1 / 20) / 1e-6, 0]]);
  });
});
