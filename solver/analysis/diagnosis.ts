import type { BranchTable } from '../elements/branch-table';
import { ADMITTANCE } from '../elements/branch-table';
import type { Element } from '../elements/element-list';
import { kindName } from '../elements/registry';
import type { Freedom } from './branch-form';
import type { Network } from './network';
import { elementAt } from './network';
import type { Problem } from './problem';
import { listNames, nodeWords, problem } from './problem';
import type { Component, VoltageLoop } from './structure';

/** Puts a problem into words: the cause first, then the remedy. */

function names(network: Network, nodes: Iterable<number>): string[] {
  return Array.from(nodes, (node) => network.nodeNames[node] ?? '');
}

/** The elements of rows by their ids, each once. */
function ids(network: Network, rows: Iterable<number>): string[] {
  return [...new Set(Array.from(rows, (row) => elementAt(network, row)?.id ?? ''))];
}

function nodesOf({ first, second }: Network, rows: Iterable<number>): Set<number> {
  const nodes = new Set<number>();
  for (const row of rows) {
    nodes.add(first[row] ?? 0);
    nodes.add(second[row] ?? 0);
  }
  return nodes;
}

/** An element with the reason for which it is an ideal connection, where it is one. */
function asConnection(element: Element): string {
  switch (element.kind) {
    case 'voltageSource':
      return element.id;
    case 'inductor':
      return element.inductance === 0 ? `${element.id} (0 H)` : `${element.id} (an ideal connection at 0 Hz)`;
    case 'resistor':
      return `${element.id} (0 Ω)`;
    default:
      return element.id;
  }
}

/** A loop of given voltages: whether they add up to zero decides if a solution exists at all. */
export function voltageLoopProblem(network: Network, loop: VoltageLoop, agrees: boolean): Problem {
  const rows = [loop.closing, ...loop.path].sort((a, b) => a - b);
  const elements = rows.flatMap((row) => elementAt(network, row) ?? []);
  const words = listNames(elements.map(asConnection));
  const sources = elements.filter((element) => element.kind === 'voltageSource');
  const nodes = names(network, nodesOf(network, rows));
  const make = (message: string): Problem => problem('voltageLoop', ids(network, rows), nodes, message);

  if (elements.length === 1) {
    const [element] = elements;
    const what = element === undefined ? '' : `${capital(kindName(element.kind))} ${asConnection(element)}`;
    const where = `${what} has both ends on ${nodeWords(nodes)}`;
    return agrees
      ? make(`${where}, so the current around it is not determined; remove it, or give it a resistance.`)
      : make(`${where}, which short-circuits it; remove the short circuit, or put an impedance in series.`);
  }
  if (!agrees) {
    const cause =
      sources.length > 1
        ? `${words} form a loop with no impedance in it, and their voltages do not add up to zero.`
        : `${words} form a loop that short-circuits ${sources[0]?.id ?? 'the source'}.`;
    return make(`${cause} Put an impedance in series with one of them, or open the loop.`);
  }
  const cause = `${words} form a loop with no impedance in it, so the currents in it are not determined.`;
  return make(`${cause} Put a small resistance in series with one of them, or take one out.`);
}

/** A part of the network that no element of any form joins to the reference node. */
export function noReferenceProblem(network: Network, nodes: readonly number[], rows: readonly number[]): Problem {
  const what =
    rows.length === 0 ? capital(nodeWords(names(network, nodes))) : `The part with ${listNames(ids(network, rows))}`;
  return problem(
    'noReference',
    ids(network, rows),
    names(network, nodes),
    `${what} has no connection to the reference node, so its node voltages are not determined. ` +
      'Connect one of its nodes to the reference.',
  );
}

/** A component with no conducting path to the reference node, and the given currents around it. */
export function floatingProblem(
  network: Network,
  branches: BranchTable,
  component: Component,
  agrees: boolean,
): Problem {
  const around = component.outerCurrents;
  const live = around.filter((row) => !branches.isGivenZero(row));
  const nodes = names(network, component.nodes);
  const where = nodeWords(nodes);
  if (live.length > 1) {
    const sources = listNames(ids(network, live));
    const cause = agrees
      ? `Current sources ${sources} alone lead to ${where}, so the voltage there is not determined.`
      : `Current sources ${sources} alone lead to ${where}, and their currents do not add up to zero there, so nothing that they enter can be solved.`;
    const remedy = 'Give the current another path, such as a resistor across one of the sources.';
    return problem('currentCutSet', ids(network, live), nodes, `${cause} ${remedy}`);
  }
  const [source] = ids(network, live);
  if (source !== undefined) {
    return problem(
      'floatingNode',
      ids(network, around),
      nodes,
      `The current of ${source} has no way on from ${where}, so nothing that it enters can be solved. Connect ${nodes.length === 1 ? 'it' : 'them'} to the rest ` +
        'through an element that conducts at this frequency.',
    );
  }
  const leads =
    around.length === 0
      ? 'Nothing leads'
      : `Only ${listNames(ids(network, around).map(openWords(network)))} lead${around.length === 1 ? 's' : ''}`;
  return problem(
    'floatingNode',
    ids(network, around),
    nodes,
    `${leads} to ${where}, so nothing sets the voltage there. Add a path that conducts at this frequency, such as a resistor to the reference.`,
  );
}

/** An element with the reason for which it is open. */
function openWords(network: Network): (id: string) => string {
  return (id) => {
    const element = network.elements[network.elementIndex.get(id) ?? -1];
    switch (element?.kind) {
      case 'capacitor':
        return element.capacitance === 0 ? `${id} (0 F)` : `${id} (open at 0 Hz)`;
      case 'currentSource':
        return `${id} (no current at this frequency)`;
      case 'operationalAmplifier':
        return `${id} (no current enters its inputs)`;
      case 'voltageControlledVoltageSource':
      case 'voltageControlledCurrentSource':
        return `${id} (no current enters where it senses)`;
      default:
        return id;
    }
  };
}

/** The numbers found no unique solution, among the equations of some rows, where the graph saw nothing wrong. */
export function singularProblem(
  network: Network,
  branches: BranchTable,
  rows: readonly number[],
  freedom: Freedom,
  frequency: number,
): Problem {
  const carrying = freedom.currents.filter((row) => branches.form[row] === ADMITTANCE);
  const lossless = carrying.length > 0 && carrying.every((row) => branches.zRe[row] === 0);
  const nodes = names(network, freedom.nodes.length > 0 ? freedom.nodes : nodesOf(network, freedom.currents));
  const elements = ids(network, freedom.currents.length > 0 ? freedom.currents : rows);
  const where = `${listNames(elements)}${nodes.length === 0 ? '' : ` (${nodeWords(nodes)})`}`;
  if (lossless) {
    const what = `${listNames(ids(network, carrying))} resonate without loss at exactly ${frequency} Hz`;
    const effect = freedom.consistent
      ? 'so what oscillates there is not determined by the sources'
      : 'and the sources drive it, so the response grows without bound';
    return problem(
      'resonance',
      elements,
      nodes,
      `${what}, ${effect}. Put in the losses that real parts have, or move the frequency.`,
    );
  }
  return problem(
    'singular',
    elements,
    nodes,
    `The equations of ${where} have no unique solution at ${frequency} Hz: its impedances cancel exactly. ` +
      'Change one of the values, or the frequency.',
  );
}

/** The network is beyond what can be solved with care at a frequency where care is needed. */
export function tooLargeProblem(network: Network, components: readonly Component[], frequency: number): Problem {
  const rows = rowsOf(components);
  return problem(
    'singular',
    ids(network, rows),
    names(
      network,
      components.flatMap(({ nodes }) => nodes),
    ),
    `The equations of ${listNames(ids(network, rows))} are too near to having no solution at ${frequency} Hz, and too many ` +
      'to be solved with more care. Move the frequency, or add losses.',
  );
}

/** Values that leave the range in which the arithmetic can be trusted. */
export function rangeProblem(network: Network, components: readonly Component[], rows: readonly number[]): Problem {
  const at = rows.length > 0 ? rows : rowsOf(components);
  return problem(
    'notFinite',
    ids(network, at),
    names(network, rows.length > 0 ? nodesOf(network, rows) : components.flatMap(({ nodes }) => nodes)),
    `The value of ${listNames(ids(network, at))} is so large or so small at this frequency that it cannot be computed with. ` +
      'Check its power of ten.',
  );
}

/** The frequency lies outside what is known of an element. */
export function noDataProblem(network: Network, rows: readonly number[], frequency: number): Problem {
  const elements = ids(network, rows);
  const what = elements.length === 1 ? 'its points do' : 'their points do';
  return problem(
    'noData',
    elements,
    names(network, nodesOf(network, rows)),
    `${listNames(elements)} ${elements.length === 1 ? 'is' : 'are'} not known at ${frequency} Hz, where ${what} not reach. ` +
      'Move the frequency, or give points that reach so far.',
  );
}

/** Nothing leads from the output of an ideal amplifier back to its inputs. */
export function noFeedbackProblem(network: Network, row: number, inputs: number): Problem {
  const [id = ''] = ids(network, [row]);
  return problem(
    'noFeedback',
    [id],
    names(network, nodesOf(network, [row, inputs])),
    `At this frequency nothing leads from the output of ${id} back to its inputs, so nothing sets the voltage there. ` +
      'Connect the output to its inverting input through an element that conducts.',
  );
}

/** Readings of which rounding may have taken too many digits. */
export function notReliableProblem(network: Network, nodes: readonly number[], rows: readonly number[]): Problem {
  const elements = ids(network, rows);
  const at = names(network, nodes);
  const what = [
    ...(elements.length > 0 ? [`the readings of ${listNames(elements)}`] : []),
    ...(at.length > 0 ? [`the voltage of ${nodeWords(at)}`] : []),
  ].join(' and ');
  return problem(
    'notReliable',
    elements,
    at,
    `${capital(what)} may be off by more than a millionth, because the equations are nearly singular at this frequency. ` +
      'Move the frequency, or put in the losses that real parts have.',
  );
}

/** The rows of components that conduct or have an equation. */
export function rowsOf(components: readonly Component[]): number[] {
  return components.flatMap(({ admittances, equations }) => [...admittances, ...equations]);
}

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
