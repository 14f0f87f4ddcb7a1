import { sameFrequency, solve, type Problem, type Solution } from '@/solver';
import type { PartId, PinRef, SheetDocument, WireId } from '../document/types';
import { readFrequency } from '../parts/read-values';
import { findCautions, type Caution } from './cautions';
import { buildNetwork, type Network } from './network';
import type { Phasor } from './phasor';

/**
 * What stands beside a part: rms phasors on the cosine. The current is positive entering at the first pin, the voltage
 * is that of the first pin over the second, power is V·I*, positive where the part absorbs. `null` where it is not
 * determined.
 */
export type PartReading = {
  readonly current: Phasor | null;
  readonly voltage: Phasor | null;
  readonly power: Phasor | null;
};

/** Something wrong, in words, and what to mark on the drawing. */
export type SheetProblem = {
  readonly message: string;
  readonly parts: readonly PartId[];
  readonly pins: readonly PinRef[];
  readonly wires: readonly WireId[];
};

/** The balance of complex power over the network, by Tellegen's theorem zero but for rounding. */
export type Balance = {
  /** |ΣS| / Σ|S|; 0 for a network at rest. */
  readonly ratio: number;
  readonly holds: boolean;
};

/** Everything the sheet shows of one solution. */
export type Readings = {
  readonly frequencyHz: number;
  readonly parts: ReadonlyMap<PartId, PartReading>;
  /** By node name. */
  readonly nodes: ReadonlyMap<string, Phasor>;
  /** Sources whose own frequency is not the operating one: dead in these readings. */
  readonly deadSources: readonly PartId[];
  readonly problems: readonly SheetProblem[];
  readonly cautions: readonly Caution[];
  readonly balance: Balance | null;
  readonly network: Network;
};

/**
 * The power of the elements must add up to zero but for rounding. Rounding grows with the number of elements and with
 * what cancels inside each, so this bound is loose against rounding and tight against a fault.
 */
const BALANCE_BOUND = 1e-9;

/** Drawing to readings: builds the network, solves it at the operating frequency, and finds what needs saying. */
export function readNetwork(document: SheetDocument): Readings {
  const frequency = readFrequency(document.operatingFrequency);
  const frequencyHz = frequency.ok ? frequency.value : 0;
  const network = buildNetwork(document);
  const noted = drawingProblems(document, network);
  const nothing = { frequencyHz, parts: new Map(), nodes: new Map(), deadSources: [], cautions: [], balance: null, network };

  // A part that cannot be read is a hole of unknown size: no figure of the sheet could be stood behind.
  const readable = frequency.ok && network.unreadable.length === 0;
  if (!readable || network.list.elements.length === 0) return { ...nothing, problems: noted };

  const answer = solve(network.list, { frequency: frequencyHz });
  const cautions = findCautions(network, frequencyHz, answer.ok ? answer : null);
  const deadSources = findDeadSources(network, frequencyHz);
  if (!answer.ok) return { ...nothing, deadSources, cautions, problems: [...noted, onDrawing(answer, network)] };
  const balance = balanceOf(answer);
  const problems = [...noted, ...gatherUnreferenced(answer.problems).map((found) => onDrawing(found, network))];
  if (balance && !balance.holds) {
    problems.push({
      message: `The power of the parts does not add up (${balance.ratio.toExponential(1)} of the total is left over), so these readings are not reliable. Extreme ratios between values are the usual cause.`,
      parts: [],
      pins: [],
      wires: [],
    });
  }
  return {
    frequencyHz,
    parts: partReadings(network, answer),
    nodes: nodeVoltages(network, answer),
    deadSources,
    problems,
    cautions,
    balance,
    network,
  };
}

function partReadings(network: Network, solution: Solution): Map<PartId, PartReading> {
  const readings = new Map<PartId, PartReading>();
  for (const [partId, { id }] of network.elementOfPart) {
    readings.set(partId, {
      current: plain(solution.current(id)),
      voltage: plain(solution.elementVoltage(id)),
      power: plain(solution.power(id)),
    });
  }
  return readings;
}

function nodeVoltages(network: Network, solution: Solution): Map<string, Phasor> {
  const voltages = new Map<string, Phasor>();
  for (const { name } of network.nodes.all) {
    const voltage = plain(solution.voltage(name));
    if (voltage) voltages.set(name, voltage);
  }
  return voltages;
}

function plain(value: { readonly re: number; readonly im: number } | undefined): Phasor | null {
  return value ? { re: value.re, im: value.im } : null;
}

function balanceOf(solution: Solution): Balance | null {
  const { sum, scale } = solution.balance;
  if (scale === 0) return { ratio: 0, holds: true };
  const ratio = Math.hypot(sum.re, sum.im) / scale;
  return { ratio, holds: ratio <= BALANCE_BOUND };
}

function findDeadSources(network: Network, frequencyHz: number): PartId[] {
  return network.list.elements.flatMap((element) => {
    if (!('value' in element) || element.value.frequency === null) return [];
    if (sameFrequency(element.value.frequency, frequencyHz)) return [];
    const part = network.partOfElement.get(element.id);
    return part === undefined ? [] : [part];
  });
}

/** What is wrong with the drawing itself, before anything is solved. */
function drawingProblems(document: SheetDocument, network: Network): SheetProblem[] {
  const problems: SheetProblem[] = network.unreadable.map(({ part, message }) => ({
    message: `${document.parts.find(({ id }) => id === part)?.designator ?? 'A part'}: ${message}`,
    parts: [part],
    pins: [],
    wires: [],
  }));
  const frequency = readFrequency(document.operatingFrequency);
  if (!frequency.ok) problems.push({ message: `Operating frequency: ${frequency.message}`, parts: [], pins: [], wires: [] });
  for (const { part, name, instead } of network.nodes.alsoCalled) {
    problems.push({
      message:
        instead === '0'
          ? `The node named ${name} is the reference node; the name has no effect.`
          : `One node has two names, ${instead} and ${name}; it is shown as ${instead}.`,
      parts: [part],
      pins: [],
      wires: [],
    });
  }
  return problems;
}

/**
 * While a network is being drawn, each part not yet joined is an island of its own. One sentence for all of them says
 * as much as one for each.
 */
function gatherUnreferenced(problems: readonly Problem[]): readonly Problem[] {
  const unreferenced = problems.filter(({ kind }) => kind === 'noReference');
  if (unreferenced.length < 2) return problems;
  const elements = unreferenced.flatMap((problem) => problem.elements);
  const shown = elements.length > 8 ? [...elements.slice(0, 7), `${elements.length - 7} more`] : elements;
  const gathered: Problem = {
    ok: false,
    kind: 'noReference',
    elements,
    nodes: unreferenced.flatMap((problem) => problem.nodes),
    message: `${shown.slice(0, -1).join(', ')} and ${shown[shown.length - 1] ?? ''} have no connection to the reference node, so their node voltages are not determined. Connect each part of the drawing to the reference.`,
  };
  return [gathered, ...problems.filter(({ kind }) => kind !== 'noReference')];
}

function onDrawing(problem: Problem, network: Network): SheetProblem {
  const nodes = problem.nodes.flatMap((name) => network.nodes.byName.get(name) ?? []);
  return {
    message: problem.message,
    parts: problem.elements.flatMap((id) => network.partOfElement.get(id) ?? []),
    pins: nodes.flatMap((node) => node.pins),
    wires: nodes.flatMap((node) => node.wires),
  };
}
