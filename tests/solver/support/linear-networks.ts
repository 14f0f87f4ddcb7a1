import type { Element, ElementList } from '@/solver';
import { network, resistor } from './networks';
import type { Random } from './random';

/**
 * Random networks of all kinds that have a unique solution at every frequency but by rare accident: resistors tie every
 * node to the reference node, and what gives a voltage has a node and a resistor of its own.
 */
export interface LinearNetworkOptions {
  /** Nodes of the resistive backbone, two or more. */
  readonly nodes: number;
  /** Elements beyond it. */
  readonly elements: number;
  /** Values lie within so many decades around 1 kΩ, 1 µF, 1 H. */
  readonly decades: number;
  /** Leaves out what makes no sense at 0 Hz, or what a caller does not want. */
  readonly without?: readonly Element['kind'][];
}

const KINDS: readonly Element['kind'][] = [
  'resistor',
  'capacitor',
  'inductor',
  'impedance',
  'coupledInductors',
  'idealTransformer',
  'voltageSource',
  'currentSource',
  'voltageControlledVoltageSource',
  'voltageControlledCurrentSource',
  'currentControlledVoltageSource',
  'currentControlledCurrentSource',
  'operationalAmplifier',
  'twoPort',
  'line',
];

export function randomLinearNetwork(random: Random, options: LinearNetworkOptions): ElementList {
  const { nodes, elements, decades, without = [] } = options;
  const made: Element[] = [];
  const spread = (middle: number): number => middle * 10 ** random.between(-decades / 2, decades / 2);
  const names = Array.from({ length: nodes + 1 }, (_, node) => String(node));
  const node = (): string => random.pick(names);
  const two = (): [string, string] => {
    const one = node();
    for (;;) {
      const other = node();
      if (other !== one) return [one, other];
    }
  };
  for (let at = 1; at <= nodes; at++) {
    made.push(resistor(`backbone ${at}`, String(at), String(random.whole(0, at - 1)), spread(1e3)));
  }
  /** Two different nodes, neither the reference. */
  const apart = (): [string, string] => {
    const first = random.whole(1, nodes);
    return [String(first), String(1 + ((first - 1 + random.whole(1, nodes - 1)) % nodes))];
  };
  let fresh = 0;
  /** A node of its own, tied to the network by a resistor. */
  const own = (id: string): string => {
    const name = `own ${++fresh}`;
    made.push(resistor(`${id} tie ${fresh}`, name, node(), spread(1e3)));
    return name;
  };
  const kinds = KINDS.filter((kind) => !without.includes(kind));
  for (let at = 0; at < elements; at++) made.push(one(random.pick(kinds), `${at}`));

  function one(kind: Element['kind'], id: string): Element {
    const value = { rms: random.between(0.1, 2), phase: random.between(-180, 180), frequency: null };
    const pair = (): [number, number] => [random.between(-0.6, 0.6), random.between(-0.6, 0.6)];
    switch (kind) {
      case 'resistor':
        return { id, kind, nodes: two(), resistance: spread(1e3) };
      case 'capacitor':
        return { id, kind, nodes: two(), capacitance: spread(1e-6) };
      case 'inductor':
        return { id, kind, nodes: [own(id), node()], inductance: spread(1) };
      case 'impedance':
        return {
          id,
          kind,
          nodes: two(),
          points: [0, 1, 1e3, 1e6].map((frequency) => ({
            frequency,
            resistance: spread(1e3),
            reactance: random.between(-1, 1) * spread(1e3),
          })),
        };
      case 'coupledInductors':
        return {
          id,
          kind,
          nodes: [own(id), node(), own(id), node()],
          inductances: [spread(1), spread(1)],
          coupling: random.between(-0.95, 0.95),
        };
      case 'idealTransformer':
        return { id, kind, nodes: [own(id), node(), own(id), node()], ratio: random.between(0.2, 5) };
      case 'voltageSource':
        return { id, kind, nodes: [own(id), node()], value };
      case 'currentSource':
        return { id, kind, nodes: two(), value };
      case 'voltageControlledVoltageSource':
        return { id, kind, nodes: [own(id), node(), ...two()], gain: random.between(-3, 3) };
      case 'voltageControlledCurrentSource':
        return { id, kind, nodes: [...two(), ...two()], transconductance: random.between(-1, 1) * spread(1e-3) };
      case 'currentControlledVoltageSource':
        return { id, kind, nodes: [own(id), node()], sensedElement: sensed(), transresistance: random.between(-1, 1) * 1e3 };
      case 'currentControlledCurrentSource':
        return { id, kind, nodes: two(), sensedElement: sensed(), gain: random.between(-2, 2) };
      case 'operationalAmplifier': {
        const minus = own(id);
        const output = own(id);
        made.push(resistor(`${id} feedback`, output, minus, spread(1e3)));
        const real = random.whole(0, 1) === 1;
        return {
          id,
          kind,
          nodes: [node(), minus, output],
          ...(real ? { openLoopGain: 10 ** random.between(2, 6), gainBandwidth: 10 ** random.between(3, 7), outputResistance: spread(100) } : {}),
        };
      }
      case 'twoPort': {
        const [in1, in2] = apart();
        return {
          id,
          kind,
          nodes: [in1, '0', in2, '0'],
          reference: 50,
          points: [0, 1, 1e3, 1e6].map((frequency) => ({ frequency, s11: pair(), s12: pair(), s21: pair(), s22: pair() })),
        };
      }
      case 'line': {
        return {
          id,
          kind,
          nodes: [own(id), '0', node(), '0'],
          impedance: spread(100),
          delay: 10 ** random.between(-9, -3),
          loss: random.between(0, 6),
          lossFrequency: 1e4,
        };
      }
    }
  }

  function sensed(): string {
    return random.pick(made.filter(({ nodes: ends }) => ends.length === 2)).id;
  }

  return network(...made);
}
