import type { Law } from './law';

/** The frequency at which elements are asked what they are. */
export interface Excitation {
  /** Hertz, finite, not negative. */
  readonly frequency: number;
  /** 2π·frequency, rad/s. */
  readonly omega: number;
}

/** The fields of an element as they came in, before anything is known of them. */
export type UnknownFields = Readonly<Record<string, unknown>>;

/** All that the solver knows of an element kind. A kind is one file with one of these, and one line of the registry. */
export interface ElementDefinition<E> {
  /** How sentences call it: "resistor", "voltage source". */
  readonly name: string;
  /** How many nodes an element of the kind has; a function of its fields where that depends on them. */
  readonly nodeCount: number | ((fields: UnknownFields) => number);
  /** What is wrong with an element's own fields, as the end of a sentence that starts with its id; undefined if nothing. */
  readonly faultOf: (fields: UnknownFields) => string | undefined;
  /** Its ports, as pairs of nodes, in order. */
  readonly ports: (element: E) => readonly (readonly [string, string])[];
  /** One law for each port, in the same order. */
  readonly laws: (element: E) => readonly Law[];
}

/** The ports of an element with one pair of nodes. */
export function onePort({ nodes }: { readonly nodes: readonly [string, string] }): readonly (readonly [string, string])[] {
  return [nodes];
}

/** The ports of an element with two pairs of nodes. */
export function twoPorts({
  nodes: [a, b, c, d],
}: {
  readonly nodes: readonly [string, string, string, string];
}): readonly (readonly [string, string])[] {
  return [
    [a, b],
    [c, d],
  ];
}

/** The fault of a field that has to be a finite number, or undefined. */
export function faultOfNumber(fields: UnknownFields, field: string, unitName: string): string | undefined {
  const value = fields[field];
  if (typeof value === 'number' && Number.isFinite(value)) return undefined;
  return `needs a finite number${unitName === '' ? '' : ` of ${unitName}`} as its ${wordsOf(field)}`;
}

/** The fault of a field that has to be a number above zero, or undefined. */
export function faultOfPositive(fields: UnknownFields, field: string, unitName: string): string | undefined {
  const value = fields[field];
  if (typeof value === 'number' && Number.isFinite(value) && value > 0) return undefined;
  return `needs a number${unitName === '' ? '' : ` of ${unitName}`} above zero as its ${wordsOf(field)}`;
}

/** The first fault of several. */
export function firstFault(...faults: readonly (string | undefined)[]): string | undefined {
  return faults.find((fault) => fault !== undefined);
}

/** `openLoopGain` as words: "open loop gain". */
function wordsOf(field: string): string {
  return field.replace(/[A-Z]/g, (letter) => ` ${letter.toLowerCase()}`);
}
