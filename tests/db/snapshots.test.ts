import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Role } from '@/app/_shared/roles';
import type { SnapshotListItem, Viewer } from '@/app/_shared/wire';
import { serializeSheetDocument } from '@/canvas/document/schema';
import { newId } from '@/db/id';
import { models } from '@/db/models/models';
import { createSheet, saveSheet } from '@/db/queries/sheet-changes';
import { findSheet } from '@/db/queries/sheets';
import * as snapshots from '@/db/queries/snapshots';
import { makeTeam } from './support/people';
import { documentAbout } from './support/documents';
import { closeDatabase, freshDatabase } from './support/fresh-database';

let team: Readonly<Record<Role, Viewer>>;
let others: Readonly<Record<Role, Viewer>>;
let sheetId: string;

beforeAll(async () => {
  await freshDatabase();
  team = await makeTeam('Ours');
  others = await makeTeam('Theirs');
  sheetId = await createSheet(team.designer, { name: 'Filter', document: documentAbout('first') });
});
afterAll(closeDatabase);

async function take(id: string, revision: number, name: string): Promise<SnapshotListItem> {
  const outcome = await snapshots.takeSnapshot(team.designer, { id, revision, name });
  if (outcome.kind !== 'taken') throw new Error(outcome.kind);
  return outcome.snapshot;
}

describe('a snapshot', () => {
  it('keeps what was frozen when the sheet goes on', async () => {
    const taken = await take(sheetId, 1, 'Before tuning');
    expect(taken).toMatchObject({ number: 1, revision: 1, takenBy: team.designer.name, sheetId });
    await saveSheet(team.designer, { id: sheetId, revision: 1, document: documentAbout('second') });
    expect(await snapshots.findSnapshot(team.viewer, taken.id)).toEqual({
      ...taken,
      sheetName: 'Filter',
      document: serializeSheetDocument(documentAbout('first')),
    });
    expect(await snapshots.listSnapshots(team.viewer, sheetId)).toEqual([taken]);
  });

  it('is not taken of a revision that the person did not see', async () => {
    expect(await snapshots.takeSnapshot(team.designer, { id: sheetId, revision: 1, name: 'late' })).toEqual({ kind: 'stale' });
    expect(await snapshots.listSnapshots(team.viewer, sheetId)).toHaveLength(1);
  });

  it('is numbered without a gap or a double when several are taken at once', async () => {
    const id = await createSheet(team.designer, { name: 'Busy', document: documentAbout('x') });
    const taken = await Promise.all(Array.from({ length: 12 }, (_, i) => take(id, 1, `S${i}`)));
    expect(taken.map((snapshot) => snapshot.number).toSorted((a, b) => a - b)).toEqual(
      Array.from({ length: 12 }, (_, i) => i + 1),
    );
    const list = await snapshots.listSnapshots(team.viewer, id);
    expect(list?.map((snapshot) => snapshot.number)).toEqual(Array.from({ length: 12 }, (_, i) => 12 - i));
  });

  it('comes back as a new revision, checked like a save', async () => {
    const id = await createSheet(team.designer, { name: 'Back', document: documentAbout('old') });
    const { id: snapshotId } = await take(id, 1, 'old');
    await saveSheet(team.designer, { id, revision: 1, document: documentAbout('new') });
    expect(await snapshots.restoreSnapshot(team.designer, { snapshotId, revision: 1 })).toMatchObject({
      kind: 'conflict',
      revision: 2,
      document: serializeSheetDocument(documentAbout('new')),
    });
    expect(await snapshots.restoreSnapshot(team.designer, { snapshotId, revision: 2 })).toMatchObject({
      kind: 'saved',
      revision: 3,
    });
    expect((await findSheet(team.viewer, id))?.document).toBe(serializeSheetDocument(documentAbout('old')));
  });

  it('is not found by another team', async () => {
    const id = await createSheet(team.designer, { name: 'Ours', document: documentAbout('x') });
    const { id: snapshotId } = await take(id, 1, 'ours');
    expect(await snapshots.findSnapshot(others.owner, snapshotId)).toBeNull();
    expect(await snapshots.listSnapshots(others.owner, id)).toBeNull();
    expect(await snapshots.listSnapshots(team.owner, newId())).toBeNull();
    expect(await snapshots.restoreSnapshot(others.owner, { snapshotId, revision: 1 })).toBeNull();
    expect(await snapshots.takeSnapshot(others.owner, { id, revision: 1, name: 'x' })).toEqual({ kind: 'notFound' });
  });

  it('has no way to be changed, and shows it when it was changed from outside', async () => {
    const doors = Object.keys(snapshots).toSorted();
    expect(doors).toEqual(['findSnapshot', 'listSnapshots', 'restoreSnapshot', 'takeSnapshot']);
    const id = await createSheet(team.designer, { name: 'Tampered', document: documentAbout('true') });
    const { id: snapshotId } = await take(id, 1, 'true');
    await models().Snapshot.update(
      { document: serializeSheetDocument(documentAbout('false')) },
      { where: { id: snapshotId } },
    );
    await expect(snapshots.findSnapshot(team.viewer, snapshotId)).rejects.toThrow('not the one that was frozen');
    await expect(snapshots.restoreSnapshot(team.owner, { snapshotId, revision: 1 })).rejects.toThrow();
  });
});
