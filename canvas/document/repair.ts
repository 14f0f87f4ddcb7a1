import { definitionOf, initialValues } from '../parts/registry';
import { DESIGNATOR, freeDesignator, freeNodeName, isNodeName } from './designators';
import type { Part, SheetDocument, Wire } from './types';

/**
 * Mends what a well-formed document may still have wrong, each by its own named step, so that the rest of the house
 * may rely on it: unique ids, unique designators, every field present and none unknown, names that nodes can have,
 * wires that end on pins. A document with nothing wrong comes back as it was.
 */
export function repair(document: SheetDocument): SheetDocument {
  const parts = uniqueDesignators(nameableNodes(uniqueById(document.parts).map(completeValues)));
  const wires = wiresThatEnd(uniqueById(document.wires), parts);
  return { ...document, parts, wires };
}

function uniqueById<T extends { readonly id: string }>(items: readonly T[]): readonly T[] {
  const seen = new Set<string>();
  return items.filter((item) => {
    if (seen.has(item.id)) return false;
    seen.add(item.id);
    return true;
  });
}

function completeValues(part: Part): Part {
  const { fields } = definitionOf(part.kind);
  const complete = Object.fromEntries(
    fields.map((field) => {
      const typed = Object.hasOwn(part.values, field.key) ? part.values[field.key] : undefined;
      const known =
        field.type !== 'choice' || field.options.some((option) => option.value === typed) ? typed : undefined;
      // A name that is missing is found later: the same first name for several would join their nodes.
      return [field.key, known ?? (field.type === 'nodeName' ? '' : field.initial)];
    }),
  );
  const same =
    Object.keys(part.values).length === fields.length &&
    fields.every((field) => part.values[field.key] === complete[field.key]);
  return same ? part : { ...part, values: complete };
}

/** Gives a free name where a node's name cannot be one, `0` among them, which is the reference node's own. */
function nameableNodes(parts: readonly Part[]): readonly Part[] {
  const names = parts.flatMap(({ kind, values }) => (kind === 'nodeName' ? [values['name'] ?? ''] : []));
  const taken = new Set(names.filter(isNodeName));
  return parts.map((part) => {
    if (part.kind !== 'nodeName' || isNodeName(part.values['name'] ?? '')) return part;
    const name = freeNodeName(initialValues('nodeName')['name'] ?? 'node', taken);
    taken.add(name);
    return { ...part, values: { ...part.values, name } };
  });
}

function uniqueDesignators(parts: readonly Part[]): readonly Part[] {
  const taken = new Set<string>();
  const kept = parts.map((part) => {
    const wants = definitionOf(part.kind).letters !== '';
    const good = wants ? DESIGNATOR.test(part.designator) && !taken.has(part.designator) : part.designator === '';
    if (good && wants) taken.add(part.designator);
    return { part, good };
  });
  return kept.map(({ part, good }) => {
    if (good) return part;
    const designator = freeDesignator(part.kind, taken);
    if (designator !== '') taken.add(designator);
    return { ...part, designator };
  });
}

function wiresThatEnd(wires: readonly Wire[], parts: readonly Part[]): readonly Wire[] {
  const byId = new Map(parts.map((part) => [part.id, part]));
  const isPin = ({ part, pin }: Wire['from']) => {
    const found = byId.get(part);
    return found !== undefined && definitionOf(found.kind).pins.some((candidate) => candidate.name === pin);
  };
  return wires.filter(
    (wire) =>
      isPin(wire.from) && isPin(wire.to) && !(wire.from.part === wire.to.part && wire.from.pin === wire.to.pin),
  );
}
