import { createHash } from 'node:crypto';
import { parseSheetDocument, serializeSheetDocument } from '@/canvas/document/schema';
import type { SheetDocument } from '@/canvas/document/types';

/** A document in the form of the columns that keep it. */
export type StoredDocument = {
  readonly document: string;
  readonly documentHash: string;
  readonly purpose: string;
  readonly partCount: number;
};

/** The one way in. The same document always comes to the same text, so equal ones have equal hashes. */
export function toStored(document: SheetDocument): StoredDocument {
  const text = serializeSheetDocument(document);
  // Reference marks, names and junctions are drawn like parts, but nobody would count them.
  const partCount = document.parts.filter(({ designator }) => designator !== '').length;
  return { document: text, documentHash: hashOf(text), purpose: document.purpose, partCount };
}

/**
 * The one way out: reads, validates, and brings a document of an older version up to date.
 * @throws Error when what is stored cannot be read, which nothing that was written here can be
 */
export function fromStored(text: string, of: string): SheetDocument {
  const read = parseSheetDocument(text);
  if (!read.ok) throw new Error(`The stored document of ${of} cannot be read: ${read.message}`);
  return read.document;
}

/** A snapshot's way out, which also proves that it is what was frozen. */
export function fromFrozen(text: string, documentHash: string, of: string): SheetDocument {
  if (hashOf(text) !== documentHash) throw new Error(`The stored document of ${of} is not the one that was frozen.`);
  return fromStored(text, of);
}

function hashOf(text: string): string {
  return createHash('sha256').update(text, 'utf8').digest('hex');
}
