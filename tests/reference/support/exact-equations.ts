import type { Element, ElementList } from '@/solver';
import type { Big } from './big-complex';
import { big, div, exact, imaginary, isZero, mul, negative, ONE, PI, real, sub, turned, ZERO } from './big-complex';

/**
 * What each kind of element contributes to modified nodal equations (Ho, Ruehli and Brennan, IEEE Trans. CAS-22 (1975)
 * 504), written down a second time, from what the element list says of the kind: nothing here is the solver's.
 */

/** Two nodes; the current enters at the first. */
export type Pair = readonly [string, string];

/** A coefficient times a voltage between two nodes, or times the current of a branch. */
export interface EquationTerm {
  readonly of: Pair | { readonly branch: string };
  readonly coefficient: Big;
  /** Whether the coefficient is made of values, which are rounded, and not just ±1. */
  readonly isValue: boolean;
}

/** A branch whose current is unknown, and the equation that the element adds for it: Σ terms = right. */
export interface Branch {
  readonly name: string;
  readonly nodes: Pair;
  readonly terms: readonly EquationTerm[];
  readonly right: Big;
}

export interface Equations {
  /** i = y·v. */
  readonly admittances: readonly { readonly id: string; readonly nodes: Pair; readonly y: Big }[];
  /** i given. */
  readonly given: readonly { readonly id: string; readonly nodes: Pair; readonly current: Big }[];
  readonly branches: readonly Branch[];
}

/** The name of the current of an element's port. */
export function branchName(id: string, port = 0): string {
  return port === 0 ? id : `${id} #${port}`;
}

export function equationsOf({ elements }: ElementList, frequency: number): Equations {
  const sensed = new Set(elements.flatMap((element) => ('sensedElement' in element ? [element.sensedElement] : [])));
  const admittances: { id: string; nodes: Pair; y: Big }[] = [];
  const given: { id: string; nodes: Pair; current: Big }[] = [];
  const branches: Branch[] = [];
  for (const element of elements) {
    const own = relationOf(element, frequency);
    if (own === undefined) {
      branches.push(...branchesOf(element, frequency));
      // Nothing enters the inputs, which are the amplifier's first port.
      if (element.kind === 'operationalAmplifier') {
        given.push({ id: element.id, nodes: pairOf(element), current: ZERO });
      }
    } else if ('y' in own && !sensed.has(element.id)) {
      if (!isZero(own.y)) admittances.push({ id: element.id, nodes: pairOf(element), y: own.y });
      else given.push({ id: element.id, nodes: pairOf(element), current: ZERO });
    } else if ('current' in own && !sensed.has(element.id)) {
      given.push({ id: element.id, nodes: pairOf(element), current: own.current });
    } else branches.push(sensedBranch(element, own));
  }
  return { admittances, given, branches };
}

type Relation = { readonly y: Big } | { readonly current: Big };

/** Two-pole elements that have an admittance or a given current at this frequency. */
function relationOf(element: Element, frequency: number): Relation | undefined {
  const omega = PI.times(2).times(exact(frequency));
  switch (element.kind) {
    case 'resistor':
      return element.resistance === 0 ? undefined : { y: div(ONE, real(exact(element.resistance))) };
    case 'capacitor':
      return { y: imaginary(omega.times(exact(element.capacitance))) };
    case 'inductor': {
      const reactance = omega.times(exact(element.inductance));
      return reactance.isZero() ? undefined : { y: div(ONE, imaginary(reactance)) };
    }
    case 'impedance': {
      const z = interpolated(
        element.points.map((point) => [point.frequency, [point.resistance, point.reactance]] as const),
        frequency,
      );
      return isZero(z) ? undefined : { y: div(ONE, z) };
    }
    case 'currentSource':
      return { current: phasorOf(element.value, frequency) };
    default:
      return undefined;
  }
}

function sensedBranch(element: Element, relation: Relation): Branch {
  const nodes = pairOf(element);
  const own: EquationTerm = { of: { branch: element.id }, coefficient: ONE, isValue: false };
  if ('current' in relation) return { name: element.id, nodes, terms: [own], right: relation.current };
  const through: EquationTerm = { of: nodes, coefficient: negative(relation.y), isValue: true };
  return { name: element.id, nodes, terms: [own, through], right: ZERO };
}

function branchesOf(element: Element, frequency: number): readonly Branch[] {
  const omega = PI.times(2).times(exact(frequency));
  const { id } = element;
  const ofVoltage = (of: Pair, coefficient: Big, isValue = true): EquationTerm => ({ of, coefficient, isValue });
  const ofCurrent = (port: number, coefficient: Big, isValue = true): EquationTerm => ({
    of: { branch: branchName(id, port) },
    coefficient,
    isValue,
  });
  const branch = (port: number, nodes: Pair, terms: readonly EquationTerm[], right = ZERO): Branch => ({
    name: branchName(id, port),
    nodes,
    terms,
    right,
  });
  switch (element.kind) {
    case 'resistor':
    case 'inductor':
    case 'impedance':
      return [branch(0, element.nodes, [ofVoltage(element.nodes, ONE, false)])];
    case 'capacitor':
    case 'currentSource':
      throw new Error('has a relation of its own');
    case 'voltageSource':
      return [branch(0, element.nodes, [ofVoltage(element.nodes, ONE, false)], phasorOf(element.value, frequency))];
    case 'voltageControlledVoltageSource': {
      const [one, sense] = pairsOf(element.nodes);
      const gain = real(exact(-element.gain));
      return [branch(0, one, [ofVoltage(one, ONE, false), ofVoltage(sense, gain)])];
    }
    case 'voltageControlledCurrentSource': {
      const [one, sense] = pairsOf(element.nodes);
      const transconductance = real(exact(-element.transconductance));
      return [branch(0, one, [ofCurrent(0, ONE, false), ofVoltage(sense, transconductance)])];
    }
    case 'currentControlledVoltageSource': {
      const sense: EquationTerm = {
        of: { branch: element.sensedElement },
        coefficient: real(exact(-element.transresistance)),
        isValue: true,
      };
      return [branch(0, element.nodes, [ofVoltage(element.nodes, ONE, false), sense])];
    }
    case 'currentControlledCurrentSource': {
      const sense: EquationTerm = {
        of: { branch: element.sensedElement },
        coefficient: real(exact(-element.gain)),
        isValue: true,
      };
      return [branch(0, element.nodes, [ofCurrent(0, ONE, false), sense])];
    }
    case 'coupledInductors': {
      const { nodes, inductances, coupling } = element;
      const pairs = inductances.map((_, k): Pair => [nodes[2 * k] ?? '', nodes[2 * k + 1] ?? '']);
      const couplings = typeof coupling === 'number' ? [coupling] : [...coupling];
      const of = new Map<string, number>();
      inductances.forEach((_, i) =>
        inductances.forEach((_unused, j) => {
          if (j > i) of.set(`${i} ${j}`, couplings.shift() ?? 0);
        }),
      );
      return pairs.map((pair, i) =>
        branch(i, pair, [
          ofVoltage(pair, ONE, false),
          ...inductances.map((inductance, j) => {
            const k = i === j ? 1 : (of.get(`${Math.min(i, j)} ${Math.max(i, j)}`) ?? 0);
            const mutual = exact(inductance).times(exact(inductances[i] ?? 0)).sqrt().times(exact(k));
            return ofCurrent(j, imaginary(omega.times(mutual).neg()));
          }),
        ]),
      );
    }
    case 'idealTransformer': {
      const [one, other] = pairsOf(element.nodes);
      const ratio = real(exact(element.ratio));
      return [
        branch(0, one, [ofVoltage(one, ONE, false), ofVoltage(other, negative(ratio))]),
        branch(1, other, [ofCurrent(0, ratio), ofCurrent(1, ONE, false)]),
      ];
    }
    case 'operationalAmplifier': {
      const [plus, minus, output] = element.nodes;
      const out: Pair = [output, '0'];
      const { openLoopGain, gainBandwidth, outputResistance = 0 } = element;
      if (openLoopGain === undefined && gainBandwidth === undefined) {
        return [branch(1, out, [ofVoltage([plus, minus], ONE, false)])];
      }
      // v_out/A − R_out·i/A − (v_plus − v_minus) = 0, with 1/A = 1/A₀ + jω/(2π·f_T).
      const inverse = big(
        openLoopGain === undefined ? ZERO.re : ONE.re.div(exact(openLoopGain)),
        gainBandwidth === undefined ? ZERO.re : omega.div(PI.times(2).times(exact(gainBandwidth))),
      );
      return [
        branch(1, out, [
          ofVoltage([plus, minus], negative(ONE), false),
          ofVoltage(out, inverse),
          ofCurrent(1, negative(mul(real(exact(outputResistance)), inverse))),
        ]),
      ];
    }
    case 'twoPort': {
      const pairs = pairsOf(element.nodes);
      const reference = real(exact(element.reference));
      const at = (key: 's11' | 's12' | 's21' | 's22'): Big =>
        interpolated(
          element.points.map((point) => [point.frequency, point[key]] as const),
          frequency,
        );
      const s = [
        [at('s11'), at('s12')],
        [at('s21'), at('s22')],
      ] as const;
      return pairs.map((pair, p) =>
        branch(
          p,
          pair,
          pairs.flatMap((from, q) => {
            const wave = s[p]?.[q] ?? ZERO;
            const own = p === q ? ONE : ZERO;
            return [
              ofVoltage(from, sub(own, wave)),
              ofCurrent(q, negative(mul(reference, big(own.re.plus(wave.re), wave.im)))),
            ];
          }),
        ),
      );
    }
    case 'line': {
      // Chain equations: v₁ = cosh θ·v₂ − Z·sinh θ·i₂ and i₁ = sinh θ/Z·v₂ − cosh θ·i₂, i₂ entering.
      const [one, other] = pairsOf(element.nodes);
      const nepers =
        element.loss === undefined || element.loss === 0
          ? ZERO.re
          : exact(element.loss)
              .times(exact(10).ln())
              .div(20)
              .times(exact(frequency).div(exact(element.lossFrequency ?? 1)).sqrt());
      const angle = omega.times(exact(element.delay));
      const cosine = big(nepers.cosh().times(angle.cos()), nepers.sinh().times(angle.sin()));
      const sine = big(nepers.sinh().times(angle.cos()), nepers.cosh().times(angle.sin()));
      const z = real(exact(element.impedance));
      return [
        branch(0, one, [ofVoltage(one, ONE, false), ofVoltage(other, negative(cosine)), ofCurrent(1, mul(z, sine))]),
        branch(1, other, [ofCurrent(0, ONE, false), ofVoltage(other, negative(div(sine, z))), ofCurrent(1, cosine)]),
      ];
    }
  }
}

function pairOf(element: Element): Pair {
  return [element.nodes[0] ?? '', element.nodes[1] ?? ''];
}

function pairsOf([a, b, c, d]: readonly [string, string, string, string]): readonly [Pair, Pair] {
  return [
    [a, b],
    [c, d],
  ];
}

/** A source of another frequency than the one at hand is dead. */
function phasorOf(
  value: { readonly rms: number; readonly phase: number; readonly frequency: number | null },
  frequency: number,
): Big {
  if (value.frequency !== null && value.frequency !== frequency) return ZERO;
  const phasor = turned(exact(value.rms), exact(value.phase).times(PI).div(180));
  return value.frequency === 0 ? real(phasor.re) : phasor;
}

/** Linear in log frequency between points. */
function interpolated(
  points: readonly (readonly [number, readonly [number, number]])[],
  frequency: number,
): Big {
  const hit = points.find(([at]) => Math.abs(at - frequency) <= 1e-12 * at);
  if (hit !== undefined) return big(exact(hit[1][0]), exact(hit[1][1]));
  const above = points.findIndex(([at]) => at > frequency);
  const [low, high] = [points[above - 1], points[above]];
  if (low === undefined || high === undefined) throw new Error('outside the table');
  const part = exact(frequency).div(exact(low[0])).ln().div(exact(high[0]).div(exact(low[0])).ln());
  const mix = (a: number, b: number) => exact(a).plus(exact(b).minus(exact(a)).times(part));
  return big(mix(low[1][0], high[1][0]), mix(low[1][1], high[1][1]));
}
