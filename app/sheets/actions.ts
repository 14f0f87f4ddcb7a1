'use server';

import { action } from '@/app/_server/action';
import { failure, success } from '@/app/_server/errors';
import { sheetSubject } from '@/app/_server/subjects';
import {
  cloneSheetInput,
  createSheetInput,
  importSheetInput,
  renameSheetInput,
  sheetInput,
} from '@/app/_shared/wire';
import { parseSheetFile } from '@/canvas/document/export-file';
import { emptySheetDocument, parseSheetDocument } from '@/canvas/document/schema';
import * as sheets from '@/db/queries/sheet-changes';

export const createSheet = action(
  { name: 'sheet.create', permission: 'sheet.create', input: createSheetInput },
  async ({ viewer, input }) =>
    success({ id: await sheets.createSheet(viewer, { name: input.name, document: emptySheetDocument() }) }),
);

/** Makes a sheet from an exported file's text. A file that cannot be read is refused in words and changes nothing. */
export const importSheet = action(
  { name: 'sheet.import', permission: 'sheet.import', input: importSheetInput },
  async ({ viewer, input }) => {
    const file = parseSheetFile(input.text);
    if (!file.ok) return failure('invalid', file.message);
    return success({ id: await sheets.createSheet(viewer, file), name: file.name });
  },
);

export const renameSheet = action(
  { name: 'sheet.rename', permission: 'sheet.rename', input: renameSheetInput, subject: sheetSubject },
  async ({ viewer, input }) =>
    (await sheets.renameSheet(viewer, input.id, input.name)) ? success({ name: input.name }) : failure('notFound'),
);

export const archiveSheet = action(
  { name: 'sheet.archive', permission: 'sheet.archive', input: sheetInput, subject: sheetSubject },
  async ({ viewer, input }) =>
    (await sheets.archiveSheet(viewer, input.id)) ? success({ archived: true as const }) : failure('notFound'),
);

export const restoreSheet = action(
  { name: 'sheet.restore', permission: 'sheet.restore', input: sheetInput, subject: sheetSubject },
  async ({ viewer, input }) =>
    (await sheets.restoreSheet(viewer, input.id)) ? success({ archived: false as const }) : failure('notFound'),
);

/** Makes a new sheet from a sheet as it stands, from a snapshot of it, or from the text that this machine holds. */
export const cloneSheet = action(
  { name: 'sheet.clone', permission: 'sheet.clone', input: cloneSheetInput, subject: sheetSubject },
  async ({ viewer, input }) => {
    const held = input.document === undefined ? undefined : parseSheetDocument(input.document);
    if (held && !held.ok) return failure('invalid', held.message);
    const clone = await sheets.cloneSheet(viewer, {
      sheetId: input.id,
      snapshotId: input.snapshotId,
      document: held?.document,
      name: input.name,
    });
    return clone ? success(clone) : failure('notFound');
  },
);
