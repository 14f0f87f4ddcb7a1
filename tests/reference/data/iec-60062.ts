/**
 * The letter code of IEC 60062:2016. Examples and multiplier letters [found: the public article "RKM code" and a mirror
 * of it]; tolerance letters and capacitor letters [memory].
 */
export const RESISTOR_CODES: readonly (readonly [string, number])[] = [
  ['R47', 0.47],
  ['4R7', 4.7],
  ['470R', 470],
  ['4K7', 4700],
  ['47K', 47000],
  ['47K3', 47300],
  ['470K', 470000],
  ['4M7', 4700000.0],
  ['R10', 0.1],
  ['1K0', 1000],
  ['2M2', 2200000.0],
];

export const CAPACITOR_CODES: readonly (readonly [string, number])[] = [
  ['10p', 1e-11],
  ['4n7', 4.7e-9],
  ['1u0', 1e-6],
  ['p33', 3.3e-13],
  ['100n', 1e-7],
];

/** Per cent on both sides. */
export const SYMMETRIC_TOLERANCE: Readonly<Record<string, number>> = {
  E: 0.005,
  L: 0.01,
  P: 0.02,
  W: 0.05,
  B: 0.1,
  C: 0.25,
  D: 0.5,
  F: 1,
  G: 2,
  H: 3,
  J: 5,
  K: 10,
  M: 20,
  N: 30,
};

/** Per cent below and above. */
export const UNEQUAL_TOLERANCE: Readonly<Record<string, readonly [number, number]>> = {
  Q: [10, 30],
  T: [10, 50],
  S: [20, 50],
  Z: [20, 80],
};

/** Picofarads, below 10 pF. */
export const SMALL_CAPACITOR_TOLERANCE: Readonly<Record<string, number>> = {
  B: 0.1,
  C: 0.25,
  D: 0.5,
  F: 1,
  G: 2,
};
