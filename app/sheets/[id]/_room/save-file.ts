import { writeSheetFile } from '@/canvas/document/export-file';
import { parseSheetDocument } from '@/canvas/document/schema';

/**
 * Hands a sheet to the browser as a file, without the server: for what only this machine has. A document that cannot
 * be read as a sheet is handed out as it is, so that at least nothing of it is lost.
 */
export function saveSheetFile(name: string, document: string): void {
  const read = parseSheetDocument(document);
  const content = read.ok ? writeSheetFile({ name, document: read.document }) : document;
  const url = URL.createObjectURL(new Blob([content], { type: 'application/json' }));
  const link = window.document.createElement('a');
  link.href = url;
  link.download = fileName(name);
  link.click();
  // The browser reads the address after this turn of the loop.
  setTimeout(() => URL.revokeObjectURL(url), 10_000);
}

/** As the server names its exports: without what a path or a shell would read as its own. */
export function fileName(name: string): string {
  const clean = name
    .normalize('NFC')
    .replace(/[\p{C}\p{Zl}\p{Zp}/\\:*?"<>|]+/gu, ' ')
    .replace(/\s+/g, ' ')
    .replace(/^[. ]+|[. ]+$/g, '');
  return `${Array.from(clean).slice(0, 80).join('') || 'sheet'}.sheet.json`;
}
