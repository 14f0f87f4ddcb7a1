'use client';

import { useCallback, useMemo, useState, useSyncExternalStore } from 'react';
import { noteAnchorSchema, type NoteAnchor } from '@/canvas/document/notes';
import { setFolded } from '@/canvas/react/ledger/fold-store';
import { NOTES_SECTION } from './section-name';
import { read, write } from './kept-text';

/** An anchor from this machine's storage, or none: what stands there may be anything. */
function anchorOf(text: string): NoteAnchor | null {
  try {
    return noteAnchorSchema.parse(JSON.parse(text));
  } catch {
    return null;
  }
}

const noChange = () => () => {};

/**
 * The note being written and the note being read. Where a new note is pinned is kept with its text, so that a note left
 * half written is there again when the sheet is opened next.
 * @param keptAs what the text of a new note is kept under
 */
export function useComposing(keptAs: string, mayWrite: boolean) {
  const place = `${keptAs}/anchor`;
  const kept = useSyncExternalStore(
    noChange,
    () => (mayWrite && read(keptAs) !== '' ? read(place) : ''),
    () => '',
  );
  const [now, setNow] = useState<NoteAnchor | null | undefined>(undefined);
  const [openNote, setOpen] = useState<string | null>(null);

  const compose = useCallback(
    (anchor: NoteAnchor) => {
      setFolded(NOTES_SECTION, false);
      write(place, JSON.stringify(anchor));
      setNow(anchor);
    },
    [place],
  );
  const composed = useCallback(() => {
    write(place, '');
    setNow(null);
  }, [place]);
  const setOpenNote = useCallback((id: string) => {
    setFolded(NOTES_SECTION, false);
    setOpen((before) => (before === id ? null : id));
  }, []);

  const composing = useMemo(() => (now === undefined ? anchorOf(kept) : now), [now, kept]);
  return { composing, compose, composed, openNote, setOpenNote };
}
