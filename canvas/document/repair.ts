import { definitionOf } from '../parts/registry';
import { DESIGNATOR, freeDesignator } from './designators';
import type { Part, SheetDocument, Wire } from './types';

/**
 * Mends what a well-formed document may still have wrong, each by its own named step, so that the rest of the house
 * may rely on it: unique ids, unique designators, every field present and none unknown, wires that end on pins.
 * A document with nothing wrong comes back as it was.
 */
export function repair(document: SheetDocument): SheetDocument {
  const parts = uniqueDesignators(uniqueById(document.parts).map(completeValues));
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
      return [field.key, known ?? field.initial];
    }),
  );
  const same =
    Object.keys(part.values).length === fields.length &&
    fields.every((field) => part.values[field.key] === complete[field.key]);
  return same ? part : { ...part, values: complete };
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
