import type { BranchTable } from './branch-table';

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
  /** What is wrong with an element's own fields, as the end of a sentence that starts with its id; undefined if nothing. */
  readonly faultOf: (fields: UnknownFields) => string | undefined;
  /** Writes what the element is at the frequency into its row. */
  readonly stamp: (element: E, excitation: Excitation, branches: BranchTable, row: number) => void;
}

/** The fault of a field that has to be a finite number, or undefined. */
export function faultOfNumber(fields: UnknownFields, field: string, unitName: string): string | undefined {
  const value = fields[field];
  if (typeof value === 'number' && Number.isFinite(value)) return undefined;
  return `needs a finite number of ${unitName} as its ${field}`;
}
