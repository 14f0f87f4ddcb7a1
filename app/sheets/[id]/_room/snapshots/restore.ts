import { attempt } from '@/app/_client/attempt';
import { fetchResult, ReadFailure } from '@/app/_client/fetch-result';
import { failureText } from '@/app/_client/say-failure';
import type { SnapshotListItem, SnapshotRecord } from '@/app/_shared/wire';
import { restoreSnapshot } from '@/app/sheets/[id]/actions';
import { parseSheetDocument } from '@/canvas/document/schema';
import type { SheetStore } from '@/canvas/store/sheet-store';
import type { Keeper } from '../keeping/keeper';

export type Restored = { readonly ok: true; readonly revision: number } | { readonly ok: false; readonly message: string };

/**
 * Makes a snapshot the sheet's next revision, on the server and here. On the sheet it is an edit like any other, so
 * that undo brings back what stood there.
 */
export async function restoreHere(store: SheetStore, keeper: Keeper, snapshot: SnapshotListItem): Promise<Restored> {
  const settled = await keeper.settle();
  if (!settled.ok) {
    return { ok: false, message: 'What is on the sheet is not saved yet. Restore the snapshot when it is.' };
  }
  let record: SnapshotRecord;
  try {
    record = await fetchResult<SnapshotRecord>(`/api/snapshots/${snapshot.id}`);
  } catch (error) {
    if (error instanceof ReadFailure) return { ok: false, message: failureText(error.detail) };
    throw error;
  }
  const read = parseSheetDocument(record.document);
  if (!read.ok) return { ok: false, message: read.message };

  const result = await attempt(() => restoreSnapshot({ snapshotId: snapshot.id, revision: settled.revision }));
  if (!result.ok) return { ok: false, message: failureText(result.error) };
  const outcome = result.value;
  if (outcome.kind === 'conflict') {
    keeper.seen(outcome);
    return {
      ok: false,
      message: `${outcome.changedBy} changed the sheet in between; revision ${outcome.revision} is shown now. Look at it, then restore again if you still want to.`,
    };
  }
  keeper.changedByServer(outcome.revision, read.document, () => {
    store.getState().apply({ label: `Restore snapshot ${snapshot.number}`, document: read.document });
  });
  return { ok: true, revision: outcome.revision };
}
