import { solve, type ElementList } from '@/solver';

/*
 * The network on the front page: a third-order low-pass, terminated at both ends. Its figures are written down
 * nowhere; the application's own solver works them out.
 */

export const FROM_HZ = 100;
export const TO_HZ = 100_000;
export const STEPS = 300;
/** The step whose frequency is 2 kHz, just inside the pass band. */
export const FIRST_STEP = 130;

const NETWORK: ElementList = {
  version: 1,
  elements: [
    { id: 'VS1', kind: 'voltageSource', nodes: ['in', '0'], value: { rms: 1, phase: 0, frequency: null } },
    { id: 'R1', kind: 'resistor', nodes: ['in', 'mid'], resistance: 600 },
    { id: 'C1', kind: 'capacitor', nodes: ['mid', '0'], capacitance: 82e-9 },
    { id: 'L1', kind: 'inductor', nodes: ['mid', 'out'], inductance: 60e-3 },
    { id: 'C2', kind: 'capacitor', nodes: ['out', '0'], capacitance: 82e-9 },
    { id: 'R2', kind: 'resistor', nodes: ['out', '0'], resistance: 600 },
  ],
};

export const PARTS = ['R1', 'C1', 'L1', 'C2', 'R2'] as const;
export type FrontPart = (typeof PARTS)[number];
export const NODES = ['mid', 'out'] as const;
export type FrontNode = (typeof NODES)[number];

/** An rms phasor on the cosine: a part's current in amperes, a node's voltage in volts. */
export type FrontPhasor = { readonly re: number; readonly im: number };
export type FrontReadings = {
  readonly currents: Readonly<Record<FrontPart, FrontPhasor>>;
  readonly voltages: Readonly<Record<FrontNode, FrontPhasor>>;
};

/** The frequency of a step on the logarithmic band, to three digits, in hertz. */
export function frequencyOfStep(step: number): number {
  return Number((FROM_HZ * (TO_HZ / FROM_HZ) ** (step / STEPS)).toPrecision(3));
}

/**
 * @throws Error if the network, which is fixed and sound, could not be solved: then the solver is broken, and a front
 *   page with made-up figures would hide it.
 */
export function readingsAt(frequencyHz: number): FrontReadings {
  const solution = solve(NETWORK, { frequency: frequencyHz });
  if (!solution.ok) throw new Error(`The front page's network was not solved: ${solution.message}`);
  const found = (phasor: FrontPhasor | undefined): FrontPhasor => {
    if (phasor === undefined) throw new Error('The front page’s network has a reading that is not determined.');
    return { re: phasor.re, im: phasor.im };
  };
  return {
    currents: {
      R1: found(solution.current('R1')),
      C1: found(solution.current('C1')),
      L1: found(solution.current('L1')),
      C2: found(solution.current('C2')),
      R2: found(solution.current('R2')),
    },
    voltages: { mid: found(solution.voltage('mid')), out: found(solution.voltage('out')) },
  };
}

/** The voltage at `out` over that of a matched load, in decibels, at every step of the band. */
export function responseDb(): readonly number[] {
  return Array.from({ length: STEPS + 1 }, (_, step) => {
    const { out } = readingsAt(frequencyOfStep(step)).voltages;
    return 20 * Math.log10(Math.hypot(out.re, out.im) / 0.5);
  });
}
