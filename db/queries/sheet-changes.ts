import 'server-only';
import { Op, type Transaction } from 'sequelize';
import type { SaveOutcome, Viewer } from '@/app/_shared/wire';
import { serializeSheetDocument } from '@/canvas/document/schema';
import type { SheetDocument } from '@/canvas/document/types';
import { inTransaction, retrying, select } from '../client';
import { newId } from '../id';
import { models } from '../models/models';
import { fromFrozen, fromStored, toStored, type StoredDocument } from '../stored-document';

type Origin = {
  readonly originSheetId: string;
  readonly originSheetName: string;
  readonly originSnapshotId: string | null;
  readonly originSnapshotName: string | null;
  readonly originRevision: number;
};

/** Begins a sheet with this document, at revision 1. */
export async function createSheet(
  viewer: Viewer,
  sheet: { readonly name: string; readonly document: SheetDocument },
): Promise<string> {
  return inTransaction((transaction) => insertSheet(viewer, sheet.name, toStored(sheet.document), null, transaction));
}

async function insertSheet(
  viewer: Viewer,
  name: string,
  stored: StoredDocument,
  origin: Origin | null,
  transaction: Transaction,
): Promise<string> {
  const now = new Date();
  const id = newId();
  await models().Sheet.create(
    {
      id,
      teamId: viewer.teamId,
      name,
      ...stored,
      createdAt: now,
      createdBy: viewer.userId,
      changedAt: now,
      changedBy: viewer.userId,
      ...origin,
    },
    { transaction },
  );
  return id;
}

/**
 * Saves a document that was made from `revision`. One statement checks the revision and writes, so of two saves at
 * once one wins and the other is told what stands there now.
 *
 * A document that is what stands there already is saved, whoever wrote it: the same answer for a save that is sent
 * again because its first answer was lost; no new revision for one that changes nothing; and no conflict to choose in,
 * where both sides are equal. An archived sheet is saved like any other: being filed away must not cost anyone's work.
 * @returns null when the sheet is not there or not the viewer's team's
 */
export async function saveSheet(
  viewer: Viewer,
  save: { readonly id: string; readonly revision: number; readonly document: SheetDocument },
): Promise<SaveOutcome | null> {
  const stored = toStored(save.document);
  const changedAt = new Date();
  const won = await retrying(async () => {
    // Not the model's optimistic lock: that one reads first, and does not hold for an update without an instance.
    const [count] = await models().Sheet.update(
      { ...stored, revision: save.revision + 1, changedAt, changedBy: viewer.userId },
      {
        where: {
          id: save.id,
          teamId: viewer.teamId,
          revision: save.revision,
          documentHash: { [Op.ne]: stored.documentHash },
        },
      },
    );
    return count === 1;
  });
  if (won) return { kind: 'saved', revision: save.revision + 1, savedAt: changedAt.toISOString() };

  type Row = {
    readonly revision: number;
    readonly document: string;
    readonly documentHash: string;
    readonly changedAt: Date;
    readonly changedBy: string;
  };
  const rows = await select<Row>(
    `SELECT sheets.revision, sheets.document, sheets.documentHash, sheets.changedAt, users.name AS changedBy
      FROM sheets JOIN users ON users.id = sheets.changedBy
      WHERE sheets.id = :id AND sheets.teamId = :teamId`,
    { id: save.id, teamId: viewer.teamId },
  );
  const now = rows[0];
  if (!now) return null;
  if (now.documentHash === stored.documentHash) {
    return { kind: 'saved', revision: now.revision, savedAt: now.changedAt.toISOString() };
  }
  return {
    kind: 'conflict',
    revision: now.revision,
    document: serializeSheetDocument(fromStored(now.document, `sheet ${save.id}`)),
    changedAt: now.changedAt.toISOString(),
    changedBy: now.changedBy,
  };
}

/** A name is no revision: it changes beside the drawing, and the newest one stands. False when the sheet is not there. */
export function renameSheet(viewer: Viewer, sheetId: string, name: string): Promise<boolean> {
  return changeOne(viewer, sheetId, { name });
}

/** Files a sheet away; it can be taken out again. */
export function archiveSheet(viewer: Viewer, sheetId: string): Promise<boolean> {
  return changeOne(viewer, sheetId, { archivedAt: new Date(), archivedBy: viewer.userId });
}

export function restoreSheet(viewer: Viewer, sheetId: string): Promise<boolean> {
  return changeOne(viewer, sheetId, { archivedAt: null, archivedBy: null });
}

async function changeOne(
  viewer: Viewer,
  sheetId: string,
  values: { readonly name?: string; readonly archivedAt?: Date | null; readonly archivedBy?: string | null },
): Promise<boolean> {
  const [count] = await retrying(() =>
    models().Sheet.update({ ...values }, { where: { id: sheetId, teamId: viewer.teamId } }),
  );
  return count === 1;
}

/**
 * Makes a new sheet that remembers where it came from: from the sheet as it stands, from one of its snapshots, or with
 * a document that was made from it elsewhere.
 * @returns null when the sheet or the snapshot is not there or not the viewer's team's
 */
export async function cloneSheet(
  viewer: Viewer,
  clone: {
    readonly sheetId: string;
    readonly snapshotId?: string | undefined;
    readonly document?: SheetDocument | undefined;
    readonly name?: string | undefined;
  },
): Promise<{ readonly id: string; readonly name: string } | null> {
  return inTransaction(async (transaction) => {
    const sheets = await select<{ readonly name: string; readonly revision: number; readonly document: string }>(
      'SELECT name, revision, document FROM sheets WHERE id = :sheetId AND teamId = :teamId',
      { sheetId: clone.sheetId, teamId: viewer.teamId },
      transaction,
    );
    const sheet = sheets[0];
    if (!sheet) return null;
    const snapshot = clone.snapshotId === undefined ? null : await frozen(clone.snapshotId, clone.sheetId, transaction);
    if (snapshot === undefined) return null;
    const document =
      clone.document ?? snapshot?.document ?? fromStored(sheet.document, `sheet ${clone.sheetId}`);
    const name = clone.name ?? nameOfClone(sheet.name);
    const origin: Origin = {
      originSheetId: clone.sheetId,
      originSheetName: sheet.name,
      originSnapshotId: clone.snapshotId ?? null,
      originSnapshotName: snapshot?.name ?? null,
      originRevision: snapshot?.revision ?? sheet.revision,
    };
    return { id: await insertSheet(viewer, name, toStored(document), origin, transaction), name };
  });
}

async function frozen(
  snapshotId: string,
  sheetId: string,
  transaction: Transaction,
): Promise<{ readonly name: string; readonly revision: number; readonly document: SheetDocument } | undefined> {
  const rows = await select<{
    readonly name: string;
    readonly revision: number;
    readonly document: string;
    readonly documentHash: string;
  }>(
    'SELECT name, revision, document, documentHash FROM snapshots WHERE id = :snapshotId AND sheetId = :sheetId',
    { snapshotId, sheetId },
    transaction,
  );
  const row = rows[0];
  return row && { ...row, document: fromFrozen(row.document, row.documentHash, `snapshot ${snapshotId}`) };
}

const MOST_NAME = 120;
const SUFFIX = ' (clone)';

function nameOfClone(name: string): string {
  // By characters, so that the cut does not halve one.
  const kept = Array.from(name);
  while (kept.join('').length > MOST_NAME - SUFFIX.length) kept.pop();
  return kept.join('') + SUFFIX;
}
