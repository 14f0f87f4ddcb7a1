'use client';

import { useRouter } from 'next/navigation';
import { useEffect, useMemo, useState } from 'react';
import { attempt } from '@/app/_client/attempt';
import { sayFailure } from '@/app/_client/say-failure';
import type { SheetRecord } from '@/app/_shared/wire';
import { restoreSheet } from '@/app/sheets/actions';
import { parseSheetDocument } from '@/canvas/document/schema';
import type { SheetDocument } from '@/canvas/document/types';
import { Workbench } from '@/canvas/react/workbench';
import { createSheetStore } from '@/canvas/store/sheet-store';
import type { Theme } from '@/components/theme';
import { useKeeper, useKept } from './keeping/use-keeper';
import { NotesSection } from './notes/notes-section';
import { pinsOf } from './notes/note-words';
import { useComposing } from './notes/use-composing';
import { useNotes } from './notes/use-notes';
import { rememberRoom } from './open-room';
import type { RoomPerson, RoomRights } from './rights';
import { RoomBanner } from './room-banner';
import { RoomDialogs, type RoomDialog } from './room-dialogs';
import { RoomHead } from './room-head';
import { saveSheetFile } from './save-file';
import { UnreadableSheet } from './unreadable-sheet';
import { useFollowing } from './use-following';

export type RoomProps = {
  readonly sheet: SheetRecord;
  readonly person: RoomPerson;
  readonly rights: RoomRights;
  readonly theme: Theme;
};

/** The room of an open sheet: the drawing, what keeps it, and all that is done with it as a whole. */
export function Room(props: RoomProps) {
  const { name, document } = props.sheet;
  const [read] = useState(() => parseSheetDocument(document));
  if (!read.ok) return <UnreadableSheet name={name} document={document} message={read.message} />;
  return <OpenRoom {...props} document={read.document} />;
}

/*
 * Renders when the notes, the name or an open dialog change, and never for an edit: what follows the keeper or the
 * drawing is in components of its own, because everything inside the workbench renders with this.
 */
function OpenRoom({ sheet, person, rights, theme, document }: RoomProps & { readonly document: SheetDocument }) {
  const router = useRouter();
  const mayWrite = rights.save && !sheet.archived;
  const [store] = useState(() => createSheetStore(document, mayWrite));
  const [dialog, setDialog] = useState<RoomDialog | null>(null);
  const keeper = useKeeper({ store, sheet, userId: person.userId, mayWrite });
  const following = useFollowing(sheet, keeper);
  const notes = useNotes(sheet.id, person.name);
  const keptAs = `${person.userId}/${sheet.id}`;
  const { composing, compose, composed, openNote, setOpenNote } = useComposing(`${keptAs}/new`, rights.createNote);
  const opening = useKept(keeper, ({ keeping }) => keeping.hand === 'opening');
  const mayEdit = useKept(
    keeper,
    ({ keeping: { hand, trouble } }) =>
      mayWrite && hand !== 'elsewhere' && trouble?.kind !== 'refused' && trouble?.kind !== 'gone',
  );

  useEffect(() => {
    store.setState(mayEdit ? { mayEdit } : { mayEdit, tool: { kind: 'select' } });
  }, [store, mayEdit]);

  useEffect(() => {
    rememberRoom({ userId: person.userId, sheetId: sheet.id, sheetName: sheet.name }, () => keeper.text());
  }, [keeper, person.userId, sheet.id, sheet.name]);

  useEffect(() => {
    // The drawing is what one comes for: its keys work as soon as a hand may meet it.
    if (opening || window.document.activeElement !== window.document.body) return;
    window.document.querySelector<HTMLElement>('[data-drawing]')?.focus({ preventScroll: true });
  }, [opening]);

  const unarchive = async () => {
    const result = await attempt(() => restoreSheet({ id: sheet.id }));
    if (result.ok) router.refresh();
    else sayFailure(result.error);
  };

  const { record } = following;
  const pins = useMemo(() => pinsOf(notes.threads), [notes.threads]);
  return (
    // For the moment in which it is found out who writes and what this machine held, no hand may meet the sheet.
    <div className="contents" inert={opening && mayWrite}>
      <Workbench
        store={store}
        masthead={
          <RoomHead
            store={store}
            keeper={keeper}
            following={following}
            rights={rights}
            theme={theme}
            onConflict={() => setDialog(null)}
            onSnapshots={() => setDialog({ kind: 'snapshots' })}
          />
        }
        banner={
          <RoomBanner
            keeper={keeper}
            archived={record.archived}
            followError={following.error}
            onConflict={() => setDialog(null)}
            onSaveFile={() => saveSheetFile(record.name, keeper.text())}
            onSaveLeftover={(held) => saveSheetFile(record.name, held)}
            onUnarchive={rights.unarchive ? () => void unarchive() : undefined}
          />
        }
        notesSection={
          <NotesSection
            store={store}
            notes={notes}
            rights={rights}
            composing={composing}
            onComposed={composed}
            openNote={openNote}
            onOpenNote={setOpenNote}
            keptAs={keptAs}
          />
        }
        notes={pins}
        openNote={openNote}
        onOpenNote={setOpenNote}
        onPinNote={rights.createNote ? compose : undefined}
        dialogs={
          <RoomDialogs
            store={store}
            keeper={keeper}
            record={record}
            rights={rights}
            dialog={dialog}
            onDialog={setDialog}
          />
        }
      />
    </div>
  );
}
