import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { parseSheetFile } from '@/canvas/document/export-file';
import type { SheetDocument } from '@/canvas/document/types';

const SEEDS = path.resolve(import.meta.dirname, '../../db/seeds');
const FOLDER = path.join(SEEDS, 'sheets');

/** The names of the demonstration sheets' files, without their ending. */
export const DEMONSTRATION_SHEETS: readonly string[] = readdirSync(FOLDER)
  .filter((file) => file.endsWith('.json'))
  .map((file) => file.slice(0, -'.json'.length))
  .sort();

export function demonstrationText(key: string): string {
  return readFileSync(path.join(FOLDER, `${key}.json`), 'utf8');
}

export function demonstrationSheet(key: string): { readonly name: string; readonly document: SheetDocument } {
  const read = parseSheetFile(demonstrationText(key));
  if (!read.ok) throw new Error(`${key}: ${read.message}`);
  return read;
}

/** What is on the sheets beside their drawings. */
export function demonstrationDescription(): unknown {
  return JSON.parse(readFileSync(path.join(SEEDS, 'demonstration.json'), 'utf8'));
}
