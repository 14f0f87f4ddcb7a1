'use client';

import { useRouter } from 'next/navigation';
import { useEffect } from 'react';
import { useSWRConfig } from 'swr';
import { useStore } from 'zustand';
import { attempt } from '@/app/_client/attempt';
import { failureText } from '@/app/_client/say-failure';
import type { SheetRecord, SnapshotListItem } from '@/app/_shared/wire';
import { cloneSheet } from '@/app/sheets/actions';
import type { SheetStore } from '@/canvas/store/sheet-store';
import { toast } from '@/components/toast';
import { CloneDialog, cloneName } from './clone/clone-dialog';
import { ConflictDialog } from './conflict/conflict-dialog';
import type { Keeper } from './keeping/keeper';
import type { Theirs } from './keeping/machine';
import { useKept } from './keeping/use-keeper';
import { snapshotsKey } from './reads';
import type { RoomRights } from './rights';
import { saveSheetFile } from './save-file';
import { restoreHere } from './snapshots/restore';
import { SnapshotDialog } from './snapshots/snapshot-dialog';
import { SnapshotsDialog } from './snapshots/snapshots-dialog';

/** What is open of the room's own, beside the panels that a command can open. */
export type RoomDialog =
  | { readonly kind: 'snapshots' }
  | { readonly kind: 'cloneOf'; readonly snapshot: SnapshotListItem }
  /** A conflict that was put off, and up to which revision of theirs. */
  | { readonly kind: 'conflictPutOff'; readonly revision: number };

export type RoomDialogsProps = {
  readonly store: SheetStore;
  readonly keeper: Keeper;
  readonly record: SheetRecord;
  readonly rights: RoomRights;
  readonly dialog: RoomDialog | null;
  readonly onDialog: (dialog: RoomDialog | null) => void;
};

/** One dialog at a time: the conflict before all others. */
export function RoomDialogs(props: RoomDialogsProps) {
  const { store, keeper, record, rights, dialog, onDialog } = props;
  const router = useRouter();
  const { mutate } = useSWRConfig();
  const panel = useStore(store, (state) => state.panel);
  const mayEdit = useStore(store, (state) => state.mayEdit);
  const conflict = useKept(keeper, ({ keeping }) => keeping.conflict);
  const madeFrom = useKept(keeper, ({ keeping }) => keeping.revision);

  const refused = panel === 'clone' && !rights.clone;
  useEffect(() => {
    if (!refused) return;
    toast.plain('Your role does not allow making new sheets. An owner of the team can change your role.');
    store.getState().setPanel(null);
  }, [refused, store]);

  const close = () => {
    onDialog(null);
    store.getState().setPanel(null);
  };
  const openSheet = (id: string) => {
    close();
    router.push(`/sheets/${id}`);
  };

  if (conflict !== null && !(dialog?.kind === 'conflictPutOff' && dialog.revision >= conflict.revision)) {
    return <Conflict {...props} conflict={conflict} madeFrom={madeFrom} />;
  }
  if (panel === 'snapshot' && rights.takeSnapshot) {
    return (
      <SnapshotDialog
        sheetId={record.id}
        keeper={keeper}
        onClose={close}
        onTaken={(snapshot) => {
          close();
          void mutate(snapshotsKey(record.id));
          toast.done(`Snapshot ${snapshot.number}, “${snapshot.name}”, is taken of revision ${snapshot.revision}.`, {
            action: { label: 'View', onPress: () => router.push(`/sheets/${record.id}/snapshots/${snapshot.id}`) },
          });
        }}
      />
    );
  }
  if ((panel === 'clone' && rights.clone) || dialog?.kind === 'cloneOf') {
    return (
      <CloneDialog
        sheetId={record.id}
        sheetName={record.name}
        snapshot={dialog?.kind === 'cloneOf' ? dialog.snapshot : undefined}
        unsaved={async () => ((await keeper.settle()).ok ? null : keeper.text())}
        onCloned={openSheet}
        onClose={close}
      />
    );
  }
  if (dialog?.kind === 'snapshots') {
    return (
      <SnapshotsDialog
        sheetId={record.id}
        onTake={
          rights.takeSnapshot && mayEdit
            ? () => {
                onDialog(null);
                store.getState().setPanel('snapshot');
              }
            : undefined
        }
        onRestore={rights.restoreSnapshot && mayEdit ? (snapshot) => restoreHere(store, keeper, snapshot) : undefined}
        onRestored={(snapshot, revision) => {
          close();
          toast.done(`Snapshot ${snapshot.number} is restored as revision ${revision}.`, {
            action: { label: 'Undo', onPress: () => store.getState().undo() },
          });
        }}
        onClone={rights.clone ? (snapshot) => onDialog({ kind: 'cloneOf', snapshot }) : undefined}
        onClose={close}
      />
    );
  }
  return null;
}

function Conflict({
  store,
  keeper,
  record,
  rights,
  onDialog,
  conflict,
  madeFrom,
}: RoomDialogsProps & { readonly conflict: Theirs; readonly madeFrom: number }) {
  const router = useRouter();
  const mine = useStore(store, (state) => state.document);

  const keepTheirs = () => {
    if (keeper.keepTheirs()) toast.done(`The sheet shows revision ${conflict.revision} by ${conflict.changedBy}.`);
    else toast.failed('Their version cannot be read by this page. Load the page again; yours is kept on this machine.');
  };

  const keepBoth = async (): Promise<string | null> => {
    const result = await attempt(() =>
      cloneSheet({ id: record.id, document: keeper.text(), name: cloneName(record.name) }),
    );
    if (!result.ok) return failureText(result.error);
    const { id, name } = result.value;
    keeper.keepTheirs();
    toast.done(`Yours is kept as “${name}”; this sheet shows revision ${conflict.revision}.`, {
      action: { label: 'Open the clone', onPress: () => router.push(`/sheets/${id}`) },
      staysMs: 30_000,
    });
    return null;
  };

  return (
    <ConflictDialog
      mine={mine}
      theirs={conflict}
      madeFrom={madeFrom}
      mayClone={rights.clone}
      onKeepMine={() => keeper.keepMine()}
      onKeepTheirs={keepTheirs}
      onKeepBoth={keepBoth}
      onDownload={() => saveSheetFile(`${record.name} (mine)`, keeper.text())}
      onClose={() => onDialog({ kind: 'conflictPutOff', revision: conflict.revision })}
    />
  );
}
