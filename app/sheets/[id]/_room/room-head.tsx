'use client';

import { useStore } from 'zustand';
import { attempt } from '@/app/_client/attempt';
import { sayFailure } from '@/app/_client/say-failure';
import { renameSheet } from '@/app/sheets/actions';
import type { SheetStore } from '@/canvas/store/sheet-store';
import type { Theme } from '@/components/theme';
import { useTheme } from '@/components/use-theme';
import type { Keeper } from './keeping/keeper';
import { isSaved } from './keeping/machine';
import { useKept } from './keeping/use-keeper';
import { keepingWords, troubleText } from './keeping/words';
import { RoomMasthead } from './masthead/room-masthead';
import { roomMenu } from './masthead/room-menu';
import type { RoomRights } from './rights';
import { saveSheetFile } from './save-file';
import type { Following } from './use-following';

export type RoomHeadProps = {
  readonly store: SheetStore;
  readonly keeper: Keeper;
  readonly following: Following;
  readonly rights: RoomRights;
  readonly theme: Theme;
  readonly onConflict: () => void;
  readonly onSnapshots: () => void;
};

/** The masthead, tied to the keeper and to the sheet. Stands by itself so that a keystroke renders no more than this. */
export function RoomHead({ store, keeper, following, rights, theme, onConflict, onSnapshots }: RoomHeadProps) {
  const { record, foresee, refresh } = following;
  const { name, archived } = record;
  const state = useKept(keeper, ({ keeping }) => keepingWords(keeping, archived).state);
  const text = useKept(keeper, ({ keeping }) => keepingWords(keeping, archived).text);
  const short = useKept(keeper, ({ keeping }) => keepingWords(keeping, archived).short);
  const trouble = useKept(keeper, ({ keeping }) => (isSaved(keeping) ? null : keeping.trouble));
  const saved = useKept(keeper, ({ keeping }) => isSaved(keeping));
  const mayEdit = useStore(store, (now) => now.mayEdit);
  const { setPanel } = store.getState();

  const rename = async (next: string) => {
    foresee({ name: next });
    const result = await attempt(() => renameSheet({ id: record.id, name: next }));
    if (result.ok) return;
    foresee({ name });
    sayFailure(result.error);
    refresh();
  };

  const onSnapshot = rights.takeSnapshot && mayEdit ? () => setPanel('snapshot') : undefined;
  const onClone = rights.clone ? () => setPanel('clone') : undefined;
  return (
    <RoomMasthead
      teamName={record.teamName}
      name={name}
      origin={record.origin}
      words={{ state, text, short }}
      stateTitle={trouble === null ? undefined : troubleText(trouble)}
      onState={state === 'conflict' ? onConflict : undefined}
      onRename={rights.rename ? (next) => void rename(next) : undefined}
      onSnapshot={onSnapshot}
      onClone={onClone}
      menu={roomMenu({
        theme: useTheme(theme),
        origin: record.origin,
        onSnapshot,
        onSnapshots,
        onClone,
        exportPath: saved ? `/api/sheets/${record.id}/export` : null,
        onExport: () => saveSheetFile(name, keeper.text()),
        onKeys: () => setPanel('keys'),
      })}
    />
  );
}
