import * as z from 'zod/mini';
import { MAX_DOCUMENT_CHARACTERS } from './limits';
import { validateSheetDocument } from './schema';
import type { SheetDocument } from './types';

/** What marks a file as one of ours. */
const FORMAT = 'ohmstead-sheet';
const FILE_VERSION = 1;

const envelope = z.object({
  format: z.literal(FORMAT),
  fileVersion: z.int().check(z.minimum(1)),
  name: z.string().check(z.trim(), z.minLength(1), z.maxLength(120)),
  document: z.unknown(),
});

export type SheetFileResult =
  | { readonly ok: true; readonly name: string; readonly document: SheetDocument }
  | { readonly ok: false; readonly message: string };

/** The sheet as a file: JSON, indented, so that two versions can be compared line by line. */
export function writeSheetFile(sheet: { readonly name: string; readonly document: SheetDocument }): string {
  return `${JSON.stringify({ format: FORMAT, fileVersion: FILE_VERSION, name: sheet.name, document: sheet.document }, null, 2)}\n`;
}

/** Reads a sheet file. A broken, foreign, too large or hostile one is refused in words. Never throws. */
export function parseSheetFile(text: string): SheetFileResult {
  if (text.length > MAX_DOCUMENT_CHARACTERS) {
    return { ok: false, message: 'This file is too large: a sheet file has at most 2 million characters.' };
  }
  let data: unknown;
  try {
    // A byte-order mark is not JSON, but some editors leave one.
    data = JSON.parse(text.replace(/^\uFEFF/, ''));
  } catch {
    return { ok: false, message: 'This file cannot be read: it is not JSON, or it was cut short.' };
  }
  const read = envelope.safeParse(data);
  if (!read.success) {
    return { ok: false, message: 'This is not a sheet file. Choose a file that was exported from Ohmstead.' };
  }
  if (read.data.fileVersion > FILE_VERSION) {
    return {
      ok: false,
      message: `This file was written by a newer version of Ohmstead (file version ${read.data.fileVersion}; this one reads ${FILE_VERSION}).`,
    };
  }
  const document = validateSheetDocument(read.data.document);
  return document.ok ? { ok: true, name: read.data.name, document: document.document } : document;
}
