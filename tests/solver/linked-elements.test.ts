import { describe, expect, it } from 'vitest';
import type { Element, ElementList, Solution } from '@/solver';
import { solve } from '@/solver';

/** What each kind with an equation does, against its closed form; frequencies chosen so that ω is a plain number. */
const HZ = 1 / (2 * Math.PI);

const drive = (nodes: readonly [string, string] = ['in', '0']): Element => ({
  id: 'VS1',
  kind: 'voltageSource',
  nodes,
  value: { rms: 1, phase: 0, frequency: null },
});
const r = (id: string, a: string, b: string, resistance: number): Element => ({ id, kind: 'resistor', nodes: [a, b], resistance });
const c = (id: string, a: string, b: string, capacitance: number): Element => ({ id, kind: 'capacitor', nodes: [a, b], capacitance });

function solved(elements: readonly Element[], frequency = HZ): Solution {
  const list: ElementList = { version: 1, elements };
  const answer = solve(list, { frequency });
  if (!answer.ok) throw new Error(answer.message);
  expect(Math.hypot(answer.balance.sum.re, answer.balance.sum.im)).toBeLessThanOrEqual(
    1e-13 * Math.max(answer.balance.scale, Number.MIN_VALUE) * (answer.condition ?? 1),
  );
  expect(answer.residual).toBeLessThanOrEqual(1e-13);
  return answer;
}

function expectPhasor(value: { re: number; im: number } | undefined, re: number, im: number, units = 16): void {
  expect(value).toBeDefined();
  const off = Math.hypot((value?.re ?? NaN) - re, (value?.im ?? NaN) - im);
  expect(off).toBeLessThanOrEqual(units * Number.EPSILON * Math.max(Math.hypot(re, im), 1e-300));
}

describe('controlled sources', () => {
  it('a voltage-controlled voltage source multiplies what it senses, and draws nothing there', () => {
    const answer = solved([
      drive(),
      r('R1', 'in', 's', 1000),
      r('R2', 's', '0', 1000),
      { id: 'CS1', kind: 'voltageControlledVoltageSource', nodes: ['out', '0', 's', '0'], gain: -8 },
      r('R3', 'out', '0', 50),
    ]);
    expect(answer.problems).toEqual([]);
    expectPhasor(answer.voltage('out'), -4, 0);
    expectPhasor(answer.current('CS1'), 4 / 50, 0);
    expectPhasor(answer.current('CS1', 1), 0, 0);
    expectPhasor(answer.power('CS1'), -16 / 50, 0);
  });

  it('a voltage-controlled current source drives from its first node through itself to its second', () => {
    const answer = solved([
      drive(),
      { id: 'CS1', kind: 'voltageControlledCurrentSource', nodes: ['0', 'out', 'in', '0'], transconductance: 0.02 },
      c('C1', 'out', '0', 0.01),
    ]);
    expectPhasor(answer.current('CS1'), 0.02, 0);
    expectPhasor(answer.voltage('out'), 0, -2);
  });

  it.each([
    ['a resistor', r('R1', 'in', '0', 4), 0.25],
    ['a voltage source', null, -0.25],
  ] as const)('a current-controlled voltage source senses %s', (_what, sensed, current) => {
    const answer = solved([
      drive(),
      sensed ?? r('R1', 'in', '0', 4),
      {
        id: 'CS1',
        kind: 'currentControlledVoltageSource',
        nodes: ['out', '0'],
        sensedElement: sensed?.id ?? 'VS1',
        transresistance: 100,
      },
      r('R2', 'out', '0', 10),
    ]);
    expectPhasor(answer.voltage('out'), 100 * current, 0);
  });

  it('a current-controlled current source senses a given current', () => {
    const answer = solved([
      { id: 'IS1', kind: 'currentSource', nodes: ['0', 'a'], value: { rms: 2, phase: 90, frequency: null } },
      r('R1', 'a', '0', 1),
      { id: 'CS1', kind: 'currentControlledCurrentSource', nodes: ['0', 'out'], sensedElement: 'IS1', gain: 3 },
      r('R2', 'out', '0', 5),
    ]);
    expectPhasor(answer.voltage('out'), 0, 30);
  });

  it('one that feeds back makes a negative resistance, solved as it stands', () => {
    const answer = solved([
      drive(['in', '0']),
      r('R1', 'in', 'a', 100),
      { id: 'CS1', kind: 'voltageControlledCurrentSource', nodes: ['a', '0', 'a', '0'], transconductance: -0.005 },
    ]);
    expectPhasor(answer.voltage('a'), 2, 0);
  });
});

describe('transformers and coils', () => {
  it('an ideal transformer changes the impedance by the square of its ratio', () => {
    const answer = solved([
      drive(),
      { id: 'T1', kind: 'idealTransformer', nodes: ['in', '0', 'out', '0'], ratio: 4 },
      r('R1', 'out', '0', 50),
    ]);
    expectPhasor(answer.voltage('out'), 0.25, 0);
    expectPhasor(answer.current('T1'), 1 / 800, 0);
    expectPhasor(answer.current('T1', 1), -4 / 800, 0);
    expectPhasor(answer.power('T1'), 0, 0);
  });

  it('a side that nothing ties to the reference has currents and differences, but no node voltages', () => {
    const answer = solved([
      drive(),
      { id: 'T1', kind: 'idealTransformer', nodes: ['in', '0', 'p', 'q'], ratio: 0.5 },
      r('R1', 'p', 'q', 8),
    ]);
    expect(answer.problems.map(({ kind }) => kind)).toEqual(['noReference']);
    expect(answer.voltage('p')).toBeUndefined();
    expectPhasor(answer.elementVoltage('R1'), 2, 0);
    expectPhasor(answer.current('R1'), 0.25, 0);
    expectPhasor(answer.current('VS1'), -0.5, 0);
  });

  // ω = 1: the input impedance is jL₁ + M²/(R + jL₂).
  it.each([0, 0.3, -0.9, 1])('two coils with a coupling of %d reflect the load', (coupling) => {
    const [l1, l2, load] = [2, 8, 5];
    const m = coupling * Math.sqrt(l1 * l2);
    const answer = solved([
      drive(),
      { id: 'T1', kind: 'coupledInductors', nodes: ['in', '0', 'out', '0'], inductances: [l1, l2], coupling },
      r('R1', 'out', '0', load),
    ]);
    const square = load * load + l2 * l2;
    const zRe = (m * m * load) / square;
    const zIm = l1 - (m * m * l2) / square;
    const size = zRe * zRe + zIm * zIm;
    expectPhasor(answer.current('T1'), zRe / size, -zIm / size, 64);
  });

  it('three coils couple pairwise, in the order of their pairs', () => {
    const answer = solved([
      { id: 'IS1', kind: 'currentSource', nodes: ['0', 'a'], value: { rms: 1, phase: 0, frequency: null } },
      {
        id: 'T1',
        kind: 'coupledInductors',
        nodes: ['a', '0', 'b', '0', 'c', '0'],
        inductances: [1, 4, 9],
        coupling: [0.5, 0.25, 0.125],
      },
    ]);
    expectPhasor(answer.voltage('a'), 0, 1);
    expectPhasor(answer.voltage('b'), 0, 0.5 * 2);
    expectPhasor(answer.voltage('c'), 0, 0.25 * 3);
  });

  it('at 0 Hz a coil is closed and the others have nothing', () => {
    const answer = solved(
      [
        { ...drive(), value: { rms: 6, phase: 0, frequency: 0 } } as Element,
        r('R1', 'in', 'a', 3),
        { id: 'T1', kind: 'coupledInductors', nodes: ['a', '0', 'b', '0'], inductances: [1, 1], coupling: 0.9 },
        r('R2', 'b', '0', 7),
      ],
      0,
    );
    expectPhasor(answer.current('T1'), 2, 0);
    expectPhasor(answer.voltage('b'), 0, 0);
  });
});

describe('operational amplifiers', () => {
  const inverting = (amplifier: Partial<Element>): Element[] => [
    drive(),
    r('R1', 'in', 'm', 1000),
    r('R2', 'm', 'out', 10_000),
    { id: 'U1', kind: 'operationalAmplifier', nodes: ['0', 'm', 'out'], ...amplifier } as Element,
  ];

  it('an ideal one keeps its inputs at one voltage', () => {
    const answer = solved(inverting({}));
    expectPhasor(answer.voltage('out'), -10, 0);
    expect(answer.voltage('m')).toMatchObject({ re: 0, im: 0 });
    expectPhasor(answer.current('U1', 1), 10 / 10_000, 0);
  });

  it('one of finite gain and output resistance as its closed form', () => {
    const [gain, rOut] = [200, 75];
    const answer = solved(inverting({ openLoopGain: gain, outputResistance: rOut } as Partial<Element>));
    // v_out = −A·v_m + R_out·i, with i into the output what comes by R1 and R2.
    const divide = 1000 / 11_000;
    const loaded = 1 + gain * divide + rOut / 11_000;
    const out = -(gain * (10_000 / 11_000) - rOut / 11_000) / loaded;
    expectPhasor(answer.voltage('out'), out, 0, 64);
  });

  it('one of finite gain-bandwidth rolls off: a follower has 1/(1 + jf/f_T)', () => {
    const answer = solved([drive(), { id: 'U1', kind: 'operationalAmplifier', nodes: ['in', 'out', 'out'], gainBandwidth: 1e6 }], 1e6);
    expectPhasor(answer.voltage('out'), 0.5, -0.5);
  });

  it('without a way back to its inputs is said so', () => {
    const answer = solve(
      { version: 1, elements: [drive(), { id: 'U1', kind: 'operationalAmplifier', nodes: ['in', '0', 'out'] }, r('R1', 'out', '0', 1000)] },
      { frequency: 50 },
    );
    expect(answer).toMatchObject({ ok: false, kind: 'noFeedback', elements: ['U1'] });
  });

  it('has a way back by a sensed current that enters what given voltages hold', () => {
    // An ammeter of 0 V in the load's way to the reference, or the source that the output drives, tells the input.
    const back: Element = { id: 'CS1', kind: 'currentControlledVoltageSource', nodes: ['m', '0'], sensedElement: 'A1', transresistance: 500 };
    const amplifier: Element = { id: 'U1', kind: 'operationalAmplifier', nodes: ['in', 'm', 'out'] };
    const meter = (plus: string, rms: number): Element => ({ id: 'A1', kind: 'voltageSource', nodes: [plus, '0'], value: { rms, phase: 0, frequency: null } });
    const loaded = solved([drive(), amplifier, r('R1', 'out', 's', 1000), meter('s', 0), back]);
    expectPhasor(loaded.current('A1'), 1 / 500, 0);
    expectPhasor(loaded.voltage('out'), 2, 0);
    const held = solved([drive(), amplifier, meter('out', 5), back]);
    expectPhasor(held.current('U1', 1), -1 / 500, 0);
    // Without the sensing there is none.
    const open = solve({ version: 1, elements: [drive(), amplifier, r('R1', 'out', 's', 1000), meter('s', 0), r('R2', 'm', '0', 1)] }, { frequency: HZ });
    expect(open).toMatchObject({ ok: false, kind: 'noFeedback', elements: ['U1'] });
  });

  it('a follower of a node that nothing ties down is as little determined as the node, and that is said once', () => {
    const answer = solve(
      {
        version: 1,
        elements: [
          r('R1', 'a', 'p', 1000),
          c('C1', 'p', '0', 1e-9),
          { id: 'U1', kind: 'operationalAmplifier', nodes: ['p', 'out', 'out'] },
          r('R2', 'out', '0', 1000),
        ],
      },
      { frequency: 0 },
    );
    const problems = answer.ok ? answer.problems : [answer];
    expect(problems.map(({ kind, nodes }) => [kind, nodes])).toEqual([['floatingNode', ['a', 'p']]]);
    expect(answer.ok && answer.voltage('out')).toBeUndefined();
  });

  it('an integrator has no way back at 0 Hz, and has one above', () => {
    const elements = [
      { ...drive(), value: { rms: 1, phase: 0, frequency: null } } as Element,
      r('R1', 'in', 'm', 1000),
      c('C1', 'm', 'out', 1e-6),
      { id: 'U1', kind: 'operationalAmplifier', nodes: ['0', 'm', 'out'] } as Element,
    ];
    expect(solve({ version: 1, elements }, { frequency: 0 })).toMatchObject({ ok: false, kind: 'noFeedback' });
    expectPhasor(solved(elements, 1000 / (2 * Math.PI)).voltage('out'), 0, 1, 64);
  });
});

describe('lines and blocks', () => {
  it('a quarter-wave line turns a short into an open end, exactly', () => {
    const answer = solved(
      [drive(), r('R1', 'in', 'a', 50), { id: 'W1', kind: 'line', nodes: ['a', '0', 'b', '0'], impedance: 50, delay: 0.25 }, r('R2', 'b', '0', 1e-16)],
      1,
    );
    expectPhasor(answer.voltage('a'), 1, 0, 64);
  });

  it('a matched line delays and loses as it says', () => {
    const answer = solved(
      [
        drive(),
        r('R1', 'in', 'a', 75),
        { id: 'W1', kind: 'line', nodes: ['a', '0', 'b', '0'], impedance: 75, delay: 1e-6, loss: 20, lossFrequency: 1e6 },
        r('R2', 'b', '0', 75),
      ],
      4e6,
    );
    // Four whole turns; 20 dB·√4 is a factor of 1/100.
    expectPhasor(answer.voltage('b'), 0.005, 0, 64);
    expectPhasor(answer.voltage('a'), 0.5, 0, 64);
  });

  // θ = π/10 of a turn: the input impedance of a shorted line is jZ₀·tan θ.
  it.each([
    ['on the reference node', '0'],
    ['on a node of its own', 'b'],
  ])('a line shorted at its far end, %s, is reactive there and carries current', (_where, far) => {
    const theta = 2 * Math.PI * 0.1;
    const answer = solved(
      [
        drive(),
        r('R1', 'in', 'a', 50),
        { id: 'W1', kind: 'line', nodes: ['a', '0', far, far], impedance: 50, delay: 1e-6 },
        ...(far === '0' ? [] : [r('R2', far, '0', 7)]),
      ],
      1e5,
    );
    const size = 1 + Math.tan(theta) ** 2;
    expectPhasor(answer.voltage('a'), Math.tan(theta) ** 2 / size, Math.tan(theta) / size, 64);
    // |i₂| = |i₁|·1/cos θ: a standing wave, largest at the short.
    const [here, there] = [answer.current('W1')?.abs() ?? NaN, answer.current('W1', 1)?.abs() ?? NaN];
    expect(Math.abs(there - here / Math.cos(theta))).toBeLessThanOrEqual(64 * Number.EPSILON * there);
    expect(answer.elementVoltage('W1', 1)).toMatchObject({ re: 0, im: 0 });
  });

  it('a block of scattering parameters between its reference resistances gives its s21', () => {
    const points = [1, 100].map((frequency) => ({
      frequency,
      s11: [0.1, 0.2] as const,
      s12: [0, 0] as const,
      s21: frequency === 1 ? ([1, 0] as const) : ([0, 3] as const),
      s22: [0.3, -0.1] as const,
    }));
    const answer = solved(
      [drive(), r('R1', 'in', 'a', 50), { id: 'N1', kind: 'twoPort', nodes: ['a', '0', 'b', '0'], reference: 50, points }, r('R2', 'b', '0', 50)],
      10,
    );
    expectPhasor(answer.voltage('b'), 0.25, 0.75, 64);
    expectPhasor(answer.voltage('a'), 0.55, 0.1, 64);
  });

  it('a tabulated impedance is linear in log frequency, and not known outside its points', () => {
    const points = [
      { frequency: 10, resistance: 100, reactance: 0 },
      { frequency: 1000, resistance: 300, reactance: -200 },
    ];
    const elements: Element[] = [drive(), { id: 'Z1', kind: 'impedance', nodes: ['in', '0'], points }];
    expectPhasor(solved(elements, 100).current('Z1'), 200 / 50_000, 100 / 50_000);
    const outside = solve({ version: 1, elements }, { frequency: 1001 });
    expect(outside).toMatchObject({ ok: false, kind: 'noData', elements: ['Z1'] });
  });
});

describe('what a list may not say', () => {
  const refused = (element: object, message: RegExp): void => {
    const answer = solve({ version: 1, elements: [drive(), element as Element] }, { frequency: 50 });
    expect(answer).toMatchObject({ ok: false, kind: 'invalid', message: expect.stringMatching(message) as unknown });
  };

  it('a coupling beyond 1, and couplings that contradict each other', () => {
    const coils = { id: 'T1', kind: 'coupledInductors', nodes: ['in', '0', 'b', '0'], inductances: [1, 1] };
    refused({ ...coils, coupling: 1.001 }, /Element T1 has a coupling of 1\.001/);
    refused(
      { ...coils, nodes: ['in', '0', 'b', '0', 'c', '0'], inductances: [1, 1, 1], coupling: [0.9, 0.9, -0.9] },
      /T1 has couplings that contradict each other/,
    );
    refused({ ...coils, inductances: [1, 0], coupling: 0.5 }, /inductances above zero/);
  });

  it('a sensed element that is not there, or has no current of its own', () => {
    const sensing = { id: 'CS1', kind: 'currentControlledCurrentSource', nodes: ['in', '0'], gain: 1 };
    refused({ ...sensing, sensedElement: 'R9' }, /senses the current of R9, which is not in the list/);
    refused({ ...sensing }, /needs the id of an element/);
  });

  it('points that do not rise, and values that are none', () => {
    const points = [
      { frequency: 10, resistance: 1, reactance: 0 },
      { frequency: 10, resistance: 1, reactance: 0 },
    ];
    refused({ id: 'Z1', kind: 'impedance', nodes: ['in', '0'], points }, /do not rise in frequency, at point 2/);
    refused({ id: 'T1', kind: 'idealTransformer', nodes: ['in', '0', 'b', '0'], ratio: 0 }, /ratio that is not zero/);
    refused({ id: 'W1', kind: 'line', nodes: ['in', '0', 'b', '0'], impedance: 0, delay: 1 }, /above zero as its impedance/);
    refused({ id: 'U1', kind: 'operationalAmplifier', nodes: ['in', '0', 'b'], outputResistance: 5 }, /open-loop gain/);
  });
});
