import type { UnknownFields } from './element-definition';
import type { Element, ElementList } from './element-list';
import { elementKinds, faultOfFields, isElementKind, nodeCountOf } from './registry';

export type ElementListResult =
  | { readonly ok: true; readonly list: ElementList }
  | {
      readonly ok: false;
      /** One sentence that names the element at fault (by id, or by place where it has none) and what it lacks. */
      readonly message: string;
      /** The element at fault by its id, where it has one that can be told. */
      readonly elements: readonly string[];
    };

/** Bounds on what is taken in; a hand-drawn network is far below them. */
const MOST_ELEMENTS = 20_000;
const LONGEST_NAME = 200;

/**
 * Checks that a value from outside is an element list, version 1: the shape, the kinds, the named nodes of each, finite
 * numbers, unique ids, sensed elements that are there. Fields that are not known are passed over. Whether the network has
 * a solution is not asked here. Gives the same elements back, typed.
 */
export function validateElementList(value: unknown): ElementListResult {
  if (!isRecord(value)) return refuse('An element list is an object with a version and elements.');
  if (value['version'] !== 1) return refuse('The element list must be version 1.');
  const { elements } = value;
  if (!Array.isArray(elements)) return refuse('The element list must have an array of elements.');
  if (elements.length > MOST_ELEMENTS) return refuse(`The element list has more than ${MOST_ELEMENTS} elements.`);
  const ids = new Map<string, UnknownFields>();
  for (const [place, element] of (elements as readonly unknown[]).entries()) {
    const fault = faultOf(element, place, ids);
    if (fault !== undefined) return refuse(fault, idOf(element));
  }
  for (const [id, { sensedElement }] of ids) {
    const fault = typeof sensedElement === 'string' ? faultOfSensing(id, sensedElement, ids) : undefined;
    if (fault !== undefined) return refuse(fault, id);
  }
  return { ok: true, list: { version: 1, elements: elements as readonly Element[] } };
}

function faultOf(element: unknown, place: number, ids: Map<string, UnknownFields>): string | undefined {
  if (!isRecord(element)) return `Element ${place + 1} of the list is not an object.`;
  const { id, kind, nodes } = element;
  if (!isName(id)) return `Element ${place + 1} of the list needs an id of 1 to ${LONGEST_NAME} characters.`;
  if (ids.has(id)) return `The id ${id} is given twice; every element needs its own.`;
  ids.set(id, element);
  if (typeof kind !== 'string' || !isElementKind(kind)) {
    return `Element ${id} has no known kind; the kinds are ${elementKinds().join(', ')}.`;
  }
  const fault = faultOfFields(kind, element);
  if (fault !== undefined) return `Element ${id} ${fault}.`;
  const count = nodeCountOf(kind, element);
  if (!Array.isArray(nodes) || nodes.length !== count || !nodes.every(isName)) {
    return `Element ${id} needs ${COUNTS[count] ?? count} nodes, each a name of 1 to ${LONGEST_NAME} characters.`;
  }
  return undefined;
}

const COUNTS: Readonly<Record<number, string>> = { 2: 'two', 3: 'three', 4: 'four' };

/** Only kinds that sense have this field, by their definitions; others may carry it as a field that is not known. */
function faultOfSensing(id: string, sensed: string, ids: ReadonlyMap<string, UnknownFields>): string | undefined {
  const kind = ids.get(id)?.['kind'];
  if (kind !== 'currentControlledVoltageSource' && kind !== 'currentControlledCurrentSource') return undefined;
  const target = ids.get(sensed);
  if (target === undefined) {
    return `Element ${id} senses the current of ${sensed}, which is not in the list; name an element that is.`;
  }
  const { nodes } = target;
  if (Array.isArray(nodes) && nodes.length === 2) return undefined;
  return `Element ${id} senses the current of ${sensed}, which has more than two nodes; name an element with two.`;
}

function isRecord(value: unknown): value is UnknownFields {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

function isName(value: unknown): value is string {
  return typeof value === 'string' && value.length > 0 && value.length <= LONGEST_NAME;
}

function idOf(element: unknown): string | undefined {
  return isRecord(element) && isName(element['id']) ? element['id'] : undefined;
}

function refuse(message: string, id?: string): ElementListResult {
  return { ok: false, message, elements: id === undefined ? [] : [id] };
}
