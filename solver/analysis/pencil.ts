import type { Element } from '../elements/element-list';
import { REFERENCE_NODE } from '../elements/element-list';
import type { Coefficient, Law, Term } from '../elements/law';
import { lawsOf, portsOf } from '../elements/registry';
import { DisjointSets } from '../linear/disjoint-sets';
import type { PencilMatrices } from '../linear/pencil-matrices';
import { solveDense } from '../linear/rank-revealing';
import { Stamps } from '../linear/stamps';
import { MiddleOfBand } from './middle-of-band';
import type { Problem } from './problem';
import { listNames, nodeWords, problem } from './problem';

/** What one unknown is: the voltage of a node over the reference, V, or the current of a port, A, entering at its first node. */
export type Unknown =
  | { readonly quantity: 'voltage'; readonly node: string }
  | { readonly quantity: 'current'; readonly element: string; readonly port: number };

/**
 * The equations of a network as (G + s·C)·x = b, in the modified nodal form of Ho, Ruehli and Brennan 1975 (doi
 * 10.1109/TCS.1975.1084079): the voltages of the nodes; resistances and capacitances as admittances; and the currents
 * of inductances, given voltages, ideal connections, ports with an equation, and of every port whose current is asked
 * for. Kirchhoff's current law at each node, then one equation for each current. Independent sources are dead; b is
 * 1 in the one row of the source that drives.
 */
export interface Pencil {
  readonly ok: true;
  readonly unknowns: readonly Unknown[];
  readonly stamps: Stamps;
  /** rad/s, a power of two in the middle of what the elements make: s is scaled by it. */
  readonly omega: number;
  /** The unknown of a node's voltage; −1 for the reference node, undefined for a node that is not there. */
  readonly unknownOfNode: (node: string) => number | undefined;
  /** The unknown of a port's current, where it is one. */
  readonly unknownOfPort: (element: string, port: number) => number | undefined;
  /** Whether the two nodes are joined by more than sources that are dead, so that there is a voltage between them. */
  readonly areJoined: (one: string, other: string) => boolean;
}

export interface PencilOptions {
  /** Ports whose currents are to be unknowns, beside those that have to be: `[element, port]`. */
  readonly currents?: readonly (readonly [element: string, port: number])[];
  /** A pair of nodes to send a current through, entering the network at the first. */
  readonly drivenNodes?: readonly [string, string];
  /** Only the elements that have anything to do with these nodes; all, without. */
  readonly around?: readonly string[];
}

/** The id under which a driven pair of nodes has its current; no element can have it, for ids are not empty. */
export const DRIVE = '';

/**
 * Writes the pencil of a valid list. A `Problem` where an element has no pencil (a table or a line is a function of the
 * frequency that is not a polynomial in s), or senses an element that is not there. Whether the equations have a
 * solution is not asked; see `singularPencil`.
 *
 * A part of the network that hangs at no node of the rest takes its own first node as reference, unless the voltage
 * between the parts is sensed: no current flows from one to the other, so nothing depends on it.
 */
export function pencilOf(elements: readonly Element[], options: PencilOptions = {}): Pencil | Problem {
  const all = elements.flatMap(portsIn);
  const drive = options.drivenNodes;
  // The driving source carries its current from its first node to its second: out of the network, and in.
  if (drive !== undefined) {
    all.push({ element: DRIVE, port: 0, nodes: [drive[1], drive[0]], law: { law: 'current', value: { rms: 0, phase: 0, frequency: null } } });
  }
  const missing = missingSensedElement(elements, all);
  if (missing !== undefined) return missing;
  const ports = options.around === undefined ? all : portsAround(all, options.around);
  const tabulated = [...new Set(ports.filter(({ law }) => isTabulated(law)).map(({ element }) => element))];
  if (tabulated.length > 0) return tabulatedProblem(tabulated);
  return assemble(ports, options.currents ?? []);
}

interface Port {
  readonly element: string;
  readonly port: number;
  readonly nodes: readonly [string, string];
  readonly law: Law;
}

function portsIn(element: Element): Port[] {
  const laws = lawsOf(element);
  return portsOf(element).map((nodes, port) => ({ element: element.id, port, nodes, law: laws[port] ?? { law: 'open' } }));
}

function nameOf(element: string, port: number): string {
  return `${port}:${element}`;
}

function sensedPort(owner: string, { port }: Term): string {
  return typeof port === 'number' ? nameOf(owner, port) : nameOf(port.element, 0);
}

function termsOf(law: Law): readonly Term[] {
  return law.law === 'equation' ? law.terms : [];
}

function isTabulated(law: Law): boolean {
  return law.law === 'impedance' || termsOf(law).some(({ coefficient }) => 'at' in coefficient);
}

function tabulatedProblem(elements: readonly string[]): Problem {
  const are = elements.length === 1 ? 'is known as a function' : 'are known as functions';
  return problem(
    'invalid',
    elements,
    [],
    `${listNames(elements)} ${are} of the frequency that ${elements.length === 1 ? 'is' : 'are'} not a polynomial, so the network has no finite set of poles and zeros. ` +
      'Put resistances, inductances and capacitances in their place, or read the response over the frequency.',
  );
}

function missingSensedElement(elements: readonly Element[], ports: readonly Port[]): Problem | undefined {
  const ids = new Set(elements.map(({ id }) => id));
  for (const { element, law } of ports) {
    for (const { port } of termsOf(law)) {
      if (typeof port === 'number' || ids.has(port.element)) continue;
      const message = `${element} senses the current of ${port.element}, which is not in the element list. Give it the id of an element that is there.`;
      return problem('invalid', [element], [], message);
    }
  }
  return undefined;
}

/**
 * The ports that hang together with the given nodes other than through the reference node alone. An element is a member
 * of its own beside its nodes: one with all its ends on the reference node hangs by what it senses and by what senses it.
 */
function portsAround(ports: readonly Port[], around: readonly string[]): readonly Port[] {
  const nodes = numbered([...ports.flatMap(({ nodes: pair }) => pair), ...around]);
  const members = new Map<string, number>();
  for (const { element } of ports) if (!members.has(element)) members.set(element, nodes.size + members.size);
  const sets = new DisjointSets(nodes.size + members.size);
  const indexOf = (node: string): number => nodes.get(node) ?? 0;
  const memberOf = (element: string): number => members.get(element) ?? 0;
  for (const { element, nodes: pair, law } of ports) {
    for (const node of pair) if (node !== REFERENCE_NODE) sets.union(memberOf(element), indexOf(node));
    for (const { port } of termsOf(law)) if (typeof port !== 'number') sets.union(memberOf(element), memberOf(port.element));
  }
  const wanted = new Set(around.filter((node) => node !== REFERENCE_NODE).map((node) => sets.find(indexOf(node))));
  return ports.filter(({ element }) => wanted.has(sets.find(memberOf(element))));
}

function numbered(names: Iterable<string>): Map<string, number> {
  const numbers = new Map<string, number>([[REFERENCE_NODE, 0]]);
  for (const name of names) if (!numbers.has(name)) numbers.set(name, numbers.size);
  return numbers;
}

/** Whether a current can flow through the port at all; through a dead current source or an open port none does. */
function conducts({ law }: Port): boolean {
  return law.law !== 'open' && law.law !== 'current';
}

function assemble(ports: readonly Port[], currents: readonly (readonly [string, number])[]): Pencil {
  const nodes = numbered(ports.flatMap(({ nodes: pair }) => pair));
  const parts = new DisjointSets(nodes.size);
  for (const port of ports) {
    if (conducts(port)) parts.union(nodes.get(port.nodes[0]) ?? 0, nodes.get(port.nodes[1]) ?? 0);
  }
  const grounded = groundsOf(ports, nodes, parts);
  const unknowns: Unknown[] = [];
  const ofNode = new Map<string, number>();
  for (const [node, index] of nodes) {
    ofNode.set(node, grounded.has(index) ? -1 : unknowns.length);
    if (!grounded.has(index)) unknowns.push({ quantity: 'voltage', node });
  }
  const sensed = new Set(currents.map(([element, port]) => nameOf(element, port)));
  for (const { element, law } of ports) {
    for (const term of termsOf(law)) if (term.of === 'current') sensed.add(sensedPort(element, term));
  }
  const ofPort = new Map<string, number>();
  const portNamed = new Map<string, Port>();
  for (const port of ports) {
    const name = nameOf(port.element, port.port);
    portNamed.set(name, port);
    if (!needsCurrent(port.law) && !sensed.has(name)) continue;
    ofPort.set(name, unknowns.length);
    unknowns.push({ quantity: 'current', element: port.element, port: port.port });
  }
  const stamps = new Stamps();
  const scale = new MiddleOfBand();
  for (const port of ports) {
    const a = ofNode.get(port.nodes[0]) ?? -1;
    const b = ofNode.get(port.nodes[1]) ?? -1;
    const k = ofPort.get(nameOf(port.element, port.port)) ?? -1;
    scale.see(port.law);
    if (k >= 0) stamps.add(a, b, k, -1, 1, 0, true);
    stampLaw(stamps, port.law, a, b, k, (term) => {
      const name = sensedPort(port.element, term);
      if (term.of === 'current') return [ofPort.get(name) ?? -1, -1];
      const of = portNamed.get(name)?.nodes;
      return [ofNode.get(of?.[0] ?? '') ?? -1, ofNode.get(of?.[1] ?? '') ?? -1];
    });
  }
  return {
    ok: true,
    unknowns,
    stamps,
    omega: scale.omega(),
    unknownOfNode: (node) => (node === REFERENCE_NODE ? -1 : ofNode.get(node)),
    unknownOfPort: (element, port) => ofPort.get(nameOf(element, port)),
    areJoined: (one, other) => {
      const [i, j] = [nodes.get(one), nodes.get(other)];
      return i !== undefined && j !== undefined && parts.find(i) === parts.find(j);
    },
  };
}

/** The reference node, and one node of every part of its own whose voltage over the others nothing asks for. */
function groundsOf(ports: readonly Port[], nodes: ReadonlyMap<string, number>, parts: DisjointSets): ReadonlySet<number> {
  const asked = new Set<number>();
  const indexOf = (node: string): number => nodes.get(node) ?? 0;
  for (const { nodes: pair, law } of ports) {
    const [one, other] = [parts.find(indexOf(pair[0])), parts.find(indexOf(pair[1]))];
    if (law.law !== 'open' || one === other) continue;
    asked.add(one);
    asked.add(other);
  }
  const grounded = new Set([0]);
  const seen = new Set([parts.find(0)]);
  for (const index of nodes.values()) {
    const part = parts.find(index);
    if (seen.has(part)) continue;
    seen.add(part);
    if (!asked.has(part)) grounded.add(index);
  }
  return grounded;
}

function needsCurrent({ law }: Law): boolean {
  switch (law) {
    case 'inductance':
    case 'voltage':
    case 'short':
    case 'equation':
      return true;
    case 'resistance':
    case 'capacitance':
    case 'impedance':
    case 'current':
    case 'open':
      return false;
  }
}

/** The equation of a port: into the rows of its nodes where its current is no unknown, else as row `k`. */
function stampLaw(
  stamps: Stamps,
  law: Law,
  a: number,
  b: number,
  k: number,
  columnsOf: (term: Term) => readonly [number, number],
): void {
  switch (law.law) {
    case 'resistance':
      if (k < 0) stamps.add(a, b, a, b, 1 / law.resistance, 0, false);
      else {
        stamps.add(k, -1, a, b, 1, 0, true);
        stamps.add(k, -1, k, -1, -law.resistance, 0, false);
      }
      break;
    case 'capacitance':
      if (k < 0) stamps.add(a, b, a, b, 0, law.capacitance, false);
      else {
        stamps.add(k, -1, k, -1, 1, 0, true);
        stamps.add(k, -1, a, b, 0, -law.capacitance, false);
      }
      break;
    case 'inductance':
      stamps.add(k, -1, a, b, 1, 0, true);
      stamps.add(k, -1, k, -1, 0, -law.inductance, false);
      break;
    case 'voltage':
    case 'short':
      stamps.add(k, -1, a, b, 1, 0, true);
      break;
    case 'current':
    case 'open':
      if (k >= 0) stamps.add(k, -1, k, -1, 1, 0, true);
      break;
    case 'equation':
      for (const term of law.terms) {
        const [p, q] = columnsOf(term);
        const { constant, slope } = polynomialOf(term.coefficient);
        stamps.add(k, -1, p, q, constant, slope, false);
      }
      break;
    case 'impedance':
      throw new Error('A tabulated law has no pencil; it was to be refused before.');
  }
}

function polynomialOf(coefficient: Coefficient): { readonly constant: number; readonly slope: number } {
  if ('at' in coefficient) throw new Error('A tabulated coefficient has no pencil; it was to be refused before.');
  return coefficient;
}

/** A value of s/omega that no network has for a pole but by design. */
const ANYWHERE = { re: 0.8173, im: 0.5772 };

/**
 * Names what is free in a pencil that has no unique solution for any s. The null vector at one s of no importance tells
 * the unknowns.
 */
export function singularPencil({ unknowns }: Pencil, matrices: PencilMatrices): Problem {
  const { size, aRe, bRe, aError, bError } = matrices;
  const outcome = solveDense({
    size,
    re: aRe.map((a, k) => a - ANYWHERE.re * (bRe[k] ?? 0)),
    im: bRe.map((b) => -ANYWHERE.im * b),
    error: aError.map((a, k) => a + (bError[k] ?? 0)),
    rightRe: new Float64Array(size),
    rightIm: new Float64Array(size),
    rightError: new Float64Array(size),
  });
  const free = new Set<number>();
  for (const { re, im } of outcome.nullVectors) {
    const sizes = re.map((part, k) => Math.hypot(part, im[k] ?? 0));
    for (const quantity of ['voltage', 'current'] as const) {
      const of = unknowns.flatMap((unknown, k) => (unknown.quantity === quantity ? [k] : []));
      const most = Math.max(0, ...of.map((k) => sizes[k] ?? 0));
      for (const k of of) if ((sizes[k] ?? 0) > 1e-9 * most) free.add(k);
    }
  }
  const nodes = unknowns.flatMap((unknown, k) => (free.has(k) && unknown.quantity === 'voltage' ? [unknown.node] : []));
  const elements = [
    ...new Set(
      unknowns.flatMap((unknown, k) => (free.has(k) && unknown.quantity === 'current' && unknown.element !== DRIVE ? [unknown.element] : [])),
    ),
  ];
  const what = [
    ...(nodes.length > 0 ? [`the voltage of ${nodeWords(nodes)}`] : []),
    ...(elements.length > 0 ? [`the current of ${listNames(elements)}`] : []),
  ].join(' and ');
  return problem(
    'singular',
    elements,
    nodes,
    `At no frequency do the equations determine ${what === '' ? 'all voltages and currents' : what}, so there are no poles. ` +
      'Connect what floats to the rest, and give amplifiers feedback and loops of ideal elements a resistance.',
  );
}
