import 'server-only';
import type { Viewer } from '@/app/_shared/wire';
import { select } from '../client';

type Found = { readonly found: number };

export async function ownsSheet(viewer: Viewer, sheetId: string): Promise<boolean> {
  const rows = await select<Found>('SELECT 1 AS found FROM sheets WHERE id = :sheetId AND teamId = :teamId', {
    sheetId,
    teamId: viewer.teamId,
  });
  return rows.length > 0;
}

export async function ownsSnapshot(viewer: Viewer, snapshotId: string): Promise<boolean> {
  const rows = await select<Found>(
    `SELECT 1 AS found FROM snapshots JOIN sheets ON sheets.id = snapshots.sheetId
      WHERE snapshots.id = :snapshotId AND sheets.teamId = :teamId`,
    { snapshotId, teamId: viewer.teamId },
  );
  return rows.length > 0;
}

export async function ownsNote(viewer: Viewer, noteId: string): Promise<boolean> {
  const rows = await select<Found>(
    `SELECT 1 AS found FROM notes JOIN sheets ON sheets.id = notes.sheetId
      WHERE notes.id = :noteId AND sheets.teamId = :teamId`,
    { noteId, teamId: viewer.teamId },
  );
  return rows.length > 0;
}

export async function ownsMember(viewer: Viewer, memberId: string): Promise<boolean> {
  const rows = await select<Found>(
    'SELECT 1 AS found FROM members WHERE id = :memberId AND teamId = :teamId AND removedAt IS NULL',
    { memberId, teamId: viewer.teamId },
  );
  return rows.length > 0;
}
