import type { Element } from '@/solver';
import { capacitor, currentSource, inductor, resistor, voltageSource } from '../../solver/support/networks';
import type { Random } from '../../solver/support/random';

/** Random networks of every kind of element, that have a unique solution but for chance. */

/** The nodes of a list, without the reference node. */
export function nodesOf(elements: readonly Element[]): readonly string[] {
  return [...new Set(elements.flatMap(({ nodes }) => [...nodes]))].filter((node) => node !== '0');
}

/** How many currents of its own an element has. */
export function portCount(element: Element): number {
  switch (element.kind) {
    case 'coupledInductors':
      return element.inductances.length;
    case 'idealTransformer':
    case 'operationalAmplifier':
    case 'twoPort':
    case 'line':
      return 2;
    default:
      return 1;
  }
}

/** The kinds that have equations of their own. */
export const LINKED_KINDS = [
  'impedance',
  'coupledInductors',
  'idealTransformer',
  'voltageControlledVoltageSource',
  'voltageControlledCurrentSource',
  'currentControlledVoltageSource',
  'currentControlledCurrentSource',
  'operationalAmplifier',
  'twoPort',
  'line',
] as const;

export type LinkedKind = (typeof LINKED_KINDS)[number];

interface Place {
  readonly random: Random;
  readonly omega: number;
  readonly id: string;
  /** A random node, the reference node included. */
  readonly node: () => string;
  /** Impedances from a tenth to ten times this, ohms. */
  readonly ohms: number;
  /** A two-node element whose current may be sensed. */
  readonly sensed: string;
}

/** Some element of a kind between nodes of a network. */
function linked(kind: LinkedKind, { random, omega, id, node, ohms, sensed }: Place): Element[] {
  const size = (): number => ohms * 10 ** random.between(-1, 1);
  const frequency = omega / (2 * Math.PI);
  const pair = (): [string, string] => {
    const a = node();
    let b = node();
    while (b === a) b = node();
    return [a, b];
  };
  const quad = (): [string, string, string, string] => [...pair(), ...pair()];
  const own = `${id} own`;
  switch (kind) {
    case 'impedance': {
      const points = [0.5, 0.9, 1.3, 4].map((part) => ({
        frequency: part * frequency,
        resistance: size(),
        reactance: (random.next() < 0.5 ? -1 : 1) * size(),
      }));
      return [{ id, kind, nodes: pair(), points }];
    }
    case 'coupledInductors': {
      const [a, b] = pair();
      const [c, d] = pair();
      const inductances = [size() / omega, size() / omega];
      const coupling = random.between(-0.95, 0.95);
      if (random.next() < 0.5) return [{ id, kind, nodes: [a, b, c, d], inductances, coupling }];
      const third = [...inductances, size() / omega];
      const couplings = [coupling / 2, random.between(-0.4, 0.4), random.between(-0.4, 0.4)];
      return [{ id, kind, nodes: [a, b, c, d, ...pair()], inductances: third, coupling: couplings }];
    }
    case 'idealTransformer':
      // A winding of its own node, so that no loop of given voltages arises.
      return [
        { id, kind, nodes: [...pair(), own, node()], ratio: (random.next() < 0.5 ? -1 : 1) * 10 ** random.between(-1, 1) },
        resistor(`${id} R`, own, node(), size()),
      ];
    case 'voltageControlledVoltageSource':
      return [
        { id, kind, nodes: [own, node(), ...pair()], gain: random.between(-5, 5) },
        resistor(`${id} R`, own, node(), size()),
      ];
    case 'voltageControlledCurrentSource':
      return [{ id, kind, nodes: quad(), transconductance: random.between(-1, 1) / size() }];
    case 'currentControlledVoltageSource':
      return [
        { id, kind, nodes: [own, node()], sensedElement: sensed, transresistance: random.between(-2, 2) * size() },
        resistor(`${id} R`, own, node(), size()),
      ];
    case 'currentControlledCurrentSource':
      return [{ id, kind, nodes: pair(), sensedElement: sensed, gain: random.between(-3, 3) }];
    case 'operationalAmplifier': {
      const [input, output] = [`${id} in`, `${id} out`];
      const parts = [
        resistor(`${id} R1`, node(), input, size()),
        random.next() < 0.5
          ? resistor(`${id} R2`, input, output, size())
          : capacitor(`${id} C2`, input, output, 1 / (omega * size())),
        resistor(`${id} R3`, output, node(), size()),
      ];
      const nodes = [node(), input, output] as const;
      switch (random.whole(0, 2)) {
        case 0:
          return [{ id, kind, nodes }, ...parts];
        case 1:
          return [{ id, kind, nodes, openLoopGain: 10 ** random.between(2, 6), outputResistance: size() }, ...parts];
        default:
          return [
            { id, kind, nodes, openLoopGain: 10 ** random.between(3, 6), gainBandwidth: frequency * 10 ** random.between(0, 4) },
            ...parts,
          ];
      }
    }
    case 'twoPort': {
      const wave = (): [number, number] => [random.between(-0.5, 0.5), random.between(-0.5, 0.5)];
      const points = [0.4, 0.8, 1.7, 3].map((part) => ({
        frequency: part * frequency,
        s11: wave(),
        s12: wave(),
        s21: wave(),
        s22: wave(),
      }));
      return [{ id, kind, nodes: quad(), reference: size(), points }];
    }
    case 'line': {
      const loss = random.next() < 0.5 ? {} : { loss: random.between(0, 6), lossFrequency: frequency * random.between(0.5, 2) };
      return [{ id, kind, nodes: quad(), impedance: size(), delay: random.between(0.01, 3) / frequency, ...loss }];
    }
  }
}

/** A connected network of resistors, capacitors and inductors with a source, and some elements of a kind in it. */
export function randomLinkedNetwork(random: Random, kinds: readonly LinkedKind[], frequency: number): Element[] {
  const omega = 2 * Math.PI * frequency;
  const ohms = 10 ** random.between(0, 4);
  const count = random.whole(3, 5);
  const elements: Element[] = [voltageSource('V1', '1', '0', 1, 45 * random.whole(0, 7))];
  const join = (a: number, b: number): void => {
    const [id, one, other] = [`Z${elements.length}`, String(a), String(b)];
    const size = ohms * 10 ** random.between(-1, 1);
    const kind = random.whole(0, 2);
    if (kind === 0) elements.push(resistor(id, one, other, size));
    else if (kind === 1) elements.push(inductor(id, one, other, size / omega));
    else elements.push(capacitor(id, one, other, 1 / (size * omega)));
  };
  for (let node = 2; node <= count; node++) join(node, random.whole(0, node - 1));
  for (let extra = 0; extra < 3; extra++) {
    const a = random.whole(0, count);
    join(a, (a + random.whole(1, count)) % (count + 1));
  }
  if (random.next() < 0.3) elements.push(currentSource('I1', String(random.whole(0, count - 1)), String(count), 1 / ohms));
  const node = (): string => String(random.whole(0, count));
  const sensible = elements.filter(({ kind }) => kind !== 'currentSource').map(({ id }) => id);
  kinds.forEach((kind, k) => {
    const sensed = random.pick(sensible);
    elements.push(...linked(kind, { random, omega, id: `X${k}`, node, ohms, sensed }));
  });
  return elements;
}
