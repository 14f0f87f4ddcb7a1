import type { BranchTable } from './branch-table';
import { capacitor } from './capacitor';
import { currentSource } from './current-source';
import type { ElementDefinition, Excitation, UnknownFields } from './element-definition';
import type { Element, ElementKind } from './element-list';
import { inductor } from './inductor';
import { resistor } from './resistor';
import { voltageSource } from './voltage-source';

type ElementByKind = { readonly [K in ElementKind]: Extract<Element, { kind: K }> };

/** Every kind, one line each. */
const DEFINITIONS: { readonly [K in ElementKind]: ElementDefinition<ElementByKind[K]> } = {
  resistor,
  capacitor,
  inductor,
  voltageSource,
  currentSource,
};

const KINDS: ReadonlySet<string> = new Set(Object.keys(DEFINITIONS));

/** Whether a text is the name of an element kind. */
export function isElementKind(text: string): text is ElementKind {
  return KINDS.has(text);
}

/** All kinds, for a sentence that has to name them. */
export function elementKinds(): readonly string[] {
  return [...KINDS];
}

/** What sentences call the kind. */
export function kindName(kind: ElementKind): string {
  return DEFINITIONS[kind].name;
}

/** What is wrong with the fields of an element of the kind, as the end of a sentence; undefined if nothing. */
export function faultOfFields(kind: ElementKind, fields: UnknownFields): string | undefined {
  return DEFINITIONS[kind].faultOf(fields);
}

function stamp<K extends ElementKind>(
  kind: K,
  element: ElementByKind[K],
  excitation: Excitation,
  branches: BranchTable,
  row: number,
): void {
  DEFINITIONS[kind].stamp(element, excitation, branches, row);
}

/** Writes what every element is at the frequency into the table, row for row. */
export function stampAll(elements: readonly Element[], excitation: Excitation, branches: BranchTable): void {
  elements.forEach((element, row) => stamp(element.kind, element, excitation, branches, row));
}
