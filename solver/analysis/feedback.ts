import type { BranchTable } from '../elements/branch-table';
import { GIVEN_CURRENT, GIVEN_VOLTAGE } from '../elements/branch-table';
import { noFeedbackProblem } from './diagnosis';
import type { Network } from './network';
import { elementAt, REFERENCE } from './network';
import type { Problem } from './problem';

/**
 * Of the rows with an equation, a problem for each ideal amplifier whose output reaches neither of its inputs. What a node's
 * voltage reaches: the other nodes of rows that conduct, and the nodes of rows in whose equation it stands. Nodes that given
 * voltages hold it does not move, but the current that enters there it does, and so the nodes of rows that sense the current
 * of a given voltage, as of one of 0 V that stands for an ammeter.
 */
export function amplifiersWithoutFeedback(
  network: Network,
  equations: readonly number[],
  branches: BranchTable,
): readonly Problem[] {
  const outputs = equations.filter((row) => elementAt(network, row)?.kind === 'operationalAmplifier' && !hasOwnTerm(branches, row));
  if (outputs.length === 0) return [];
  const isHeld = heldNodes(network, branches);
  const around = rowsAround(network, branches);
  const byHeldCurrents = rowsSensingGivenVoltages(branches);
  return outputs.flatMap((row) => {
    const inputs = branches.equations[row]?.row[0] ?? row;
    const from = network.first[row] ?? REFERENCE;
    const reached = reach(network, around, isHeld, byHeldCurrents, from);
    const [plus, minus] = [network.first[inputs] ?? 0, network.second[inputs] ?? 0];
    return reached.has(plus) || reached.has(minus) ? [] : [noFeedbackProblem(network, row, inputs)];
  });
}

function hasOwnTerm(branches: BranchTable, row: number): boolean {
  return branches.equations[row]?.row.includes(row) ?? false;
}

/** The reference node, and what given voltages tie to it. */
function heldNodes({ first, second }: Network, branches: BranchTable): ReadonlySet<number> {
  const held = new Set([REFERENCE]);
  for (let size = 0; size !== held.size; ) {
    size = held.size;
    for (let row = 0; row < branches.size; row++) {
      if (branches.form[row] !== GIVEN_VOLTAGE) continue;
      const a = first[row] ?? 0;
      const b = second[row] ?? 0;
      if (held.has(a)) held.add(b);
      else if (held.has(b)) held.add(a);
    }
  }
  return held;
}

/** For each node, the rows whose nodes its voltage reaches. What only senses is not reached by what it steers. */
function rowsAround({ first, second, nodeNames }: Network, branches: BranchTable): readonly (readonly number[])[] {
  const around: number[][] = nodeNames.map(() => []);
  for (let row = 0; row < branches.size; row++) {
    if (branches.form[row] === GIVEN_CURRENT) continue;
    for (const from of [row, ...(branches.equations[row]?.row ?? [])]) {
      around[first[from] ?? 0]?.push(row);
      around[second[from] ?? 0]?.push(row);
    }
  }
  return around;
}

/** The rows in whose equation the current of a given voltage stands. */
function rowsSensingGivenVoltages({ equations, form }: BranchTable): readonly number[] {
  return equations.flatMap((equation, row) =>
    equation?.row.some((of, term) => equation.ofVoltage[term] !== 1 && form[of] === GIVEN_VOLTAGE) === true ? [row] : [],
  );
}

function reach(
  { first, second }: Network,
  around: readonly (readonly number[])[],
  isHeld: ReadonlySet<number>,
  byHeldCurrents: readonly number[],
  from: number,
): ReadonlySet<number> {
  const reached = new Set<number>();
  const waiting: number[] = [];
  let isHeldReached = false;
  const visit = (node: number): void => {
    if (isHeld.has(node)) {
      if (node === REFERENCE || isHeldReached) return;
      isHeldReached = true;
      for (const row of byHeldCurrents) visitRow(row);
    } else if (!reached.has(node)) {
      reached.add(node);
      waiting.push(node);
    }
  };
  const visitRow = (row: number): void => {
    visit(first[row] ?? REFERENCE);
    visit(second[row] ?? REFERENCE);
  };
  visit(from);
  for (let node = waiting.pop(); node !== undefined; node = waiting.pop()) {
    for (const row of around[node] ?? []) visitRow(row);
  }
  return reached;
}
