import { capacitor } from './capacitor';
import {
  currentControlledCurrentSource,
  currentControlledVoltageSource,
  voltageControlledCurrentSource,
  voltageControlledVoltageSource,
} from './controlled-sources';
import { coupledInductors } from './coupled-inductors';
import { currentSource } from './current-source';
import type { ElementDefinition, UnknownFields } from './element-definition';
import type { Element, ElementKind } from './element-list';
import { idealTransformer } from './ideal-transformer';
import { impedance } from './impedance';
import { inductor } from './inductor';
import type { Law } from './law';
import { line } from './line';
import { operationalAmplifier } from './operational-amplifier';
import { resistor } from './resistor';
import { twoPort } from './two-port';
import { voltageSource } from './voltage-source';

type ElementByKind = { readonly [K in ElementKind]: Extract<Element, { kind: K }> };

/** Every kind, one line each. */
const DEFINITIONS: { readonly [K in ElementKind]: ElementDefinition<ElementByKind[K]> } = {
  resistor,
  capacitor,
  inductor,
  impedance,
  coupledInductors,
  idealTransformer,
  voltageSource,
  currentSource,
  voltageControlledVoltageSource,
  voltageControlledCurrentSource,
  currentControlledVoltageSource,
  currentControlledCurrentSource,
  operationalAmplifier,
  twoPort,
  line,
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

/** How many nodes an element of the kind has, by its fields. */
export function nodeCountOf(kind: ElementKind, fields: UnknownFields): number {
  const { nodeCount } = DEFINITIONS[kind];
  return typeof nodeCount === 'number' ? nodeCount : nodeCount(fields);
}

/** The ports of an element, as pairs of nodes. */
export function portsOf(element: Element): readonly (readonly [string, string])[] {
  return definitionOf(element).ports(element);
}

/** What an element is: one law for each of its ports. */
export function lawsOf(element: Element): readonly Law[] {
  return definitionOf(element).laws(element);
}

/** The definition of an element's own kind; the table is keyed by kind, which the compiler cannot follow. */
function definitionOf(element: Element): ElementDefinition<Element> {
  return DEFINITIONS[element.kind] as unknown as ElementDefinition<Element>;
}
