'use client';

import Link from 'next/link';
import { useState } from 'react';
import { failureText } from '@/app/_client/say-failure';
import type { SnapshotListItem } from '@/app/_shared/wire';
import { Button } from '@/components/button';
import { buttonStyle } from '@/components/button-style';
import { ConfirmDialog } from '@/components/confirm-dialog';
import { Dialog } from '@/components/dialog';
import { EmptyState } from '@/components/empty-state';
import { RelativeTime } from '@/components/relative-time';
import { Skeleton } from '@/components/skeleton';
import { snapshotsKey, useRead } from '../reads';
import type { Restored } from './restore';

export type SnapshotsDialogProps = {
  readonly sheetId: string;
  /** Absent for those who may not. */
  readonly onTake?: () => void;
  readonly onRestore?: (snapshot: SnapshotListItem) => Promise<Restored>;
  readonly onRestored: (snapshot: SnapshotListItem, revision: number) => void;
  readonly onClone?: (snapshot: SnapshotListItem) => void;
  readonly onClose: () => void;
};

/** The sheet's snapshots, the newest first. */
export function SnapshotsDialog({ sheetId, onTake, onRestore, onRestored, onClone, onClose }: SnapshotsDialogProps) {
  const { data, error } = useRead(snapshotsKey(sheetId));
  const [restoring, setRestoring] = useState<SnapshotListItem | null>(null);

  return (
    <>
      <Dialog
        open
        width="wide"
        onClose={onClose}
        title="Snapshots"
        footer={
          <>
            <Button onClick={onClose}>Close</Button>
            {onTake !== undefined && (
              <Button variant="primary" onClick={onTake}>
                Take a snapshot
              </Button>
            )}
          </>
        }
      >
        {error !== undefined && <p className="mb-2 text-sm text-falls">{failureText(error.detail)}</p>}
        {data === undefined && error === undefined && <Skeleton className="h-24" />}
        {data?.length === 0 && (
          <EmptyState headingLevel={3} title="No snapshots yet" className="py-6!">
            A snapshot freezes the sheet as it is, under a name: for a review, or to come back to.
          </EmptyState>
        )}
        {data !== undefined && data.length > 0 && (
          <ol className="divide-y divide-rule">
            {data.map((snapshot) => (
              <SnapshotRow
                key={snapshot.id}
                snapshot={snapshot}
                onRestore={onRestore === undefined ? undefined : () => setRestoring(snapshot)}
                onClone={onClone === undefined ? undefined : () => onClone(snapshot)}
              />
            ))}
          </ol>
        )}
      </Dialog>
      {restoring !== null && onRestore !== undefined && (
        <RestoreQuestion
          snapshot={restoring}
          onRestore={onRestore}
          onRestored={(revision) => onRestored(restoring, revision)}
          onClose={() => setRestoring(null)}
        />
      )}
    </>
  );
}

function SnapshotRow({
  snapshot,
  onRestore,
  onClone,
}: {
  readonly snapshot: SnapshotListItem;
  readonly onRestore?: () => void;
  readonly onClone?: () => void;
}) {
  return (
    <li className="flex flex-wrap items-center gap-x-3 gap-y-1.5 py-2.5">
      <span className="w-6 shrink-0 text-right font-mono text-[13px] text-muted tabular-nums">{snapshot.number}</span>
      <div className="min-w-48 flex-1">
        <p className="text-sm font-semibold wrap-anywhere">{snapshot.name}</p>
        <p className="text-[13px] text-muted">
          Revision {snapshot.revision} · {snapshot.takenBy} · <RelativeTime at={snapshot.takenAt} />
        </p>
      </div>
      <span className="flex gap-1.5">
        <Link href={`/sheets/${snapshot.sheetId}/snapshots/${snapshot.id}`} className={buttonStyle('plain', 'small')}>
          View
          <span className="sr-only"> {snapshot.name}</span>
        </Link>
        {onClone !== undefined && (
          <Button size="small" onClick={onClone}>
            Clone
            <span className="sr-only"> {snapshot.name}</span>
          </Button>
        )}
        {onRestore !== undefined && (
          <Button size="small" onClick={onRestore}>
            Restore
            <span className="sr-only"> {snapshot.name}</span>
          </Button>
        )}
      </span>
    </li>
  );
}

/** Asks first, and says in its own place what could not be done. */
export function RestoreQuestion({
  snapshot,
  onRestore,
  onRestored,
  onClose,
}: {
  readonly snapshot: SnapshotListItem;
  readonly onRestore: (snapshot: SnapshotListItem) => Promise<Restored>;
  readonly onRestored: (revision: number) => void;
  readonly onClose: () => void;
}) {
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const restore = async () => {
    setBusy(true);
    const restored = await onRestore(snapshot);
    setBusy(false);
    if (restored.ok) onRestored(restored.revision);
    else setFailure(restored.message);
  };
  return (
    <ConfirmDialog
      open
      busy={busy}
      onClose={onClose}
      onConfirm={() => void restore()}
      title={`Restore snapshot ${snapshot.number}, “${snapshot.name}”?`}
      description={
        <>
          It becomes the sheet’s next revision, in place of what is drawn now. The snapshot itself stays as it is.
          {failure !== null && (
            <span role="alert" className="mt-3 block text-falls">
              {failure}
            </span>
          )}
        </>
      }
      confirmLabel="Restore"
    />
  );
}
