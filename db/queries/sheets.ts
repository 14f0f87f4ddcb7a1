import 'server-only';
import type { ListSheetsInput, SheetList, SheetListItem, SheetOrigin, SheetRecord, Viewer } from '@/app/_shared/wire';
import type { SheetDocument } from '@/canvas/document/types';
import { serializeSheetDocument } from '@/canvas/document/schema';
import { select } from '../client';
import { fromStored } from '../stored-document';

/** A list shows this many at most, and says when there are more: then a search narrows it. */
export const MOST_SHEETS = 500;

/** What may stand in ORDER BY; the id makes the order of equals a fixed one. */
const ORDER: Readonly<Record<ListSheetsInput['sort'], string>> = {
  changed: 'sheets.changedAt DESC, sheets.id',
  name: 'sheets.name, sheets.id',
  created: 'sheets.createdAt DESC, sheets.id',
};

type OriginColumns = {
  readonly originSheetId: string | null;
  readonly originSheetName: string | null;
  readonly originSnapshotName: string | null;
  readonly originRevision: number | null;
};

type ListRow = Omit<SheetListItem, 'changedAt' | 'createdAt' | 'archived' | 'origin'> &
  OriginColumns & { readonly changedAt: Date; readonly createdAt: Date; readonly archivedAt: Date | null };

/** The team's sheets, or those in its archive, whose name or purpose holds the search text. */
export async function listSheets(viewer: Viewer, wanted: ListSheetsInput): Promise<SheetList> {
  const search = wanted.search.trim();
  const rows = await select<ListRow>(
    `SELECT sheets.id, sheets.name, sheets.purpose, sheets.revision, sheets.changedAt, users.name AS changedBy,
        sheets.createdAt, sheets.archivedAt, sheets.partCount,
        (SELECT COUNT(*) FROM snapshots WHERE snapshots.sheetId = sheets.id) AS snapshotCount,
        (SELECT COUNT(*) FROM notes WHERE notes.sheetId = sheets.id AND notes.resolvedAt IS NULL) AS openNoteCount,
        sheets.originSheetId, sheets.originSheetName, sheets.originSnapshotName, sheets.originRevision
      FROM sheets JOIN users ON users.id = sheets.changedBy
      WHERE sheets.teamId = :teamId AND sheets.archivedAt IS ${wanted.archived ? 'NOT NULL' : 'NULL'}
        ${search === '' ? '' : 'AND (sheets.name LIKE :pattern OR sheets.purpose LIKE :pattern)'}
      ORDER BY ${ORDER[wanted.sort]} LIMIT ${MOST_SHEETS + 1}`,
    { teamId: viewer.teamId, pattern: `%${literally(search)}%` },
  );
  return { sheets: rows.slice(0, MOST_SHEETS).map(toListItem), more: rows.length > MOST_SHEETS };
}

/** A sheet as it stands. */
export async function findSheet(viewer: Viewer, sheetId: string): Promise<SheetRecord | null> {
  type Row = OriginColumns & {
    readonly id: string;
    readonly name: string;
    readonly revision: number;
    readonly document: string;
    readonly changedAt: Date;
    readonly changedBy: string;
    readonly archivedAt: Date | null;
  };
  const rows = await select<Row>(
    `SELECT sheets.id, sheets.name, sheets.revision, sheets.document, sheets.changedAt, users.name AS changedBy,
        sheets.archivedAt, sheets.originSheetId, sheets.originSheetName, sheets.originSnapshotName, sheets.originRevision
      FROM sheets JOIN users ON users.id = sheets.changedBy
      WHERE sheets.id = :sheetId AND sheets.teamId = :teamId`,
    { sheetId, teamId: viewer.teamId },
  );
  const row = rows[0];
  if (!row) return null;
  return {
    id: row.id,
    name: row.name,
    revision: row.revision,
    document: serializeSheetDocument(fromStored(row.document, `sheet ${row.id}`)),
    changedAt: row.changedAt.toISOString(),
    changedBy: row.changedBy,
    archived: row.archivedAt !== null,
    origin: toOrigin(row),
    teamName: viewer.teamName,
  };
}

/** A sheet's name and document, for a file. */
export async function findSheetDocument(
  viewer: Viewer,
  sheetId: string,
): Promise<{ readonly name: string; readonly document: SheetDocument } | null> {
  const rows = await select<{ readonly name: string; readonly document: string }>(
    'SELECT name, document FROM sheets WHERE id = :sheetId AND teamId = :teamId',
    { sheetId, teamId: viewer.teamId },
  );
  const row = rows[0];
  return row ? { name: row.name, document: fromStored(row.document, `sheet ${sheetId}`) } : null;
}

/** Takes the meaning out of LIKE's own characters. */
function literally(text: string): string {
  return text.replace(/[\\%_]/g, '\\$&');
}

function toListItem(row: ListRow): SheetListItem {
  return {
    id: row.id,
    name: row.name,
    purpose: row.purpose,
    revision: row.revision,
    changedAt: row.changedAt.toISOString(),
    changedBy: row.changedBy,
    createdAt: row.createdAt.toISOString(),
    archived: row.archivedAt !== null,
    partCount: row.partCount,
    snapshotCount: row.snapshotCount,
    openNoteCount: row.openNoteCount,
    origin: toOrigin(row),
  };
}

function toOrigin(row: OriginColumns): SheetOrigin | null {
  if (row.originSheetId === null || row.originSheetName === null || row.originRevision === null) return null;
  return {
    sheetId: row.originSheetId,
    sheetName: row.originSheetName,
    snapshotName: row.originSnapshotName,
    revision: row.originRevision,
  };
}
