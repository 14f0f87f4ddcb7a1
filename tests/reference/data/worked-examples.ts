/**
 * Worked alternating-current examples from textbooks, as far as resistors, capacitors, inductors and sources build
 * them. Numbers and topology only; the source stands with each. `printed` is what the book prints, with a tolerance of
 * its last digits [found: read in the texts named]; `computed` is an independent nodal solution to six digits
 * [computed]. `memory` marks figures that were recalled and then confirmed by that calculation.
 *
 * Element kinds: R ohms, L henries, C farads, Z a fixed impedance [re, im], W a wire, V and I sources [rms, degrees].
 * Quantities: V(a) or V(a,b) volts, I(name) from first node to second, E(name) the voltage across, Zs(name) the
 * impedance seen by a source, Sc(name) the power absorbed. `omega` 1 means that the drawing gives impedances directly.
 */
export interface WorkedElement {
  readonly n: string;
  readonly t: 'R' | 'L' | 'C' | 'Z' | 'W' | 'V' | 'I';
  readonly nodes: readonly [string, string];
  readonly v?: number | readonly [number, number];
}

export interface WorkedFigure {
  readonly q: string;
  readonly printed:
    | {
        readonly magnitude: number;
        readonly within: number;
        readonly degrees?: number;
        readonly withinDegrees?: number;
      }
    | { readonly re: number; readonly im: number; readonly within: number };
  readonly computed: { readonly re: number; readonly im: number };
}

export interface WorkedExample {
  readonly id: string;
  readonly source: string;
  readonly title: string;
  readonly mark: 'found' | 'memory';
  readonly omega?: number;
  readonly frequency?: number;
  readonly elements: readonly WorkedElement[];
  readonly expect: readonly WorkedFigure[];
}

export const WORKED_EXAMPLES: readonly WorkedExample[] = [
  {
    id: 'K01',
    source:
      'Kuphaldt, Lessons In Electric Circuits Vol. II AC (Design Science License), ch. 2 "Some examples with AC circuits" (figs 02046,12012)',
    title: 'three series sources on a load',
    mark: 'found',
    frequency: 60,
    elements: [
      { n: 'E3', t: 'V', nodes: ['1', '0'], v: [15, 0] },
      { n: 'E2', t: 'V', nodes: ['2', '1'], v: [12, 35] },
      { n: 'E1', t: 'V', nodes: ['3', '2'], v: [22, -64] },
      { n: 'R', t: 'R', nodes: ['3', '0'], v: 10000.0 },
    ],
    expect: [
      { q: 'V(3)', printed: { re: 34.474, im: -12.8906, within: 0.00689 }, computed: { re: 34.474, im: -12.8906 } },
    ],
  },
  {
    id: 'K03',
    source:
      'Kuphaldt, Lessons In Electric Circuits Vol. II AC (Design Science License), ch. 3 "Series resistor-inductor circuits"',
    title: 'series RL',
    mark: 'found',
    frequency: 60,
    elements: [
      { n: 'V1', t: 'V', nodes: ['1', '0'], v: [10, 0] },
      { n: 'R', t: 'R', nodes: ['1', '2'], v: 5 },
      { n: 'L', t: 'L', nodes: ['2', '0'], v: 0.01 },
    ],
    expect: [
      {
        q: 'Zs(V1)',
        printed: { magnitude: 6.262, within: 0.0125, degrees: 37.016, withinDegrees: 0.15 },
        computed: { re: 5.0, im: 3.76991 },
      },
      {
        q: 'I(R)',
        printed: { magnitude: 1.597, within: 0.00319, degrees: -37.016, withinDegrees: 0.15 },
        computed: { re: 1.27511, im: -0.961412 },
      },
      {
        q: 'E(R)',
        printed: { magnitude: 7.9847, within: 0.016, degrees: -37.016, withinDegrees: 0.15 },
        computed: { re: 6.37556, im: -4.80706 },
      },
      {
        q: 'E(L)',
        printed: { magnitude: 6.0203, within: 0.012, degrees: 52.984, withinDegrees: 0.15 },
        computed: { re: 3.62444, im: 4.80706 },
      },
    ],
  },
  {
    id: 'K05',
    source:
      'Kuphaldt, Lessons In Electric Circuits Vol. II AC (Design Science License), ch. 4 "Series resistor-capacitor circuits"',
    title: 'series RC',
    mark: 'found',
    frequency: 60,
    elements: [
      { n: 'V1', t: 'V', nodes: ['1', '0'], v: [10, 0] },
      { n: 'R', t: 'R', nodes: ['1', '2'], v: 5 },
      { n: 'C', t: 'C', nodes: ['2', '0'], v: 0.0001 },
    ],
    expect: [
      {
        q: 'Zs(V1)',
        printed: { magnitude: 26.993, within: 0.054, degrees: -79.325, withinDegrees: 0.15 },
        computed: { re: 5.0, im: -26.5258 },
      },
      {
        q: 'I(R)',
        printed: { magnitude: 0.3705, within: 0.000741, degrees: 79.325, withinDegrees: 0.15 },
        computed: { re: 0.0686229, im: 0.364056 },
      },
      {
        q: 'E(R)',
        printed: { magnitude: 1.8523, within: 0.0037, degrees: 79.325, withinDegrees: 0.15 },
        computed: { re: 0.343115, im: 1.82028 },
      },
      {
        q: 'E(C)',
        printed: { magnitude: 9.8269, within: 0.0197, degrees: -10.675, withinDegrees: 0.15 },
        computed: { re: 9.65689, im: -1.82028 },
      },
    ],
  },
  {
    id: 'K07',
    source: 'Kuphaldt, Lessons In Electric Circuits Vol. II AC (Design Science License), ch. 5 "Series R, L, and C"',
    title: 'series RLC',
    mark: 'found',
    frequency: 60,
    elements: [
      { n: 'V1', t: 'V', nodes: ['1', '0'], v: [120, 0] },
      { n: 'R', t: 'R', nodes: ['1', '2'], v: 250 },
      { n: 'L', t: 'L', nodes: ['2', '3'], v: 0.65 },
      { n: 'C', t: 'C', nodes: ['3', '0'], v: 1.5e-6 },
    ],
    expect: [
      {
        q: 'Zs(V1)',
        printed: { magnitude: 1543.7, within: 3.09, degrees: -80.68, withinDegrees: 0.15 },
        computed: { re: 250.0, im: -1523.34 },
      },
      {
        q: 'I(R)',
        printed: { magnitude: 0.077734, within: 0.000155, degrees: 80.68, withinDegrees: 0.15 },
        computed: { re: 0.0125888, im: 0.0767081 },
      },
      {
        q: 'E(R)',
        printed: { magnitude: 19.434, within: 0.0389, degrees: 80.68, withinDegrees: 0.15 },
        computed: { re: 3.14719, im: 19.177 },
      },
      {
        q: 'E(L)',
        printed: { magnitude: 19.048, within: 0.0381, degrees: 170.68, withinDegrees: 0.15 },
        computed: { re: -18.7969, im: 3.0848 },
      },
      {
        q: 'E(C)',
        printed: { magnitude: 137.46, within: 0.275, degrees: -9.3199, withinDegrees: 0.15 },
        computed: { re: 135.65, im: -22.2618 },
      },
    ],
  },
  {
    id: 'K09',
    source:
      'Kuphaldt, Lessons In Electric Circuits Vol. II AC (Design Science License), ch. 5 "Series-parallel R, L, and C"',
    title: 'C1 in series with R || (L + C2)',
    mark: 'found',
    frequency: 60,
    elements: [
      { n: 'V1', t: 'V', nodes: ['1', '0'], v: [120, 0] },
      { n: 'C1', t: 'C', nodes: ['1', '2'], v: 4.7e-6 },
      { n: 'L', t: 'L', nodes: ['2', '3'], v: 0.65 },
      { n: 'C2', t: 'C', nodes: ['3', '0'], v: 1.5e-6 },
      { n: 'R', t: 'R', nodes: ['2', '0'], v: 470 },
    ],
    expect: [
      {
        q: 'Zs(V1)',
        printed: { magnitude: 818.34, within: 1.64, degrees: -58.371, withinDegrees: 0.15 },
        computed: { re: 429.149, im: -696.785 },
      },
      {
        q: 'I(C1)',
        printed: { magnitude: 0.14664, within: 0.000293, degrees: 58.371, withinDegrees: 0.15 },
        computed: { re: 0.0768994, im: 0.124857 },
      },
      {
        q: 'E(C1)',
        printed: { magnitude: 82.76, within: 0.166, degrees: -31.629, withinDegrees: 0.15 },
        computed: { re: 70.4669, im: -43.4004 },
      },
      {
        q: 'E(R)',
        printed: { magnitude: 65.857, within: 0.132, degrees: 41.225, withinDegrees: 0.15 },
        computed: { re: 49.5331, im: 43.4004 },
      },
      {
        q: 'I(R)',
        printed: { magnitude: 0.14012, within: 0.00028, degrees: 41.225, withinDegrees: 0.15 },
        computed: { re: 0.10539, im: 0.0923413 },
      },
      {
        q: 'I(L)',
        printed: { magnitude: 0.043232, within: 8.65e-5, degrees: 131.22, withinDegrees: 0.15 },
        computed: { re: -0.0284902, im: 0.032516 },
      },
      {
        q: 'E(L)',
        printed: { magnitude: 10.594, within: 0.0212, degrees: 221.22, withinDegrees: 0.15 },
        computed: { re: -7.96787, im: -6.98136 },
      },
      {
        q: 'E(C2)',
        printed: { magnitude: 76.451, within: 0.153, degrees: 41.225, withinDegrees: 0.15 },
        computed: { re: 57.501, im: 50.3818 },
      },
    ],
  },
  {
    id: 'K11',
    source:
      'Kuphaldt, Lessons In Electric Circuits Vol. II AC (Design Science License), ch. 11 "Power in resistive and reactive AC circuits"/"True, Reactive, and Apparent power"',
    title: 'RL load, powers (rms phasors)',
    mark: 'found',
    frequency: 60,
    elements: [
      { n: 'V1', t: 'V', nodes: ['1', '0'], v: [120, 0] },
      { n: 'L', t: 'L', nodes: ['1', '2'], v: 0.16 },
      { n: 'R', t: 'R', nodes: ['2', '0'], v: 60 },
    ],
    expect: [
      {
        q: 'Zs(V1)',
        printed: { magnitude: 85.078, within: 0.17, degrees: 45.152, withinDegrees: 0.15 },
        computed: { re: 60.0, im: 60.3186 },
      },
      {
        q: 'I(R)',
        printed: { magnitude: 1.41, within: 0.00282, degrees: -45.152, withinDegrees: 0.15 },
        computed: { re: 0.994704, im: -0.999986 },
      },
      { q: 'Sc(R)', printed: { re: 119.365, im: 0, within: 0.0239 }, computed: { re: 119.365, im: -7.10543e-15 } },
      { q: 'Sc(L)', printed: { re: 0, im: 119.998, within: 0.024 }, computed: { re: 0.0, im: 119.998 } },
    ],
  },
  {
    id: 'K13',
    source:
      'Kuphaldt, Lessons In Electric Circuits Vol. II AC (Design Science License), ch. 10 "Three-phase power systems"/single-phase section (fig 12112-12113)',
    title: 'two sources 120 deg apart, two 10 kW 120 V loads, shared neutral',
    mark: 'found',
    frequency: 60,
    elements: [
      { n: 'VA', t: 'V', nodes: ['a', '0'], v: [120, 0] },
      { n: 'VB', t: 'V', nodes: ['b', '0'], v: [120, 120] },
      { n: 'RA', t: 'R', nodes: ['a', 'n'], v: 1.44 },
      { n: 'RB', t: 'R', nodes: ['b', 'n'], v: 1.44 },
      { n: 'WN', t: 'W', nodes: ['n', '0'] },
    ],
    expect: [
      {
        q: 'V(a,b)',
        printed: { magnitude: 207.85, within: 0.416, degrees: -30.0, withinDegrees: 0.15 },
        computed: { re: 180.0, im: -103.923 },
      },
      {
        q: 'I(RA)',
        printed: { magnitude: 83.33, within: 0.167, degrees: 0.0, withinDegrees: 0.15 },
        computed: { re: 83.3333, im: 0.0 },
      },
      {
        q: 'I(RB)',
        printed: { magnitude: 83.33, within: 0.167, degrees: 120.0, withinDegrees: 0.15 },
        computed: { re: -41.6667, im: 72.1688 },
      },
    ],
  },
  {
    id: 'B02',
    source:
      'Bird, Electrical Circuit Theory and Technology 2nd ed. 2003 (executed FOSSEE textbook-companion notebook), ch. 31 ex. 3',
    title: 'three-phase star load, no neutral (3+j4 per phase, 415 V line)',
    mark: 'found',
    omega: 1,
    elements: [
      { n: 'V1', t: 'V', nodes: ['r', 'y'], v: [415, 120] },
      { n: 'V2', t: 'V', nodes: ['y', 'b'], v: [415, 0] },
      { n: 'ZR', t: 'Z', nodes: ['r', 'n'], v: [3, 4] },
      { n: 'ZY', t: 'Z', nodes: ['y', 'n'], v: [3, 4] },
      { n: 'ZB', t: 'Z', nodes: ['b', 'n'], v: [3, 4] },
      { n: 'RG', t: 'R', nodes: ['n', '0'], v: 1000000000.0 },
    ],
    expect: [
      { q: 'I(ZR)', printed: { re: 38.34, im: 28.75, within: 0.00767 }, computed: { re: 38.3361, im: 28.752 } },
      { q: 'I(ZY)', printed: { re: 5.73, im: -47.58, within: 0.00952 }, computed: { re: 5.73197, im: -47.576 } },
      { q: 'I(ZB)', printed: { re: -44.07, im: 18.82, within: 0.00881 }, computed: { re: -44.068, im: 18.824 } },
    ],
  },
  {
    id: 'B04',
    source:
      'Bird, Electrical Circuit Theory and Technology 2nd ed. 2003 (executed FOSSEE textbook-companion notebook), ch. 30 ex. 1 and ch. 31 ex. 6',
    title: 'two sources, one node',
    mark: 'found',
    omega: 1,
    elements: [
      { n: 'V1', t: 'V', nodes: ['1', '0'], v: [100, 0] },
      { n: 'R1', t: 'R', nodes: ['1', 'n'], v: 25 },
      { n: 'R2', t: 'R', nodes: ['n', '0'], v: 20 },
      { n: 'V2', t: 'V', nodes: ['2', '0'], v: [50, 90] },
      { n: 'R3', t: 'R', nodes: ['2', 'n'], v: 10 },
    ],
    expect: [
      { q: 'I(R1)', printed: { re: 3.16, im: -1.05, within: 0.006 }, computed: { re: 3.15789, im: -1.05263 } },
      { q: 'I(R2)', printed: { re: 1.05, im: 1.32, within: 0.006 }, computed: { re: 1.05263, im: 1.31579 } },
      { q: 'I(R3)', printed: { re: -2.11, im: 2.37, within: 0.006 }, computed: { re: -2.10526, im: 2.36842 } },
    ],
  },
  {
    id: 'B06',
    source:
      'Bird, Electrical Circuit Theory and Technology 2nd ed. 2003 (executed FOSSEE textbook-companion notebook), ch. 31 ex. 8',
    title: 'current source, two nodes, open-circuit p.d.',
    mark: 'found',
    omega: 1,
    elements: [
      { n: 'I1', t: 'I', nodes: ['0', '1'], v: [25, 0] },
      { n: 'R1', t: 'R', nodes: ['1', 'x'], v: 4 },
      { n: 'Z2', t: 'Z', nodes: ['x', '0'], v: [0, 3] },
      { n: 'R3', t: 'R', nodes: ['1', '2'], v: 5 },
      { n: 'Z4', t: 'Z', nodes: ['2', '0'], v: [0, 10] },
      { n: 'Z5', t: 'Z', nodes: ['2', '0'], v: [0, 20] },
    ],
    expect: [
      { q: 'V(x,2)', printed: { re: -16.16, im: -15.05, within: 0.006 }, computed: { re: -16.1624, im: -15.0478 } },
    ],
  },
  {
    id: 'B08',
    source:
      'Bird, Electrical Circuit Theory and Technology 2nd ed. 2003 (executed FOSSEE textbook-companion notebook), ch. 33 ex. 1',
    title: 'divider with complex load',
    mark: 'found',
    omega: 1,
    elements: [
      { n: 'V1', t: 'V', nodes: ['1', '0'], v: [200, 0] },
      { n: 'R1', t: 'R', nodes: ['1', '2'], v: 5000.0 },
      { n: 'R2', t: 'R', nodes: ['2', '0'], v: 20000.0 },
      { n: 'R4', t: 'R', nodes: ['2', '3'], v: 150000.0 },
      { n: 'ZC', t: 'Z', nodes: ['3', '0'], v: [0, -120000.0] },
    ],
    expect: [
      { q: 'I(R4)', printed: { magnitude: 0.00082, within: 1.64e-6 }, computed: { re: 0.000646448, im: 0.000503725 } },
      { q: 'E(R4)', printed: { magnitude: 122.93, within: 0.246 }, computed: { re: 96.9672, im: 75.5588 } },
    ],
  },
  {
    id: 'B18',
    source:
      'Bird, Electrical Circuit Theory and Technology 2nd ed. 2003 (executed FOSSEE textbook-companion notebook), ch. 28 ex. 5',
    title: 'series RLC, p.d. across C at resonance',
    mark: 'found',
    omega: 11180.339887498949,
    elements: [
      { n: 'V1', t: 'V', nodes: ['1', '0'], v: [12, 0] },
      { n: 'R', t: 'R', nodes: ['1', '2'], v: 80 },
      { n: 'L', t: 'L', nodes: ['2', '3'], v: 0.02 },
      { n: 'C', t: 'C', nodes: ['3', '0'], v: 4e-7 },
    ],
    expect: [{ q: 'E(C)', printed: { magnitude: 33.54, within: 0.0671 }, computed: { re: -4.21885e-14, im: -33.541 } }],
  },
  {
    id: 'B20',
    source:
      'Bird, Electrical Circuit Theory and Technology 2nd ed. 2003 (executed FOSSEE textbook-companion notebook), ch. 29 ex. 1',
    title: 'parallel (coil 10 ohm 5 mH) || 0.25 uF at its unity-power-factor frequency',
    mark: 'found',
    frequency: 4490.31,
    elements: [
      { n: 'V1', t: 'V', nodes: ['1', '0'], v: [50, 0] },
      { n: 'R', t: 'R', nodes: ['1', '2'], v: 10 },
      { n: 'L', t: 'L', nodes: ['2', '0'], v: 0.005 },
      { n: 'C', t: 'C', nodes: ['1', '0'], v: 2.5e-7 },
    ],
    expect: [
      {
        q: 'Zs(V1)',
        printed: { magnitude: 2000.0, within: 4.0, degrees: 0.0, withinDegrees: 0.05 },
        computed: { re: 2000.0, im: 0.0440638 },
      },
    ],
  },
  {
    id: 'B22',
    source:
      'Bird, Electrical Circuit Theory and Technology 2nd ed. 2003 (executed FOSSEE textbook-companion notebook), ch. 41 ex. 10',
    title: 'symmetrical T pad 300/450/300 between 600 ohm: image-matched, 9.54 dB',
    mark: 'found',
    omega: 1,
    elements: [
      { n: 'I1', t: 'I', nodes: ['0', '1'], v: [1, 0] },
      { n: 'Ra', t: 'R', nodes: ['1', '2'], v: 300 },
      { n: 'Rs', t: 'R', nodes: ['2', '0'], v: 450 },
      { n: 'Rb', t: 'R', nodes: ['2', '3'], v: 300 },
      { n: 'RL', t: 'R', nodes: ['3', '0'], v: 600 },
    ],
    expect: [
      {
        q: 'V(1)',
        printed: { magnitude: 600.0, within: 1.2, degrees: 0.0, withinDegrees: 0.15 },
        computed: { re: 600.0, im: 0.0 },
      },
      {
        q: 'I(RL)',
        printed: { magnitude: 0.3334264, within: 0.000667, degrees: 0.0, withinDegrees: 0.15 },
        computed: { re: 0.333333, im: 0.0 },
      },
    ],
  },
  {
    id: 'H01',
    source: 'Hambley, Electrical Engineering: Principles and Applications 5th ed. (executed FOSSEE notebook), ex. 5.4',
    title: 'series RLC, peak phasors',
    mark: 'found',
    omega: 500,
    elements: [
      { n: 'V1', t: 'V', nodes: ['1', '0'], v: [100, 30] },
      { n: 'R', t: 'R', nodes: ['1', '2'], v: 100 },
      { n: 'L', t: 'L', nodes: ['2', '3'], v: 0.3 },
      { n: 'C', t: 'C', nodes: ['3', '0'], v: 4e-5 },
    ],
    expect: [
      {
        q: 'E(R)',
        printed: { magnitude: 70.71, within: 0.141, degrees: -15.0, withinDegrees: 0.15 },
        computed: { re: 68.3013, im: -18.3013 },
      },
      {
        q: 'E(L)',
        printed: { magnitude: 106.07, within: 0.212, degrees: 75.0, withinDegrees: 0.15 },
        computed: { re: 27.4519, im: 102.452 },
      },
      {
        q: 'E(C)',
        printed: { magnitude: 35.36, within: 0.0707, degrees: -105.0, withinDegrees: 0.15 },
        computed: { re: -9.15064, im: -34.1506 },
      },
    ],
  },
  {
    id: 'H03',
    source: 'Hambley, Electrical Engineering: Principles and Applications 5th ed. (executed FOSSEE notebook), ex. 5.6',
    title: 'two-node with a voltage- and a current source',
    mark: 'found',
    omega: 100,
    elements: [
      { n: 'IS1', t: 'I', nodes: ['0', '1'], v: [2, -90] },
      { n: 'R', t: 'R', nodes: ['1', '0'], v: 10 },
      { n: 'C', t: 'Z', nodes: ['1', '2'], v: [0, -5] },
      { n: 'L', t: 'Z', nodes: ['2', '0'], v: [0, 10] },
      { n: 'IS2', t: 'I', nodes: ['0', '2'], v: [1.5, 0] },
    ],
    expect: [
      {
        q: 'V(1)',
        printed: { magnitude: 16.12, within: 0.0322, degrees: 29.74, withinDegrees: 0.15 },
        computed: { re: 14.0, im: 8.0 },
      },
    ],
  },
  {
    id: 'F01',
    source:
      'Franco, Design with Operational Amplifiers and Analog Integrated Circuits 3rd ed. (executed FOSSEE notebook), example 3.3',
    title: 'series RLC, output across R; vi = 10 cos(1000t + 45 deg)',
    mark: 'found',
    omega: 1000,
    elements: [
      { n: 'V1', t: 'V', nodes: ['1', '0'], v: [10, 45] },
      { n: 'L', t: 'L', nodes: ['1', '2'], v: 0.005 },
      { n: 'C', t: 'C', nodes: ['2', '3'], v: 4e-5 },
      { n: 'R', t: 'R', nodes: ['3', '0'], v: 10 },
    ],
    expect: [
      {
        q: 'V(3)',
        printed: { magnitude: 4.472, within: 0.00894, degrees: 108.43, withinDegrees: 0.15 },
        computed: { re: -1.41421, im: 4.24264 },
      },
    ],
  },
];
