import { parseSheetDocument } from '@/canvas/document/schema';
import type { SheetDocument } from '@/canvas/document/types';
import type { Draft } from './drafts';
import { fingerprint } from './fingerprint';
import type { Theirs } from './machine';

export type Opening =
  /** Nothing is held here that the server has not. */
  | { readonly kind: 'asStanding' }
  /** The draft goes on the sheet, and is saved without asking: nobody changed what it was made from. */
  | { readonly kind: 'takeUp'; readonly document: SheetDocument; readonly revision: number }
  /** The draft goes on the sheet, and the person chooses: someone changed the sheet since it was made. */
  | { readonly kind: 'conflict'; readonly document: SheetDocument }
  /** Something is held that cannot be read as a sheet; it stays where it is, to be had as a file. */
  | { readonly kind: 'unreadable'; readonly message: string };

/** What to do on return with what this machine held. */
export function decideOpening(draft: Draft | null, standing: Theirs): Opening {
  if (draft === null || draft.document === standing.document) return { kind: 'asStanding' };
  const read = parseSheetDocument(draft.document);
  if (!read.ok) return { kind: 'unreadable', message: read.message };
  // A revision that is not known here yet: what this page was given is the older one, and the server will judge.
  const ahead = draft.madeFrom > standing.revision;
  const unmoved = draft.madeFrom === standing.revision || draft.unanswered.includes(fingerprint(standing.document));
  if (!ahead && !unmoved) return { kind: 'conflict', document: read.document };
  return { kind: 'takeUp', document: read.document, revision: Math.max(draft.madeFrom, standing.revision) };
}
