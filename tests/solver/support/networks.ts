import type { Capacitor, CurrentSource, Element, ElementList, Inductor, Resistor, VoltageSource } from '@/solver';

/** Short names for building element lists in tests. */

export function resistor(id: string, a: string, b: string, resistance: number): Resistor {
  return { id, kind: 'resistor', nodes: [a, b], resistance };
}

export function capacitor(id: string, a: string, b: string, capacitance: number): Capacitor {
  return { id, kind: 'capacitor', nodes: [a, b], capacitance };
}

export function inductor(id: string, a: string, b: string, inductance: number): Inductor {
  return { id, kind: 'inductor', nodes: [a, b], inductance };
}

export function voltageSource(
  id: string,
  plus: string,
  minus: string,
  rms: number,
  phase = 0,
  frequency: number | null = null,
): VoltageSource {
  return { id, kind: 'voltageSource', nodes: [plus, minus], value: { rms, phase, frequency } };
}

export function currentSource(
  id: string,
  from: string,
  to: string,
  rms: number,
  phase = 0,
  frequency: number | null = null,
): CurrentSource {
  return { id, kind: 'currentSource', nodes: [from, to], value: { rms, phase, frequency } };
}

export function network(...elements: readonly Element[]): ElementList {
  return { version: 1, elements };
}
