/**
 * Why a network, or a part of it, has no unique solution.
 *
 * - `invalid`: the element list or the request itself is faulty.
 * - `noReference`: a part of the network has no connection of any kind to the reference node.
 * - `floatingNode`: nodes that no conducting path ties to the rest, so that nothing sets their voltage, or that a
 *   single current source drives without a way back.
 * - `voltageLoop`: a loop of voltage sources and ideal connections alone.
 * - `currentCutSet`: current sources that alone join two parts of the network.
 * - `resonance`: a lossless resonance exactly at the frequency asked for.
 * - `noFeedback`: an ideal amplifier with no way from its output back to its inputs.
 * - `noData`: an element is known from a table that does not reach the frequency asked for.
 * - `singular`: the equations have no unique solution for any other reason.
 * - `notReliable`: solved, but some readings may have lost too many digits to rounding.
 * - `notFinite`: values so large or so small that they leave the range of the arithmetic.
 */
export type ProblemKind =
  | 'invalid'
  | 'noReference'
  | 'floatingNode'
  | 'voltageLoop'
  | 'currentCutSet'
  | 'noFeedback'
  | 'noData'
  | 'resonance'
  | 'singular'
  | 'notReliable'
  | 'notFinite';

/** A problem in words, with the elements and the nodes at fault by their names in the element list. */
export interface Problem {
  readonly ok: false;
  readonly kind: ProblemKind;
  readonly elements: readonly string[];
  readonly nodes: readonly string[];
  /** One or two sentences: what is wrong, where, and what to do. */
  readonly message: string;
}

/** Makes a `Problem`. */
export function problem(
  kind: ProblemKind,
  elements: readonly string[],
  nodes: readonly string[],
  message: string,
): Problem {
  return { ok: false, kind, elements, nodes, message };
}

/** A faulty request, with the nodes and elements that it names where they exist. */
export function invalid(message: string, nodes: readonly string[] = [], elements: readonly string[] = []): Problem {
  return problem('invalid', elements, nodes, message);
}

/** Narrows to a problem. */
export function isProblem(value: unknown): value is Problem {
  return typeof value === 'object' && value !== null && 'ok' in value && value.ok === false;
}

/** Names in a sentence: "R1", "R1 and R2", "R1, R2 and R3"; more than `most` are counted, not listed. */
export function listNames(names: readonly string[], most = 6): string {
  const shown = names.length > most ? [...names.slice(0, most - 1), `${names.length - most + 1} more`] : [...names];
  const last = shown.pop();
  if (last === undefined) return 'none';
  return shown.length === 0 ? last : `${shown.join(', ')} and ${last}`;
}

/** "node 3", or "nodes 3, 4 and 5". */
export function nodeWords(nodes: readonly string[]): string {
  return `${nodes.length === 1 ? 'node' : 'nodes'} ${listNames(nodes)}`;
}
