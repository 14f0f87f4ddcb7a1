'use client';

import { MapPin } from 'lucide-react';
import { useContext, useState } from 'react';
import { failureText } from '@/app/_client/say-failure';
import type { NoteAnchor } from '@/canvas/document/notes';
import { anchorPlace } from '@/canvas/react/drawing/note-pins';
import { Segmented } from '@/canvas/react/figures/segmented';
import { LedgerSection } from '@/canvas/react/ledger/ledger-section';
import { ScreenContext } from '@/canvas/react/screen-context';
import type { SheetStore } from '@/canvas/store/sheet-store';
import { Button } from '@/components/button';
import { Skeleton } from '@/components/skeleton';
import type { RoomRights } from '../rights';
import { NoteCard } from './note-card';
import { NoteComposer } from './note-composer';
import { openWords } from './note-words';
import { NOTES_SECTION } from './section-name';
import { useAnchorWords } from './use-anchor-words';
import type { Notes } from './use-notes';

export type NotesSectionProps = {
  readonly store: SheetStore;
  readonly notes: Notes;
  readonly rights: RoomRights;
  /** Where a new note is being pinned. */
  readonly composing: NoteAnchor | null;
  readonly onComposed: () => void;
  readonly openNote: string | null;
  readonly onOpenNote: (id: string) => void;
  /** What texts being typed are kept under on this machine: whose, on which sheet. */
  readonly keptAs: string;
};

/** The Ledger's notes: threads in the order of their numbers, and the one being written. */
export function NotesSection(props: NotesSectionProps) {
  return (
    <LedgerSection name={NOTES_SECTION} title="Notes" aside={openWords(props.notes.threads)}>
      <NotesList {...props} />
    </LedgerSection>
  );
}

function NotesList({ store, notes, rights, composing, onComposed, openNote, onOpenNote, keptAs }: NotesSectionProps) {
  const screen = useContext(ScreenContext);
  const [filter, setFilter] = useState<'open' | 'all'>('open');
  // A resolved note that was pressed on the drawing is shown whatever the filter says.
  const shown = notes.threads.filter((thread) => filter === 'all' || thread.resolved === null || thread.id === openNote);

  return (
    <div className="flex flex-col gap-2">
      <div className="flex items-center justify-between gap-2 print:hidden">
        <Segmented
          label="Which notes"
          options={[
            { value: 'open', label: 'Open' },
            { value: 'all', label: 'All' },
          ]}
          value={filter}
          onValueChange={setFilter}
        />
        {rights.createNote && (
          <Button
            size="small"
            icon={<MapPin size={14} strokeWidth={1.75} aria-hidden="true" />}
            onClick={() => {
              store.getState().setTool({ kind: 'note' });
              store.getState().say('Press on a part, a node or a place to pin the note there. Escape to leave it.');
            }}
          >
            Pin a note
          </Button>
        )}
      </div>
      {composing !== null && (
        <NewNote
          key={JSON.stringify(composing)}
          store={store}
          anchor={composing}
          notes={notes}
          keptAs={keptAs}
          onComposed={onComposed}
        />
      )}
      {notes.error !== null && (
        <p role="status" className="text-[13px] text-caution">
          The notes may be out of date. {failureText(notes.error)}
        </p>
      )}
      {notes.loading && <Skeleton className="h-16" />}
      <ol aria-label="Notes" className="flex flex-col gap-2 empty:hidden">
        {shown.map((thread) => (
          <NoteCard
            key={thread.id}
            store={store}
            thread={thread}
            open={thread.id === openNote}
            keptAs={`${keptAs}/${thread.id}`}
            may={{ reply: rights.replyNote, resolve: rights.resolveNote, reopen: rights.reopenNote }}
            notes={notes}
            onOpen={() => {
              onOpenNote(thread.id);
              screen?.reveal(anchorPlace(store.getState().document, thread.anchor));
            }}
          />
        ))}
      </ol>
      {!notes.loading && shown.length === 0 && composing === null && (
        <p className="text-[13px] leading-snug text-muted">{emptyWords(notes, rights)}</p>
      )}
    </div>
  );
}

function NewNote({
  store,
  anchor,
  notes,
  keptAs,
  onComposed,
}: Pick<NotesSectionProps, 'store' | 'notes' | 'keptAs' | 'onComposed'> & { readonly anchor: NoteAnchor }) {
  return (
    <NoteComposer
      where={useAnchorWords(store, anchor).text}
      keptAs={`${keptAs}/new`}
      onSend={(note) => notes.create({ anchor, ...note })}
      onClose={onComposed}
    />
  );
}

function emptyWords(notes: Notes, rights: RoomRights): string {
  if (notes.threads.length > 0) return 'Every note is resolved. Choose All to read them.';
  return rights.createNote
    ? 'No notes yet. Pin one to a part, a node or a place: press Q, then the place.'
    : 'No notes yet.';
}
