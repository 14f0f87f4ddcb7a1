import { parseQuantity } from '@/solver';
import { DESIGNATOR, NODE_NAME } from '../../document/designators';
import { designatorsOf, partsById } from '../../document/lookup';
import { MAX_TEXT } from '../../document/limits';
import type { PartId, SheetDocument } from '../../document/types';
import type { FieldDefinition } from '../../parts/definition';
import { readAngle, readFrequency } from '../../parts/read-values';
import { definitionOf } from '../../parts/registry';

export type EditResult =
  | { readonly ok: true; readonly document: SheetDocument }
  | { readonly ok: false; readonly message: string };

/** Whether a field can be given this text, and if not, the sentence that names the fault. */
export function checkField(field: FieldDefinition, text: string): string | null {
  if (text.length > MAX_TEXT) return `That is too long: a field has at most ${MAX_TEXT} characters.`;
  switch (field.type) {
    case 'quantity': {
      const read = parseQuantity(text, field.unit);
      return read.ok ? null : read.message;
    }
    case 'frequency': {
      if (text.trim() === '') return null;
      const read = readFrequency(text);
      return read.ok ? null : read.message;
    }
    case 'angle': {
      const read = readAngle(text);
      return read.ok ? null : read.message;
    }
    case 'choice':
      return field.options.some(({ value }) => value === text) ? null : 'Choose one of the given ways.';
    case 'nodeName':
      if (text === '0') return '0 is the reference node. Use a reference mark to make this node 0 V.';
      return NODE_NAME.test(text) ? null : 'A node name has up to 16 letters, digits, and the marks _ . + -.';
  }
}

/** Gives fields of a part new text. What cannot be read is refused, and the old value stays. */
export function setValues(document: SheetDocument, id: PartId, values: Readonly<Record<string, string>>): EditResult {
  const part = partsById(document).get(id);
  if (!part) return { ok: false, message: 'That part is no longer on the sheet.' };
  for (const [key, text] of Object.entries(values)) {
    const field = definitionOf(part.kind).fields.find((candidate) => candidate.key === key);
    if (!field) return { ok: false, message: 'This part has no such field.' };
    const fault = checkField(field, text.trim());
    if (fault !== null) return { ok: false, message: fault };
  }
  const trimmed = Object.fromEntries(Object.entries(values).map(([key, text]) => [key, text.trim()]));
  if (Object.entries(trimmed).every(([key, text]) => part.values[key] === text)) return { ok: true, document };
  return { ok: true, document: replacePart(document, id, { values: { ...part.values, ...trimmed } }) };
}

/** Gives a part another designator; refused when it is taken or cannot be one. */
export function setDesignator(document: SheetDocument, id: PartId, designator: string): EditResult {
  const wanted = designator.trim();
  const part = partsById(document).get(id);
  if (!part) return { ok: false, message: 'That part is no longer on the sheet.' };
  if (wanted === part.designator) return { ok: true, document };
  if (definitionOf(part.kind).letters === '') return { ok: false, message: 'This kind of part has no designator.' };
  if (!DESIGNATOR.test(wanted)) {
    return { ok: false, message: 'A designator is a letter and then up to 15 letters, digits, or the marks _ . + -.' };
  }
  if (designatorsOf(document).has(wanted)) return { ok: false, message: `${wanted} is on the sheet already.` };
  return { ok: true, document: replacePart(document, id, { designator: wanted }) };
}

function replacePart(
  document: SheetDocument,
  id: PartId,
  change: Partial<Pick<SheetDocument['parts'][number], 'values' | 'designator'>>,
): SheetDocument {
  return { ...document, parts: document.parts.map((part) => (part.id === id ? { ...part, ...change } : part)) };
}
