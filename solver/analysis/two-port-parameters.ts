/**
 * The parameters of two-ports, and how each kind follows from every other. A matrix is eight numbers in a Float64Array:
 * re and im of 11, 12, 21 and 22. Voltages and currents v₁, i₁, v₂, i₂, both currents entering.
 *
 * - `impedance`: v₁ = z₁₁·i₁ + z₁₂·i₂, v₂ = z₂₁·i₁ + z₂₂·i₂, Ω
 * - `admittance`: i₁ = y₁₁·v₁ + y₁₂·v₂, i₂ = y₂₁·v₁ + y₂₂·v₂, S
 * - `hybrid`: v₁ = h₁₁·i₁ + h₁₂·v₂, i₂ = h₂₁·i₁ + h₂₂·v₂
 * - `inverseHybrid`: i₁ = g₁₁·v₁ + g₁₂·i₂, v₂ = g₂₁·v₁ + g₂₂·i₂
 * - `chain`: v₁ = A·v₂ + B·(−i₂), i₁ = C·v₂ + D·(−i₂)
 * - `scattering`: b = S·a with a = (v + R·i)/2√R and b = (v − R·i)/2√R at each port, R real and positive
 *
 * Frickey, IEEE Trans. Microwave Theory Tech. 42 (1994) 205, doi 10.1109/22.275248, gives all of them in pairs; with
 * real references his are those of Marks and Williams (ibid. 43 (1995), doi 10.1109/22.375247) too. Here each kind is
 * said once, as two solutions of the two-port, and any other is read off those.
 */
export type TwoPortKind = 'impedance' | 'admittance' | 'hybrid' | 'inverseHybrid' | 'chain' | 'scattering';

/** Reference resistances of port 1 and port 2, Ω, positive; they matter to `scattering` alone. */
export type PortReferences = readonly [number, number];

/** Re and im of 11, 12, 21, 22. */
export type TwoPortMatrix = Float64Array;

/** What a determinant is of its terms when it is nothing but rounding. */
const NOTHING = 64 * Number.EPSILON;

/**
 * Two independent solutions of a two-port: re and im of v₁, i₁, v₂, i₂ in the first, then in the second; sixteen
 * numbers. Every linear two-port has them, also one without an impedance, an admittance or a chain matrix.
 */
export type PortSolutions = Float64Array;

const V1 = 0;
const I1 = 2;
const V2 = 4;
const I2 = 6;
const SECOND = 8;

export function newMatrix(): TwoPortMatrix {
  return new Float64Array(8);
}

export function newPortSolutions(): PortSolutions {
  return new Float64Array(16);
}

/** The two solutions in which one of the quantities that the kind takes as given is 1 and the other 0. */
export function toPortSolutions(kind: TwoPortKind, m: TwoPortMatrix, references: PortReferences, out: PortSolutions): void {
  out.fill(0);
  switch (kind) {
    case 'impedance':
      setGiven(out, I1, I2);
      setRow(out, V1, m, 0);
      setRow(out, V2, m, 4);
      return;
    case 'admittance':
      setGiven(out, V1, V2);
      setRow(out, I1, m, 0);
      setRow(out, I2, m, 4);
      return;
    case 'hybrid':
      setGiven(out, I1, V2);
      setRow(out, V1, m, 0);
      setRow(out, I2, m, 4);
      return;
    case 'inverseHybrid':
      setGiven(out, V1, I2);
      setRow(out, I1, m, 0);
      setRow(out, V2, m, 4);
      return;
    case 'chain':
      setGiven(out, V2, I2);
      out[SECOND + I2] = -1;
      setRow(out, V1, m, 0);
      setRow(out, I1, m, 4);
      return;
    case 'scattering':
      setWaves(out, V1, I1, m, 0, Math.sqrt(references[0]));
      setWaves(out, V2, I2, m, 4, Math.sqrt(references[1]));
      return;
  }
}

/**
 * The parameters of a kind from two solutions. Answers whether they exist: the impedance matrix of a series element
 * does not, nor the chain matrix where nothing comes through; then `out` is all zeros.
 */
export function fromPortSolutions(kind: TwoPortKind, w: PortSolutions, references: PortReferences, out: TwoPortMatrix): boolean {
  switch (kind) {
    case 'impedance':
      return divideRows(w, V1, V2, I1, I2, 1, out);
    case 'admittance':
      return divideRows(w, I1, I2, V1, V2, 1, out);
    case 'hybrid':
      return divideRows(w, V1, I2, I1, V2, 1, out);
    case 'inverseHybrid':
      return divideRows(w, I1, V2, V1, I2, 1, out);
    case 'chain':
      return divideRows(w, V1, I1, V2, I2, -1, out);
    case 'scattering':
      return divideRows(wavesOf(w, references), V1, V2, I1, I2, 1, out);
  }
}

/** Parameters of one kind from those of another; false, and zeros, where they do not exist. `out` may be `m`. */
export function convertTwoPort(
  from: TwoPortKind,
  to: TwoPortKind,
  m: TwoPortMatrix,
  references: PortReferences,
  out: TwoPortMatrix,
): boolean {
  toPortSolutions(from, m, references, SOLUTIONS);
  return fromPortSolutions(to, SOLUTIONS, references, out);
}

/** Scattering parameters for other reference resistances. Exists wherever the first ones do, but for active two-ports. */
export function renormalise(m: TwoPortMatrix, from: PortReferences, to: PortReferences, out: TwoPortMatrix): boolean {
  toPortSolutions('scattering', m, from, SOLUTIONS);
  return fromPortSolutions('scattering', SOLUTIONS, to, out);
}

/** The chain matrix of two two-ports, the second behind the first: their product. `out` may be one of them. */
export function cascade(first: TwoPortMatrix, second: TwoPortMatrix, out: TwoPortMatrix): void {
  const product = PRODUCT;
  for (let row = 0; row < 2; row++) {
    for (let column = 0; column < 2; column++) {
      let re = 0;
      let im = 0;
      for (let k = 0; k < 2; k++) {
        const aRe = first[4 * row + 2 * k] ?? 0;
        const aIm = first[4 * row + 2 * k + 1] ?? 0;
        const bRe = second[4 * k + 2 * column] ?? 0;
        const bIm = second[4 * k + 2 * column + 1] ?? 0;
        re += aRe * bRe - aIm * bIm;
        im += aRe * bIm + aIm * bRe;
      }
      product[4 * row + 2 * column] = re;
      product[4 * row + 2 * column + 1] = im;
    }
  }
  out.set(product);
}

/** Work space; nothing of it outlives a call. */
const SOLUTIONS = newPortSolutions();
const WAVES = newPortSolutions();
const PRODUCT = newMatrix();

function setGiven(out: PortSolutions, first: number, second: number): void {
  out[first] = 1;
  out[SECOND + second] = 1;
}

/** A quantity is a row of the matrix: its first entry in the first solution, its second in the second. */
function setRow(out: PortSolutions, quantity: number, m: TwoPortMatrix, row: number): void {
  out[quantity] = m[row] ?? 0;
  out[quantity + 1] = m[row + 1] ?? 0;
  out[SECOND + quantity] = m[row + 2] ?? 0;
  out[SECOND + quantity + 1] = m[row + 3] ?? 0;
}

/** v = √R·(a + b) and i = (a − b)/√R, with b a row of the matrix and a = 1 in the port's own solution. */
function setWaves(out: PortSolutions, v: number, i: number, m: TwoPortMatrix, row: number, root: number): void {
  for (let solution = 0; solution < 2; solution++) {
    const a = row === 4 * solution ? 1 : 0;
    const bRe = m[row + 2 * solution] ?? 0;
    const bIm = m[row + 2 * solution + 1] ?? 0;
    const at = SECOND * solution;
    out[at + v] = root * (a + bRe);
    out[at + v + 1] = root * bIm;
    out[at + i] = (a - bRe) / root;
    out[at + i + 1] = -bIm / root;
  }
}

/** The waves of both solutions, b in the places of the voltages and a in those of the currents. */
function wavesOf(w: PortSolutions, references: PortReferences): PortSolutions {
  for (let port = 0; port < 2; port++) {
    const root = Math.sqrt(references[port] ?? 1);
    for (let at = 4 * port; at < 16; at += SECOND) {
      for (let part = 0; part < 2; part++) {
        const v = (w[at + V1 + part] ?? 0) / (2 * root);
        const i = ((w[at + I1 + part] ?? 0) * root) / 2;
        WAVES[at + V1 + part] = v - i;
        WAVES[at + I1 + part] = v + i;
      }
    }
  }
  return WAVES;
}

/**
 * M with (p, q) = M·(r, sign·s) in both solutions, by Cramer's rule: m₁₁ = (p₁·s₂ − p₂·s₁)/Δ, m₁₂ = (p₂·r₁ − p₁·r₂)/Δ,
 * Δ = r₁·s₂ − r₂·s₁.
 */
function divideRows(w: PortSolutions, p: number, q: number, r: number, s: number, sign: number, out: TwoPortMatrix): boolean {
  const rRe = w[r] ?? 0;
  const rIm = w[r + 1] ?? 0;
  const sRe = w[s] ?? 0;
  const sIm = w[s + 1] ?? 0;
  const r2Re = w[SECOND + r] ?? 0;
  const r2Im = w[SECOND + r + 1] ?? 0;
  const s2Re = w[SECOND + s] ?? 0;
  const s2Im = w[SECOND + s + 1] ?? 0;
  const dRe = rRe * s2Re - rIm * s2Im - (r2Re * sRe - r2Im * sIm);
  const dIm = rRe * s2Im + rIm * s2Re - (r2Re * sIm + r2Im * sRe);
  const terms = Math.hypot(rRe, rIm) * Math.hypot(s2Re, s2Im) + Math.hypot(r2Re, r2Im) * Math.hypot(sRe, sIm);
  const square = dRe * dRe + dIm * dIm;
  if (!(Math.hypot(dRe, dIm) > NOTHING * terms) || !(square > 0) || square === Infinity) {
    out.fill(0);
    return false;
  }
  for (let row = 0; row < 2; row++) {
    const of = row === 0 ? p : q;
    const pRe = w[of] ?? 0;
    const pIm = w[of + 1] ?? 0;
    const p2Re = w[SECOND + of] ?? 0;
    const p2Im = w[SECOND + of + 1] ?? 0;
    const oneRe = pRe * s2Re - pIm * s2Im - (p2Re * sRe - p2Im * sIm);
    const oneIm = pRe * s2Im + pIm * s2Re - (p2Re * sIm + p2Im * sRe);
    const otherRe = sign * (p2Re * rRe - p2Im * rIm - (pRe * r2Re - pIm * r2Im));
    const otherIm = sign * (p2Re * rIm + p2Im * rRe - (pRe * r2Im + pIm * r2Re));
    PRODUCT[4 * row] = (oneRe * dRe + oneIm * dIm) / square;
    PRODUCT[4 * row + 1] = (oneIm * dRe - oneRe * dIm) / square;
    PRODUCT[4 * row + 2] = (otherRe * dRe + otherIm * dIm) / square;
    PRODUCT[4 * row + 3] = (otherIm * dRe - otherRe * dIm) / square;
  }
  out.set(PRODUCT);
  return out.every(Number.isFinite);
}
