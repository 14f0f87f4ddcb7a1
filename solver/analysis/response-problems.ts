import type { ExtendedVector } from '../linear/extended';
import type { Freedom } from './branch-form';
import { singularProblem } from './diagnosis';
import type { Network } from './network';
import { branchTableOf, elementAt } from './network';
import type { Problem } from './problem';
import { listNames, nodeWords, problem } from './problem';
import type { Pin, ResponseLayout } from './response-layout';

/** What stands in the way of solving a network's response equations, in words: the cause first, then the remedy. */

/** An output is asked for that a pinned part or loop leaves free. */
export function freeProblem(network: Network, layout: ResponseLayout, pin: Pin, frequency: number): Problem {
  if (pin.cause === 'loop') return loopProblem(network, pin.of, frequency, 'so the currents in it are not determined.');
  const nodes = nodesOfPart(network, layout, pin.of);
  return problem(
    'floatingNode',
    [],
    nodes,
    `Nothing ties ${nodeWords(nodes)} to the rest of the network at ${frequency} Hz, so the voltage between them and ` +
      'the rest is not determined. Connect one of them to the reference node, or read between two of them.',
  );
}

/** What drives the network breaks the law of a pinned part or loop. */
export function contradictionProblem(network: Network, layout: ResponseLayout, pin: Pin, frequency: number): Problem {
  if (pin.cause === 'loop') return loopProblem(network, pin.of, frequency, 'and the voltages around it do not add up to zero.');
  const nodes = nodesOfPart(network, layout, pin.of);
  return problem(
    'floatingNode',
    [],
    nodes,
    `A current is driven into ${nodeWords(nodes)} at ${frequency} Hz and has no way back from there. ` +
      'Give it one, or take the current source out.',
  );
}

/**
 * What the equations leave free by the numbers, in the words of `solve`.
 *
 * @param modes what may be added to a solution, with nothing in it that is but rounding
 * @param isConsistent whether what drives the network leaves a solution
 */
export function dependenceProblem(
  network: Network,
  { branchOf }: ResponseLayout,
  modes: readonly ExtendedVector[],
  frequency: number,
  isConsistent: boolean,
): Problem {
  const isFree = (unknown: number): boolean => modes.some(({ re, im }) => re[unknown] !== 0 || im[unknown] !== 0);
  const rows = Array.from(branchOf.keys());
  const freedom: Freedom = {
    consistent: isConsistent,
    dimension: modes.length,
    nodes: Array.from(network.nodeNames.keys()).filter((node) => node > 0 && isFree(node - 1)),
    currents: rows.filter((row) => (branchOf[row] ?? -1) >= 0 && isFree(branchOf[row] ?? 0)),
    voltages: [],
  };
  const branches = branchTableOf(network);
  branches.evaluate({ frequency, omega: 2 * Math.PI * frequency });
  return singularProblem(network, branches, rows, freedom, frequency);
}

/** The frequency lies outside a table. */
export function tableProblem(network: Network, row: number, frequency: number): Problem {
  const id = elementAt(network, row)?.id ?? '';
  return problem(
    'noData',
    [id],
    [],
    `The table of ${id} does not reach ${frequency} Hz. Choose a frequency within it, or give it more points.`,
  );
}

/** No unique solution, and no more is known than the unknowns, if any, for which no equation was left. */
export function noSolutionProblem(
  network: Network,
  { branchOf }: ResponseLayout,
  unknowns: readonly number[],
  frequency: number,
): Problem {
  const nodeCount = network.nodeNames.length;
  const nodes = unknowns.flatMap((unknown) => (unknown < nodeCount - 1 ? [network.nodeNames[unknown + 1] ?? ''] : []));
  const elements = unknowns.flatMap((unknown) => {
    const row = unknown < nodeCount - 1 ? -1 : branchOf.indexOf(unknown);
    return row < 0 ? [] : [elementAt(network, row)?.id ?? ''];
  });
  const free = [
    ...(nodes.length === 0 ? [] : [`the voltage of ${nodeWords(nodes)}`]),
    ...(elements.length === 0 ? [] : [`the current of ${listNames(elements)}`]),
  ];
  const what = free.length === 0 ? 'some of its voltages and currents' : free.join(' and ');
  return problem(
    'singular',
    elements,
    nodes,
    `At ${frequency} Hz the equations of the network have no unique solution, or are within rounding of having none: ` +
      `they leave ${what} free. Look for a lossless resonance, a loop of ideal elements, or an amplifier without feedback there.`,
  );
}

function loopProblem(network: Network, row: number, frequency: number, consequence: string): Problem {
  const id = elementAt(network, row)?.id ?? '';
  const nodes = [network.first[row] ?? 0, network.second[row] ?? 0].map((node) => network.nodeNames[node] ?? '');
  return problem(
    'voltageLoop',
    [id],
    nodes,
    `${id} closes a loop with no impedance in it at ${frequency} Hz, ${consequence} ` +
      'Put a small resistance in series, or open the loop.',
  );
}

function nodesOfPart({ nodeNames }: Network, { partOf }: ResponseLayout, of: number): string[] {
  return nodeNames.filter((_, node) => partOf[node] === partOf[of]);
}
