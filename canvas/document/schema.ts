import * as z from 'zod/mini';
import { PART_KINDS } from '../parts/registry';
import { MAX_COORDINATE, MAX_CORNERS, MAX_DOCUMENT_CHARACTERS, MAX_PARTS, MAX_PURPOSE, MAX_TEXT, MAX_WIRES } from './limits';
import { repair } from './repair';
import type { SheetDocument } from './types';

const idText = z.string().check(z.regex(/^[0-9A-Za-z_-]{1,40}$/));
const coordinate = z.int().check(z.minimum(-MAX_COORDINATE), z.maximum(MAX_COORDINATE));
const point = z.object({ x: coordinate, y: coordinate });
const pinRef = z.object({ part: idText, pin: z.string().check(z.minLength(1), z.maxLength(20)) });

const part = z.object({
  id: idText,
  kind: z.enum(PART_KINDS),
  at: point,
  turn: z.union([z.literal(0), z.literal(90), z.literal(180), z.literal(270)]),
  mirrored: z.boolean(),
  designator: z.string().check(z.maxLength(20)),
  values: z.record(z.string().check(z.maxLength(40)), z.string().check(z.maxLength(MAX_TEXT))),
});

const wire = z.object({ id: idText, from: pinRef, to: pinRef, corners: z.array(point).check(z.maxLength(MAX_CORNERS)) });

const bandEdge = z.number().check(z.minimum(1e-6), z.maximum(1e15));

/** The one schema of a sheet document, version 1. */
export const sheetDocumentSchema = z.object({
  version: z.literal(1),
  purpose: z.string().check(z.maxLength(MAX_PURPOSE)),
  operatingFrequency: z.string().check(z.minLength(1), z.maxLength(40)),
  band: z
    .object({ fromHz: bandEdge, toHz: bandEdge })
    .check(z.refine((band) => band.toHz > band.fromHz, { message: 'the band must rise' })),
  convention: z.object({ amplitude: z.enum(['rms', 'peak']), form: z.enum(['polar', 'rectangular']) }),
  parts: z.array(part).check(z.maxLength(MAX_PARTS)),
  wires: z.array(wire).check(z.maxLength(MAX_WIRES)),
});

export type DocumentResult =
  | { readonly ok: true; readonly document: SheetDocument }
  | { readonly ok: false; readonly message: string };

/** Validates a document that was read from anywhere, and mends what can be mended (see `repair`). */
export function validateSheetDocument(data: unknown): DocumentResult {
  const version = typeof data === 'object' && data !== null && 'version' in data ? data.version : undefined;
  if (typeof version === 'number' && version > 1) {
    return {
      ok: false,
      message: `This sheet was written by a newer version of Ohmstead (document version ${version}; this one reads 1).`,
    };
  }
  const read = sheetDocumentSchema.safeParse(data);
  if (!read.success) {
    const issue = read.error.issues[0];
    const where = issue && issue.path.length > 0 ? ` at ${issue.path.join('.').slice(0, 80)}` : '';
    return { ok: false, message: `This is not a sheet document: ${issue?.message ?? 'it cannot be read'}${where}.` };
  }
  return { ok: true, document: repair(read.data) };
}

/** Reads a document from text, as stored and sent. Never throws. */
export function parseSheetDocument(text: string): DocumentResult {
  if (text.length > MAX_DOCUMENT_CHARACTERS) {
    return { ok: false, message: 'This sheet is too large: a sheet has at most 2 million characters.' };
  }
  let data: unknown;
  try {
    data = JSON.parse(text);
  } catch {
    return { ok: false, message: 'This is not a sheet document: it is not JSON, or it was cut short.' };
  }
  return validateSheetDocument(data);
}

/** The document as text, the same text for the same document. */
export function serializeSheetDocument(document: SheetDocument): string {
  return JSON.stringify(sheetDocumentSchema.parse(document));
}

export function emptySheetDocument(): SheetDocument {
  return {
    version: 1,
    purpose: '',
    operatingFrequency: '1 kHz',
    band: { fromHz: 10, toHz: 100_000 },
    convention: { amplitude: 'rms', form: 'polar' },
    parts: [],
    wires: [],
  };
}
