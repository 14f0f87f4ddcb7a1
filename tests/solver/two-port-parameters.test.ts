import { Complex } from 'complex.js';
import { describe, expect, it } from 'vitest';
import type { PortReferences, TwoPortKind, TwoPortMatrix } from '@/solver/analysis/two-port-parameters';
import { cascade, convertTwoPort, newMatrix, renormalise } from '@/solver/analysis/two-port-parameters';
import {
  imageParameters,
  insertionLoss,
  returnLoss,
  rollettStability,
  stabilityDistance,
  standingWaveRatio,
  transducerLoss,
} from '@/solver/analysis/two-port-figures';
import { Random } from './support/random';

const KINDS: readonly TwoPortKind[] = ['impedance', 'admittance', 'hybrid', 'inverseHybrid', 'chain', 'scattering'];
const Z0: PortReferences = [50, 50];

function matrix(...entries: readonly (Complex | number)[]): TwoPortMatrix {
  const made = newMatrix();
  entries.forEach((entry, at) => {
    const { re, im } = new Complex(entry);
    made[2 * at] = re;
    made[2 * at + 1] = im;
  });
  return made;
}

function entries(m: TwoPortMatrix): readonly [Complex, Complex, Complex, Complex] {
  return [0, 2, 4, 6].map((at) => new Complex(m[at] ?? 0, m[at + 1] ?? 0)) as [Complex, Complex, Complex, Complex];
}

/** |difference| of two matrices against the larger of each entry and its row's terms: the norm. */
function apart(one: TwoPortMatrix, other: TwoPortMatrix): number {
  const size = Math.hypot(...other);
  return Math.hypot(...one.map((value, at) => value - (other[at] ?? 0))) / size;
}

function converted(from: TwoPortKind, to: TwoPortKind, m: TwoPortMatrix, references: PortReferences = Z0): TwoPortMatrix {
  const out = newMatrix();
  expect(convertTwoPort(from, to, m, references, out), `${from} to ${to}`).toBe(true);
  return out;
}

function randomMatrix(random: Random): TwoPortMatrix {
  return Float64Array.from({ length: 8 }, () => random.between(-1, 1));
}

/**
 * Frickey, IEEE Trans. MTT-42 (1994) 205, tables I and II for real references, and any textbook on two-ports [from
 * memory, each checked against the definitions]: for z in units of the port references.
 */
function byFormula(z: TwoPortMatrix, [r1, r2]: PortReferences): Readonly<Record<TwoPortKind, TwoPortMatrix>> {
  const [z11, z12, z21, z22] = entries(z);
  const det = z11.mul(z22).sub(z12.mul(z21));
  const sum = z11.add(r1).mul(z22.add(r2)).sub(z12.mul(z21));
  const cross = 2 * Math.sqrt(r1 * r2);
  return {
    impedance: z,
    admittance: matrix(z22.div(det), z12.neg().div(det), z21.neg().div(det), z11.div(det)),
    hybrid: matrix(det.div(z22), z12.div(z22), z21.neg().div(z22), z22.inverse()),
    inverseHybrid: matrix(z11.inverse(), z12.neg().div(z11), z21.div(z11), det.div(z11)),
    chain: matrix(z11.div(z21), det.div(z21), z21.inverse(), z22.div(z21)),
    scattering: matrix(
      z11.sub(r1).mul(z22.add(r2)).sub(z12.mul(z21)).div(sum),
      z12.mul(cross).div(sum),
      z21.mul(cross).div(sum),
      z11.add(r1).mul(z22.sub(r2)).sub(z12.mul(z21)).div(sum),
    ),
  };
}

describe('conversions of two-port parameters', () => {
  it('are those of the tables, between every two kinds, with unequal references too', () => {
    const random = new Random(31);
    for (let round = 0; round < 200; round++) {
      const references: PortReferences = [random.between(0.2, 5), random.between(0.2, 5)];
      const tables = byFormula(randomMatrix(random), references);
      const condition = Math.max(...KINDS.map((kind) => Math.hypot(...tables[kind]))) ** 2;
      for (const from of KINDS) {
        for (const to of KINDS) {
          expect(apart(converted(from, to, tables[from], references), tables[to])).toBeLessThanOrEqual(
            8 * Number.EPSILON * (1 + condition),
          );
        }
      }
    }
  });

  it('go from scattering to chain and back within 1e-15, for any impedance in series', () => {
    const random = new Random(32);
    for (let round = 0; round < 1000; round++) {
      const z = new Complex(50 * 10 ** random.between(-3, 1), 50 * random.between(-1, 1) * 10 ** random.between(-3, 1));
      const scattering = converted('chain', 'scattering', matrix(1, z, 0, 1));
      const back = converted('chain', 'scattering', converted('scattering', 'chain', scattering));
      expect(Math.max(...back.map((value, at) => Math.abs(value - (scattering[at] ?? 0))))).toBeLessThan(1e-15);
    }
  });

  it('say which parameters do not exist', () => {
    const series = matrix(1, new Complex(50, 25), 0, 1);
    const shunt = matrix(1, 0, new Complex(0.02, 0.01), 1);
    const isolator = matrix(0, 0, 1, 0);
    const blocked = matrix(0.5, 0, 0, 0.5);
    const through = matrix(1, 0, 0, 1);
    const exists = (from: TwoPortKind, m: TwoPortMatrix) =>
      KINDS.filter((kind) => convertTwoPort(from, kind, m, Z0, newMatrix()));
    expect(exists('chain', series)).toEqual(['admittance', 'hybrid', 'inverseHybrid', 'chain', 'scattering']);
    expect(exists('chain', shunt)).toEqual(['impedance', 'hybrid', 'inverseHybrid', 'chain', 'scattering']);
    expect(exists('chain', through)).toEqual(['hybrid', 'inverseHybrid', 'chain', 'scattering']);
    expect(exists('scattering', isolator)).toEqual(['impedance', 'admittance', 'hybrid', 'inverseHybrid', 'chain', 'scattering']);
    expect(exists('scattering', blocked)).toEqual(['impedance', 'admittance', 'hybrid', 'inverseHybrid', 'scattering']);
    // Also when the scattering parameters were rounded on the way.
    expect(exists('scattering', converted('chain', 'scattering', series))).not.toContain('impedance');
    const zeros = newMatrix();
    expect(convertTwoPort('chain', 'impedance', series, Z0, zeros)).toBe(false);
    expect([...zeros]).toEqual([0, 0, 0, 0, 0, 0, 0, 0]);
  });

  it('take other reference resistances as a conversion by way of the chain matrix does', () => {
    const random = new Random(33);
    for (let round = 0; round < 100; round++) {
      const s = Float64Array.from({ length: 8 }, () => random.between(-0.45, 0.45));
      const [one, other]: [PortReferences, PortReferences] = [
        [random.between(10, 90), random.between(10, 90)],
        [random.between(10, 90), random.between(10, 90)],
      ];
      const direct = newMatrix();
      expect(renormalise(s, one, other, direct)).toBe(true);
      const chain = converted('scattering', 'chain', s, one);
      expect(apart(direct, converted('chain', 'scattering', chain, other))).toBeLessThanOrEqual(
        16 * Number.EPSILON * (1 + Math.hypot(...chain) / 10),
      );
    }
  });
});

describe('a cascade', () => {
  it('is the product of the chain matrices', () => {
    const series = matrix(1, new Complex(10, 5), 0, 1);
    const shunt = matrix(1, 0, new Complex(0.1, -0.2), 1);
    const out = newMatrix();
    cascade(series, shunt, out);
    // 1 + Z·Y = 1 + (10 + 5j)(0.1 − 0.2j) = 3 − 1.5j
    expect([...out]).toEqual([...matrix(new Complex(3, -1.5), new Complex(10, 5), new Complex(0.1, -0.2), 1)]);
    cascade(series, series, series);
    expect([...series]).toEqual([...matrix(1, new Complex(20, 10), 0, 1)]);
  });
});

describe('figures of two-ports', () => {
  it('gives return loss as a positive number, and the standing-wave ratio', () => {
    expect(returnLoss(new Complex(0.1, 0))).toBeCloseTo(20, 13);
    expect(standingWaveRatio(new Complex(0, -0.5))).toBe(3);
    expect(returnLoss(new Complex(0, 0))).toBeUndefined();
    expect(standingWaveRatio(new Complex(1, 0))).toBeUndefined();
    expect(standingWaveRatio(new Complex(0, 0))).toBe(1);
  });

  it('takes insertion loss against the same source and load without the two-port', () => {
    const nothing = converted('chain', 'scattering', matrix(1, 0, 0, 1));
    expect(Math.abs(insertionLoss(nothing, Z0, [10, 1000]) ?? NaN)).toBeLessThanOrEqual(1e-14);
    // 100 Ω in series between 50 and 50 Ω: half the voltage.
    const series = converted('chain', 'scattering', matrix(1, 100, 0, 1));
    expect(insertionLoss(series, Z0, [50, 50])).toBeCloseTo(20 * Math.log10(2), 13);
    expect(insertionLoss(matrix(0.5, 0, 0, 0.5), Z0, [50, 50])).toBeUndefined();
    // What is available from 10 Ω and not taken by 1000 Ω: 10 lg(1010²/(4·10·1000)).
    expect(transducerLoss(nothing, Z0, [10, 1000])).toBeCloseTo(10 * Math.log10(1010 ** 2 / 40_000), 12);
  });

  it('has the image parameters of an L section as its open and shorted impedances give them', () => {
    // Z in series from port 1, Y across port 2: Z_open = Z + 1/Y, Z_short = Z.
    const z = new Complex(30, 40);
    const y = new Complex(0.01, -0.002);
    const chain = matrix(z.mul(y).add(1), z, y, 1);
    const image = imageParameters(chain);
    const open = z.add(y.inverse());
    expect(image?.impedances[0].sub(open.mul(z).sqrt()).abs()).toBeLessThan(1e-13);
    // tanh γ = √(Z_short/Z_open)
    expect(image?.transfer.tanh().sub(z.div(open).sqrt()).abs()).toBeLessThan(1e-15);
    expect(image?.transfer.re).toBeGreaterThan(0);
    expect(imageParameters(matrix(1, z, 0, 1))).toBeUndefined();
  });

  it('has the image parameters of a low-pass T in its pass band and beyond', () => {
    // jX/2 – jB – jX/2 with X·B = x: cosh γ = 1 − x/2.
    const section = (x: number) => {
      const out = newMatrix();
      const arm = matrix(1, new Complex(0, x / 2), 0, 1);
      cascade(arm, matrix(1, 0, new Complex(0, 1), 1), out);
      cascade(out, arm, out);
      return imageParameters(out);
    };
    const pass = section(2);
    expect(pass?.transfer.re).toBeCloseTo(0, 14);
    expect(pass?.transfer.im).toBeCloseTo(Math.PI / 2, 14);
    expect(pass?.impedances[0].re).toBeCloseTo(1, 14);
    const stop = section(8);
    expect(stop?.transfer.re).toBeCloseTo(Math.acosh(3), 14);
    expect(Math.abs(stop?.transfer.im ?? 0)).toBeCloseTo(Math.PI, 14);
    expect(Math.abs(stop?.impedances[0].re ?? 1)).toBeLessThan(1e-14);
  });

  it('judges stability by both tests alike', () => {
    const random = new Random(34);
    for (let round = 0; round < 2000; round++) {
      const s = Float64Array.from({ length: 8 }, () => random.between(-1, 1));
      const rollett = rollettStability(s);
      const distance = stabilityDistance(s);
      if (rollett === undefined || distance === undefined) throw new Error('not defined');
      expect(rollett.factor > 1 && rollett.determinant < 1).toBe(distance > 1);
    }
    expect(rollettStability(matrix(0.5, 0, 2, 0.5))).toBeUndefined();
    expect(stabilityDistance(matrix(0, 0, 2, 0))).toBeUndefined();
  });
});
