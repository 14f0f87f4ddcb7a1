import { describe, expect, it } from 'vitest';
import type { Element, SweepOutput } from '@/solver';
import { solve, sweep } from '@/solver';
import type { SweepTransfer } from '@/solver/analysis/sweep-output';
import type { ComplexLike } from './support/expect';
import { expectClose, solved } from './support/expect';
import { capacitor, currentSource, inductor, network, resistor, voltageSource } from './support/networks';
import { Random } from './support/random';
import { randomElements } from './support/random-networks';

/** The values of outputs at frequencies: one row an output. */
function values(elements: readonly Element[], frequencies: readonly number[], outputs: readonly SweepOutput[]): ComplexLike[][] {
  const result = sweep(network(...elements), { frequencies, outputs });
  if (!result.ok) throw new Error(result.message);
  expect(result.problems).toEqual([]);
  return result.traces.map(({ re, im, determined }) =>
    Array.from(re, (value, place) => {
      expect(determined[place]).toBe(1);
      return { re: value, im: im[place] ?? NaN };
    }),
  );
}

function times(a: ComplexLike, b: ComplexLike): ComplexLike {
  return { re: a.re * b.re - a.im * b.im, im: a.re * b.im + a.im * b.re };
}

function over(a: ComplexLike, b: ComplexLike): ComplexLike {
  const square = b.re * b.re + b.im * b.im;
  return times(a, { re: b.re / square, im: -b.im / square });
}

const output = (node: string): SweepTransfer => ({ quantity: 'voltage', node });

describe('driving-point impedances and admittances', () => {
  it('are those of a series circuit, whichever way the nodes are named, with the sources dead', () => {
    const [r, l, c] = [47, 2e-3, 3e-7];
    const elements = [
      resistor('R', 'a', 'b', r),
      inductor('L', 'b', 'c', l),
      capacitor('C', 'c', '0', c),
      currentSource('I', '0', 'b', 3),
      voltageSource('V', 'd', '0', 5),
      resistor('Rd', 'd', '0', 1),
    ];
    const frequency = 7000;
    const omega = 2 * Math.PI * frequency;
    const z = { re: r, im: omega * l - 1 / (omega * c) };
    const [there, back, part, admittance] = values(elements, [frequency], [
      { quantity: 'impedance', nodes: ['a', '0'] },
      { quantity: 'impedance', nodes: ['0', 'a'] },
      { quantity: 'impedance', nodes: ['a', 'c'] },
      { quantity: 'admittance', nodes: ['a', '0'] },
    ]);
    expectClose(there?.[0], z, 10);
    expectClose(back?.[0], z, 10);
    expectClose(part?.[0], { re: r, im: omega * l }, 10);
    expectClose(admittance?.[0], over({ re: 1, im: 0 }, z), 10);
  });

  it('are nothing across a voltage source, whose admittance is not determined', () => {
    const list = network(voltageSource('V', '1', '0', 1), resistor('R', '1', '0', 10));
    const result = sweep(list, {
      frequencies: [50],
      outputs: [
        { quantity: 'impedance', nodes: ['1', '0'] },
        { quantity: 'admittance', nodes: ['1', '0'] },
      ],
    });
    if (!result.ok) throw new Error(result.message);
    expect(result.traces.map(({ re, im, determined }) => [re[0], im[0], determined[0]])).toEqual([
      [0, 0, 1],
      [0, 0, 0],
    ]);
  });

  it('agree with a current sent in by a source, on random networks', () => {
    for (let seed = 1; seed <= 40; seed++) {
      const random = new Random(seed);
      const elements = randomElements(random, { nodes: [4, 9], decades: 1, frequency: 1000 });
      const [a, b] = ['2', '3'];
      const [z] = values(elements, [800], [{ quantity: 'impedance', nodes: [a, b] }]);
      const dead = elements.map((element) =>
        element.kind === 'voltageSource' ? { ...element, value: { ...element.value, rms: 0 } } : element,
      );
      const solution = solved(solve(network(...dead, currentSource('probe', b, a, 1)), { frequency: 800 }));
      const expected = solution.elementVoltage('probe');
      const condition = solution.condition ?? Infinity;
      if (condition > 1e3) continue;
      expectClose(z?.[0], { re: -(expected?.re ?? NaN), im: -(expected?.im ?? NaN) }, 50 * condition);
    }
  });
});

describe('ratios, differences and powers', () => {
  it('are what the phasors that they are made of say', () => {
    const elements = [
      voltageSource('V', '1', '0', 2, 30),
      resistor('R', '1', '2', 50),
      inductor('L', '2', '3', 1e-3),
      capacitor('C', '3', '0', 1e-7),
      resistor('Z', '3', '0', 1000),
    ];
    const frequencies = [100, 5000, 16000, 90000];
    const [ratio, ratioOfCurrents, between, v1, v3, v2, iC, iL, power, powerOfSource, iV] = values(elements, frequencies, [
      { quantity: 'ratio', of: { quantity: 'voltage', node: '3' }, to: { quantity: 'voltage', node: '1' } },
      { quantity: 'ratio', of: { quantity: 'current', element: 'C' }, to: { quantity: 'current', element: 'L' } },
      { quantity: 'voltageBetween', nodes: ['1', '3'] },
      output('1'),
      output('3'),
      output('2'),
      { quantity: 'current', element: 'C' },
      { quantity: 'current', element: 'L' },
      { quantity: 'power', element: 'Z' },
      { quantity: 'power', element: 'V' },
      { quantity: 'current', element: 'V' },
    ]);
    const none = { re: NaN, im: NaN };
    for (const place of frequencies.keys()) {
      const at = (of: ComplexLike[] | undefined): ComplexLike => of?.[place] ?? none;
      expectClose(ratio?.[place], over(at(v3), at(v1)), 20);
      expectClose(ratioOfCurrents?.[place], over(at(iC), at(iL)), 20);
      const drop = { re: at(v1).re - at(v3).re, im: at(v1).im - at(v3).im };
      expectClose(between?.[place], drop, 1e4);
      expectClose(power?.[place], { re: (at(v3).re ** 2 + at(v3).im ** 2) / 1000, im: 0 }, 20);
      expectClose(powerOfSource?.[place], times(at(v1), { re: at(iV).re, im: -at(iV).im }), 20);
      expectClose(at(iV), { re: -at(iL).re, im: -at(iL).im }, 50);
      expect(Number.isFinite(at(v2).re)).toBe(true);
    }
  });
});

describe('group delay', () => {
  it('of a first-order low-pass is RC/(1 + (ωRC)²)', () => {
    const [r, c] = [1000, 1e-7];
    const elements = [voltageSource('V', '1', '0', 3, 77), resistor('R', '1', '2', r), capacitor('C', '2', '0', c)];
    const frequencies = [1, 500, 1591.5, 30000];
    const [delay] = values(elements, frequencies, [{ quantity: 'groupDelay', of: output('2') }]);
    for (const [place, frequency] of frequencies.entries()) {
      const x = 2 * Math.PI * frequency * r * c;
      expectClose(delay?.[place], { re: (r * c) / (1 + x * x), im: 0 }, 20);
    }
  });

  it('of a series resonance, of the voltage, the current, the ratio and the impedance alike, is the closed form', () => {
    const [r, l, c] = [5, 1e-3, 1e-8];
    const elements = [voltageSource('V', '1', '0', 1), resistor('R', '1', '2', r), inductor('L', '2', '3', l), capacitor('C', '3', '0', c)];
    const f0 = 1 / (2 * Math.PI * Math.sqrt(l * c));
    // At f0 itself L and C together are nothing, and what is nothing has no phase.
    const frequencies = [0.3 * f0, 0.99 * f0, 0.99999 * f0, 1.001 * f0, 4 * f0];
    const current: SweepTransfer = { quantity: 'current', element: 'L' };
    const [ofCurrent, ofRatio, ofImpedance, ofAdmittance, ofSource] = values(elements, frequencies, [
      { quantity: 'groupDelay', of: current },
      { quantity: 'groupDelay', of: { quantity: 'ratio', of: { quantity: 'current', element: 'L' }, to: { quantity: 'voltage', node: '1' } } },
      { quantity: 'groupDelay', of: { quantity: 'impedance', nodes: ['2', '0'] } },
      { quantity: 'groupDelay', of: { quantity: 'ratio', of: { quantity: 'voltage', node: '2' }, to: { quantity: 'current', element: 'R' } } },
      { quantity: 'groupDelay', of: { quantity: 'current', element: 'V' } },
    ]);
    for (const [place, frequency] of frequencies.entries()) {
      const omega = 2 * Math.PI * frequency;
      const x = omega * l - 1 / (omega * c);
      // The phase of 1/Z is −atan(x/r); its slope, with the sign turned.
      const expected = ((l + 1 / (omega * omega * c)) * r) / (r * r + x * x);
      const condition = 1 + Math.abs(omega * l * x) / (r * r + x * x);
      expectClose(ofCurrent?.[place], { re: expected, im: 0 }, 100 * condition);
      expectClose(ofRatio?.[place], { re: expected, im: 0 }, 100 * condition);
      expectClose(ofSource?.[place], { re: expected, im: 0 }, 100 * condition);
      // Node 2 to the reference, the source dead: r beside L and C in series. V2/I is L and C alone: no delay but at its zero.
      expect(Number.isFinite(ofImpedance?.[place]?.re ?? NaN)).toBe(true);
      expect(Math.abs(ofAdmittance?.[place]?.re ?? NaN)).toBeLessThan(1e-6 * Math.abs(expected) + 1e-12);
    }
  });

  it('is the slope of the phase, on random networks', () => {
    for (let seed = 1; seed <= 30; seed++) {
      const recipe = { nodes: [4, 8], decades: 1, frequency: 1000, currentSource: true } as const;
      const elements = [...randomElements(new Random(seed), recipe), resistor('Rg', '2', '0', 1000)];
      const transfers: SweepTransfer[] = [
        output('3'),
        { quantity: 'current', element: 'V1' },
        { quantity: 'impedance', nodes: ['3', '0'] },
        { quantity: 'ratio', of: { quantity: 'voltage', node: '4' }, to: { quantity: 'voltageBetween', nodes: ['1', '2'] } },
      ];
      const h = 1e-4;
      const results = values(elements, [700, 700 * (1 - h), 700 * (1 + h)], [
        ...transfers.map((of): SweepOutput => ({ quantity: 'groupDelay', of })),
        ...transfers,
      ]);
      for (const index of transfers.keys()) {
        const [, below, above] = results[transfers.length + index] ?? [];
        if (below === undefined || above === undefined) throw new Error('no values');
        const turn = over(above, below);
        const slope = -Math.atan2(turn.im, turn.re) / (2 * Math.PI * 1400 * h);
        const size = Math.max(Math.abs(slope), 1e-6);
        expect(Math.abs((results[index]?.[0]?.re ?? NaN) - slope), `seed ${seed}, ${index}`).toBeLessThanOrEqual(1e-3 * size);
      }
    }
  });
});

describe('derivatives by element values', () => {
  it('of a divider are the closed forms', () => {
    const [r1, r2] = [330, 1200];
    const elements = [voltageSource('V', '1', '0', 1), resistor('R1', '1', '2', r1), resistor('R2', '2', '0', r2)];
    const of = output('2');
    const [by1, by2] = values(elements, [100], [
      { quantity: 'derivative', of, element: 'R1' },
      { quantity: 'derivative', of, element: 'R2' },
    ]);
    expectClose(by1?.[0], { re: -r2 / (r1 + r2) ** 2, im: 0 }, 10);
    expectClose(by2?.[0], { re: r1 / (r1 + r2) ** 2, im: 0 }, 10);
  });

  it('of 1/Z of a series circuit are −Z′/Z², of the current, the source’s current and the admittance', () => {
    const [r, l, c] = [30, 1e-3, 1e-7];
    const elements = [voltageSource('V', '1', '0', 1), resistor('R', '1', '2', r), inductor('L', '2', '3', l), capacitor('C', '3', '0', c)];
    const omega = 2 * Math.PI * 12_000;
    const y = over({ re: 1, im: 0 }, { re: r, im: omega * l - 1 / (omega * c) });
    const slopes = { R: { re: 1, im: 0 }, L: { re: 0, im: omega }, C: { re: 0, im: 1 / (omega * c * c) } };
    const transfers: readonly SweepTransfer[] = [
      { quantity: 'current', element: 'C' },
      { quantity: 'current', element: 'V' },
      { quantity: 'ratio', of: { quantity: 'current', element: 'R' }, to: { quantity: 'voltage', node: '1' } },
    ];
    for (const [id, slope] of Object.entries(slopes)) {
      const expected = times(times(y, y), { re: -slope.re, im: -slope.im });
      const results = values(
        elements,
        [12_000],
        transfers.map((of): SweepOutput => ({ quantity: 'derivative', of, element: id })),
      );
      for (const [index, result] of results.entries()) {
        const sign = index === 1 ? -1 : 1;
        expectClose(result[0], { re: sign * expected.re, im: sign * expected.im }, 60);
      }
    }
  });

  it('of an admittance between nodes are those of what lies between them', () => {
    const elements = [resistor('R', 'a', 'b', 20), capacitor('C', 'b', '0', 1e-6), inductor('L', 'a', '0', 1e-3)];
    const omega = 2 * Math.PI * 3000;
    const [byL] = values(elements, [3000], [{ quantity: 'derivative', of: { quantity: 'admittance', nodes: ['a', '0'] }, element: 'L' }]);
    expectClose(byL?.[0], { re: 0, im: 1 / (omega * 1e-6) }, 30);
  });
});

describe('a sharp resonance on the grid', () => {
  const [l, c] = [1e-3, 1e-9];
  const f0 = 1 / (2 * Math.PI * Math.sqrt(l * c));
  /** Inductor and capacitor in series as a trap, with something hung on the node between them. */
  const trap = [
    voltageSource('V', '1', '0', 1),
    resistor('R1', '1', '2', 1000),
    inductor('L', '2', 'm', l),
    capacitor('C', 'm', '0', c),
    resistor('Rm', 'm', '3', 1e7),
    resistor('R3', '3', '0', 1e7),
    resistor('R2', '2', '0', 1000),
  ];

  it('is as solve has it, and the delay is there too', () => {
    const frequencies = [0.9 * f0, f0 * (1 - 1e-6), f0, f0 * (1 + 1e-9), 1.2 * f0];
    const outputs: SweepOutput[] = [output('2'), output('m'), output('3'), { quantity: 'current', element: 'V' }];
    const results = values(trap, frequencies, [...outputs, { quantity: 'groupDelay', of: output('2') }]);
    for (const [place, frequency] of frequencies.entries()) {
      const solution = solved(solve(network(...trap), { frequency }));
      const units = 50 * (1 + 2 * Math.PI * frequency * l);
      for (const [index, node] of ['2', 'm', '3'].entries()) {
        expectClose(results[index]?.[place], solution.voltage(node) ?? { re: NaN, im: NaN }, units);
      }
      expectClose(results[3]?.[place], solution.current('V') ?? { re: NaN, im: NaN }, units);
      expect(Number.isFinite(results[4]?.[place]?.re ?? NaN)).toBe(true);
    }
  });
});
