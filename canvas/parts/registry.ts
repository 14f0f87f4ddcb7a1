import { capacitor } from './capacitor/definition';
import { currentSource } from './current-source/definition';
import type { PartDefinition } from './definition';
import { inductor } from './inductor/definition';
import { junction } from './junction/definition';
import { nodeName } from './node-name/definition';
import { reference } from './reference/definition';
import { resistor } from './resistor/definition';
import { voltageSource } from './voltage-source/definition';

/** Every kind of part, in the Shelf's order. */
export const partDefinitions = {
  resistor,
  capacitor,
  inductor,
  voltageSource,
  currentSource,
  reference,
  nodeName,
  junction,
} as const satisfies Record<string, PartDefinition>;

export type PartKind = keyof typeof partDefinitions;

export const PART_KINDS = Object.keys(partDefinitions) as readonly PartKind[];

export function definitionOf(kind: PartKind): PartDefinition {
  return partDefinitions[kind];
}

/** The values that a new part of the kind starts with. */
export function initialValues(kind: PartKind): Record<string, string> {
  return Object.fromEntries(definitionOf(kind).fields.map((field) => [field.key, field.initial]));
}
