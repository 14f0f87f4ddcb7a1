import type { Element, ElementList } from '@/solver';
import { pinKey, pinsOf } from '../document/lookup';
import type { Part, PartId, SheetDocument } from '../document/types';
import type { PartValues } from '../parts/definition';
import { readFrequency } from '../parts/read-values';
import { definitionOf } from '../parts/registry';
import { findNodes, type Nodes } from './nodes';

/** A field of a part that cannot be read. */
export type UnreadableField = { readonly part: PartId; readonly field: string; readonly message: string };

/** What a drawing is to the solver, and how to find the way back from its answers to the drawing. */
export type Network = {
  readonly list: ElementList;
  readonly nodes: Nodes;
  /** Element ids are designators, since the solver's sentences name them. */
  readonly partOfElement: ReadonlyMap<string, PartId>;
  readonly elementOfPart: ReadonlyMap<PartId, Element>;
  readonly unreadable: readonly UnreadableField[];
};

/** Turns the drawing into an element list: parts that are elements, the nodes of their pins, their values in SI. */
export function buildNetwork(document: SheetDocument): Network {
  const nodes = findNodes(document);
  const elements: Element[] = [];
  const partOfElement = new Map<string, PartId>();
  const elementOfPart = new Map<PartId, Element>();
  const unreadable: UnreadableField[] = [];
  const operating = readFrequency(document.operatingFrequency);
  const direct = operating.ok && operating.value === 0;
  for (const part of document.parts) {
    const definition = definitionOf(part.kind);
    if (!definition.element) continue;
    const pinNodes = pinsOf(part).map((pin) => nodes.byPin.get(pinKey(pin.ref))?.name ?? '');
    const outcome = definition.element(part.designator, pinNodes, direct ? atDirectCurrent(part) : part.values);
    if (!outcome.ok) {
      unreadable.push({ part: part.id, field: outcome.field, message: outcome.message });
      continue;
    }
    elements.push(outcome.element);
    partOfElement.set(part.designator, part.id);
    elementOfPart.set(part.id, outcome.element);
  }
  return { list: { version: 1, elements }, nodes, partOfElement, elementOfPart, unreadable };
}

/**
 * At an operating frequency of 0 Hz a source that follows it delivers its amplitude as a direct value, just as one whose
 * own frequency is 0 Hz: there is no peak, no rms and no phase to tell apart.
 */
function atDirectCurrent(part: Part): PartValues {
  return part.values['frequency'] === '' ? { ...part.values, frequency: '0 Hz' } : part.values;
}
