import type { Element } from '@/solver';
import { resistor } from '../../solver/support/networks';

/** Elements beyond resistors, capacitors, inductors and sources, built shortly. */

/** An impedance that is known at one frequency only, as a drawing with reactances in ohms has it. */
export function fixedImpedance(id: string, a: string, b: string, re: number, im: number, frequency: number): Element {
  return { id, kind: 'impedance', nodes: [a, b], points: [{ frequency, resistance: re, reactance: im }] };
}

/** Two coils with their dots at `nodes[0]` and `nodes[2]`, by their mutual inductance. */
export function coils(
  id: string,
  nodes: readonly [string, string, string, string],
  primary: number,
  secondary: number,
  mutual: number,
): Element {
  return {
    id,
    kind: 'coupledInductors',
    nodes,
    inductances: [primary, secondary],
    coupling: mutual / Math.sqrt(primary * secondary),
  };
}

/** An ideal operational amplifier. */
export function amplifier(id: string, plus: string, minus: string, output: string): Element {
  return { id, kind: 'operationalAmplifier', nodes: [plus, minus, output] };
}

/** What repeats the voltage of `from` at `to` and takes no current. */
export function buffer(id: string, from: string, to: string, gain = 1): Element {
  return { id, kind: 'voltageControlledVoltageSource', nodes: [to, '0', from, '0'], gain };
}

/** An ideal wire whose current has a name. */
export function wire(id: string, a: string, b: string): Element {
  return resistor(id, a, b, 0);
}
