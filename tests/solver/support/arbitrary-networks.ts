import fc from 'fast-check';
import type { Element, ElementList } from '@/solver';

/** Random connected networks for fast-check: a tree of passive elements to the reference, a source, and what comes to it. */

export const FREQUENCY = 1000;
const OMEGA = 2 * Math.PI * FREQUENCY;

interface Shape {
  /** Kinds that may come beside the tree. */
  readonly kinds: readonly Element['kind'][];
  /** Impedances from 10^−decades to 10^decades ohms. */
  readonly decades?: number;
  /** How many independent sources, at least one. */
  readonly sources?: number;
}

export const PASSIVE = ['resistor', 'capacitor', 'inductor', 'impedance'] as const;
export const RECIPROCAL = [...PASSIVE, 'coupledInductors', 'idealTransformer', 'line', 'twoPort'] as const;
export const EVERY = [
  ...RECIPROCAL,
  'voltageControlledVoltageSource',
  'voltageControlledCurrentSource',
  'currentControlledVoltageSource',
  'currentControlledCurrentSource',
  'operationalAmplifier',
] as const satisfies readonly Element['kind'][];

/** What an element is drawn from; the numbers mean what each kind makes of them. */
interface Draw {
  readonly kind: Element['kind'];
  readonly at: readonly number[];
  readonly size: number;
  readonly part: number;
  readonly turn: number;
}

const drawOf = (kinds: readonly Element['kind'][], decades: number): fc.Arbitrary<Draw> =>
  fc.record({
    kind: fc.constantFrom(...kinds),
    at: fc.array(fc.nat({ max: 1000 }), { minLength: 4, maxLength: 4 }),
    size: fc.double({ min: -decades, max: decades, noNaN: true }).map((power) => 10 ** power),
    part: fc.double({ min: 0.05, max: 0.95, noNaN: true }),
    turn: fc.double({ min: -180, max: 180, noNaN: true }),
  });

/** A list with sources `VS1`, `IS2`, `VS3` …, the first between nodes 1 and 0 behind a resistor. */
export function networks({ kinds, decades = 2, sources = 1 }: Shape): fc.Arbitrary<ElementList> {
  return fc
    .record({
      tree: fc.array(drawOf(PASSIVE, decades), { minLength: 2, maxLength: 6 }),
      beside: fc.array(drawOf(kinds, decades), { minLength: 1, maxLength: 6 }),
      given: fc.array(drawOf(['currentSource'], 1), { minLength: sources - 1, maxLength: sources - 1 }),
      drive: drawOf(['voltageSource'], 1),
    })
    .map(({ tree, beside, given, drive }): ElementList => {
      const count = tree.length + 2;
      const elements: Element[] = [
        { id: 'VS1', kind: 'voltageSource', nodes: ['1', '0'], value: { rms: drive.size, phase: drive.turn, frequency: null } },
        { id: 'R1', kind: 'resistor', nodes: ['1', '2'], resistance: 10 * drive.part },
      ];
      const made: Element[] = [];
      tree.forEach((draw, place) => made.push(make(draw, `A${place}`, [String(place + 3), String(2 + ((draw.at[0] ?? 0) % (place + 1)))], made)));
      beside.forEach((draw, place) => made.push(make(draw, `B${place}`, pairOf(draw, count), made)));
      given.forEach((draw, place) =>
        elements.push({
          id: `IS${place + 2}`,
          kind: 'currentSource',
          nodes: pairOf(draw, count),
          value: { rms: draw.size, phase: draw.turn, frequency: null },
        }),
      );
      // A path to the reference, so that no part floats whatever the kinds are.
      elements.push({ id: 'R2', kind: 'resistor', nodes: ['2', '0'], resistance: 20 * drive.part });
      return { version: 1, elements: [...elements, ...made] };
    });
}

/** Two different nodes of 0 … count. */
function pairOf({ at }: Draw, count: number): [string, string] {
  const a = (at[0] ?? 0) % (count + 1);
  const b = (at[1] ?? 0) % (count + 1);
  return [String(a), String(a === b ? (b + 1) % (count + 1) : b)];
}

function make({ kind, at, size, part, turn }: Draw, id: string, nodes: [string, string], before: readonly Element[]): Element {
  const [a, b] = nodes;
  // The second pair shares the reference, so that no side floats; and is another pair than the first.
  const third = String(1 + ((at[2] ?? 0) % 3));
  const quad = [a, b, third, '0'] as const;
  const angle = (turn * Math.PI) / 180;
  switch (kind) {
    case 'resistor':
      return { id, kind, nodes, resistance: size };
    case 'capacitor':
      return { id, kind, nodes, capacitance: 1 / (size * OMEGA) };
    case 'inductor':
      return { id, kind, nodes, inductance: size / OMEGA };
    case 'impedance': {
      const point = { resistance: size * part, reactance: size * Math.sin(angle) };
      return { id, kind, nodes, points: [{ frequency: 1, ...point }, { frequency: 1e6, ...point }] };
    }
    case 'coupledInductors':
      return { id, kind, nodes: quad, inductances: [size / OMEGA, (4 * size * part) / OMEGA], coupling: Math.sin(angle) };
    case 'idealTransformer':
      return { id, kind, nodes: quad, ratio: turn < 0 ? -part * 4 : part * 4 };
    case 'line':
      return { id, kind, nodes: quad, impedance: size, delay: part / FREQUENCY, loss: part, lossFrequency: FREQUENCY };
    case 'twoPort': {
      // Passive and reciprocal: a matched loss and turn with a little reflection.
      const through = [part * 0.8 * Math.cos(angle), part * 0.8 * Math.sin(angle)] as const;
      const back = [0.1 * part, -0.1 * part] as const;
      const point = { s11: back, s12: through, s21: through, s22: back };
      return { id, kind, nodes: quad, reference: size, points: [{ frequency: 1, ...point }, { frequency: 1e6, ...point }] };
    }
    case 'voltageControlledVoltageSource':
      return { id, kind, nodes: quad, gain: part * 3 };
    case 'voltageControlledCurrentSource':
      return { id, kind, nodes: quad, transconductance: part / size };
    case 'currentControlledVoltageSource':
      return { id, kind, nodes, sensedElement: sensed(at, before), transresistance: size };
    case 'currentControlledCurrentSource':
      return { id, kind, nodes, sensedElement: sensed(at, before), gain: part * 3 };
    case 'operationalAmplifier':
      return { id, kind, nodes: [third, b === third ? '0' : b, a], openLoopGain: 50 / part, gainBandwidth: 1e4 * size, outputResistance: 10 * part };
    case 'voltageSource':
    case 'currentSource':
      return { id, kind, nodes, value: { rms: size, phase: turn, frequency: null } };
  }
}

function sensed(at: readonly number[], before: readonly Element[]): string {
  const two = before.filter(({ nodes }) => nodes.length === 2);
  return two[(at[3] ?? 0) % Math.max(1, two.length)]?.id ?? 'R1';
}
