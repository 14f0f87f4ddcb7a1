import 'server-only';
import { literal } from 'sequelize';
import type { SaveOutcome, SnapshotListItem, SnapshotRecord, Viewer } from '@/app/_shared/wire';
import { serializeSheetDocument } from '@/canvas/document/schema';
import { inTransaction, select } from '../client';
import { newId } from '../id';
import { models } from '../models/models';
import { fromFrozen } from '../stored-document';
import { ownsSheet } from './ownership';
import { saveSheet } from './sheet-changes';

/*
 * A snapshot is written once and never changed or removed: there is no query here that would. That the document is the
 * one that was frozen is proved by its hash at every reading (`fromFrozen`).
 */

/** A list shows this many, the newest. */
const MOST_SNAPSHOTS = 500;

type ListRow = Omit<SnapshotListItem, 'takenAt'> & { readonly takenAt: Date };
type Row = ListRow & { readonly document: string; readonly documentHash: string; readonly sheetName: string };

const LIST_COLUMNS = `snapshots.id, snapshots.sheetId, snapshots.number, snapshots.name, snapshots.revision,
  snapshots.takenAt, users.name AS takenBy`;

/** A sheet's snapshots, the newest first; null when the sheet is not there. */
export async function listSnapshots(viewer: Viewer, sheetId: string): Promise<readonly SnapshotListItem[] | null> {
  const rows = await select<ListRow>(
    `SELECT ${LIST_COLUMNS}
      FROM snapshots JOIN sheets ON sheets.id = snapshots.sheetId JOIN users ON users.id = snapshots.takenBy
      WHERE snapshots.sheetId = :sheetId AND sheets.teamId = :teamId
      ORDER BY snapshots.number DESC LIMIT ${MOST_SNAPSHOTS}`,
    { sheetId, teamId: viewer.teamId },
  );
  if (rows.length === 0 && !(await ownsSheet(viewer, sheetId))) return null;
  return rows.map((row) => ({ ...row, takenAt: row.takenAt.toISOString() }));
}

async function read(viewer: Viewer, snapshotId: string): Promise<Row | null> {
  const rows = await select<Row>(
    `SELECT ${LIST_COLUMNS}, snapshots.document, snapshots.documentHash, sheets.name AS sheetName
      FROM snapshots JOIN sheets ON sheets.id = snapshots.sheetId JOIN users ON users.id = snapshots.takenBy
      WHERE snapshots.id = :snapshotId AND sheets.teamId = :teamId`,
    { snapshotId, teamId: viewer.teamId },
  );
  return rows[0] ?? null;
}

export async function findSnapshot(viewer: Viewer, snapshotId: string): Promise<SnapshotRecord | null> {
  const row = await read(viewer, snapshotId);
  if (!row) return null;
  const { documentHash, takenAt, ...rest } = row;
  const document = fromFrozen(row.document, documentHash, `snapshot ${snapshotId}`);
  return { ...rest, document: serializeSheetDocument(document), takenAt: takenAt.toISOString() };
}

export type TakeOutcome =
  | { readonly kind: 'taken'; readonly snapshot: SnapshotListItem }
  | { readonly kind: 'stale' }
  | { readonly kind: 'notFound' };

/** Freezes a sheet, if the revision that the viewer saw is the one that stands. Numbers count from 1 on each sheet. */
export async function takeSnapshot(
  viewer: Viewer,
  wanted: { readonly id: string; readonly revision: number; readonly name: string },
): Promise<TakeOutcome> {
  const { Sheet, Snapshot } = models();
  const outcome = await inTransaction<TakeOutcome | null>(async (transaction) => {
    // Counting up locks the row: the revision, the number and the document below belong together.
    const [counted] = await Sheet.update(
      { lastSnapshotNumber: literal('lastSnapshotNumber + 1') },
      { where: { id: wanted.id, teamId: viewer.teamId, revision: wanted.revision }, transaction },
    );
    const sheet = counted === 1 ? await Sheet.findByPk(wanted.id, { transaction }) : null;
    if (!sheet) return null;
    const snapshot = await Snapshot.create(
      {
        id: newId(),
        sheetId: sheet.id,
        number: sheet.lastSnapshotNumber,
        name: wanted.name,
        document: sheet.document,
        documentHash: sheet.documentHash,
        revision: sheet.revision,
        takenAt: new Date(),
        takenBy: viewer.userId,
      },
      { transaction },
    );
    const { id, sheetId, number, name, revision, takenAt } = snapshot;
    return {
      kind: 'taken',
      snapshot: { id, sheetId, number, name, revision, takenAt: takenAt.toISOString(), takenBy: viewer.name },
    };
  });
  if (outcome) return outcome;
  return { kind: (await ownsSheet(viewer, wanted.id)) ? 'stale' : 'notFound' };
}

/** Makes a snapshot's document the next revision of its sheet, as a save from the revision that the viewer saw. */
export async function restoreSnapshot(
  viewer: Viewer,
  wanted: { readonly snapshotId: string; readonly revision: number },
): Promise<SaveOutcome | null> {
  const row = await read(viewer, wanted.snapshotId);
  if (!row) return null;
  const document = fromFrozen(row.document, row.documentHash, `snapshot ${wanted.snapshotId}`);
  return saveSheet(viewer, { id: row.sheetId, revision: wanted.revision, document });
}
