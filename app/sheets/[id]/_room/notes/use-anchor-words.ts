'use client';

import { useStore } from 'zustand';
import { useShallow } from 'zustand/shallow';
import type { NoteAnchor } from '@/canvas/document/notes';
import type { SheetStore } from '@/canvas/store/sheet-store';
import { describeAnchor, type AnchorWords } from './describe-anchor';

/** What a note is pinned to, in words that follow the sheet; renders only when the words change. */
export function useAnchorWords(store: SheetStore, anchor: NoteAnchor): AnchorWords {
  return useStore(
    store,
    useShallow(({ document, readings }) => describeAnchor(anchor, document, readings.network.nodes)),
  );
}
