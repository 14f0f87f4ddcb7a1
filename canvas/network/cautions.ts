import { formatQuantity, superpose, type Solution } from '@/solver';
import type { PartId, PinRef } from '../document/types';
import type { Network } from './network';

/*
 * Where the work can hurt someone. These limits are for labelling; they stand in for no standard, and a network that
 * stays below them is not thereby safe.
 */

/** Extra-low voltage: 50 V AC rms, 120 V ripple-free DC. Source: IEC 61140:2016 and IEC 60364-4-41, band I of IEC
 * 60449; found in IEC glossary entries and in texts that cite them. */
export const VOLTAGE_LIMIT = { acRms: 50, dc: 120, source: 'IEC 61140:2016, IEC 60364-4-41' } as const;

/** Stored energy ½CV²: from 0.1 J provide for discharge, from 0.25 J a heavy shock, from 10 J possibly lethal.
 * Source: a laboratory safety sheet (found), common practice. */
export const ENERGY_LIMITS = {
  discharge: 0.1,
  heavyShock: 0.25,
  possiblyLethal: 10,
  source: 'common practice, laboratory safety sheets',
} as const;

export type Caution = {
  readonly kind: 'voltage' | 'energy';
  /** The parts beside which the caution stands. */
  readonly parts: readonly PartId[];
  /** For a voltage, the pins of the node. */
  readonly pins: readonly PinRef[];
  /** What is there and which limit it passes. */
  readonly message: string;
  readonly source: string;
};

/** The advice that goes with every caution. */
export const CAUTION_ADVICE =
  'Isolate and prove dead before touching, discharge capacitors through a resistor, work to local codes, and leave mains and stored energy to licensed practice.';

type Total = { acSquared: number; dc: number };

/**
 * Finds dangerous voltages and stored energies. A source of another frequency is dead in the readings but not on the
 * bench: the network is solved at every frequency that a source has, and AC values add as squares.
 *
 * @param atOperating the solution at the operating frequency, if there is one, so that it is not solved twice.
 */
export function findCautions(network: Network, frequencyHz: number, atOperating: Solution | null): Caution[] {
  const solutions = solutionsAtAll(network, frequencyHz, atOperating);
  return [...voltageCautions(network, solutions), ...energyCautions(network, solutions)];
}

type AtFrequency = { readonly frequencyHz: number; readonly solution: Solution };

/** What could not be solved is passed over: the sheet says so elsewhere. */
function solutionsAtAll(network: Network, frequencyHz: number, atOperating: Solution | null): AtFrequency[] {
  const all = superpose(network.list, { operatingFrequency: frequencyHz, ...(atOperating && { known: atOperating }) });
  if (!all.ok) return [];
  return all.solutions.flatMap((solution) => (solution.ok ? [{ frequencyHz: solution.frequency, solution }] : []));
}

function total(solutions: readonly AtFrequency[], voltage: (solution: Solution) => { re: number; im: number } | undefined): Total {
  const sum: Total = { acSquared: 0, dc: 0 };
  for (const { frequencyHz, solution } of solutions) {
    const phasor = voltage(solution);
    if (!phasor) continue;
    if (frequencyHz === 0) sum.dc += phasor.re;
    else sum.acSquared += phasor.re ** 2 + phasor.im ** 2;
  }
  return sum;
}

function describeTotal({ acSquared, dc }: Total): string | null {
  const ac = Math.sqrt(acSquared);
  if (ac > VOLTAGE_LIMIT.acRms) return `${formatQuantity(ac, 'V', 3)} AC (rms), above ${VOLTAGE_LIMIT.acRms} V`;
  if (Math.abs(dc) > VOLTAGE_LIMIT.dc) return `${formatQuantity(Math.abs(dc), 'V', 3)} DC, above ${VOLTAGE_LIMIT.dc} V`;
  return null;
}

function voltageCautions(network: Network, solutions: readonly AtFrequency[]): Caution[] {
  const cautions: Caution[] = [];
  const said = new Set<PartId>();
  for (const node of network.nodes.all) {
    const found = describeTotal(total(solutions, (solution) => solution.voltage(node.name)));
    if (found === null) continue;
    const parts = [...new Set(node.pins.map(({ part }) => part))].filter((part) => network.elementOfPart.has(part));
    for (const part of parts) said.add(part);
    cautions.push({
      kind: 'voltage',
      parts,
      pins: node.pins,
      message: `Node ${node.name} is at ${found}.`,
      source: VOLTAGE_LIMIT.source,
    });
  }
  // Two nodes below the limit can have more than it between them, and an island without a reference has no node voltage.
  for (const [part, { id }] of network.elementOfPart) {
    if (said.has(part)) continue;
    const found = describeTotal(total(solutions, (solution) => solution.elementVoltage(id)));
    if (found === null) continue;
    cautions.push({
      kind: 'voltage',
      parts: [part],
      pins: [],
      message: `Across ${id} there are ${found}.`,
      source: VOLTAGE_LIMIT.source,
    });
  }
  return cautions;
}

function energyCautions(network: Network, solutions: readonly AtFrequency[]): Caution[] {
  const cautions: Caution[] = [];
  for (const [part, element] of network.elementOfPart) {
    if (element.kind !== 'capacitor') continue;
    // The greatest energy is at the greatest instantaneous voltage: direct voltage and all peaks together.
    let peak = 0;
    for (const { frequencyHz, solution } of solutions) {
      const voltage = solution.elementVoltage(element.id);
      if (voltage) peak += Math.hypot(voltage.re, voltage.im) * (frequencyHz === 0 ? 1 : Math.SQRT2);
    }
    const joules = (Math.abs(element.capacitance) * peak ** 2) / 2;
    if (joules <= ENERGY_LIMITS.discharge) continue;
    cautions.push({
      kind: 'energy',
      parts: [part],
      pins: [],
      message: `${element.id} stores up to ${formatQuantity(joules, 'J', 3)}${energyWords(joules)}.`,
      source: ENERGY_LIMITS.source,
    });
  }
  return cautions;
}

function energyWords(joules: number): string {
  if (joules >= ENERGY_LIMITS.possiblyLethal) return `, and from ${ENERGY_LIMITS.possiblyLethal} J a discharge through the body can be lethal`;
  if (joules >= ENERGY_LIMITS.heavyShock) return `, and from ${ENERGY_LIMITS.heavyShock} J a discharge is a heavy shock`;
  return `, above ${ENERGY_LIMITS.discharge} J, where provision for discharge is needed (a heavy shock from ${ENERGY_LIMITS.heavyShock} J, possibly lethal from ${ENERGY_LIMITS.possiblyLethal} J)`;
}
