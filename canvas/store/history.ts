import type { Selection } from '../document/selection';
import type { SheetDocument } from '../document/types';

/** What stood before a step, and what the step is called. Documents never change, so keeping one is keeping a pointer. */
export type Step = {
  readonly label: string;
  readonly document: SheetDocument;
  readonly selection: Selection;
  readonly gesture: string | null;
};

/** Undo and redo without limit: the last of each list comes first. */
export type History = { readonly past: readonly Step[]; readonly future: readonly Step[] };

export const NO_HISTORY: History = { past: [], future: [] };

type Present = { readonly document: SheetDocument; readonly selection: Selection };

/** Notes a step. Steps in a row of one gesture are one, which goes back to where the gesture began. */
export function remember(history: History, before: Present, label: string, gesture: string | null): History {
  const last = history.past[history.past.length - 1];
  if (gesture !== null && last?.gesture === gesture && history.future.length === 0) {
    return { past: [...history.past.slice(0, -1), { ...last, label }], future: [] };
  }
  return { past: [...history.past, { label, gesture, ...before }], future: [] };
}

/** Ends the gesture under way, so that the next edit like it is a step of its own. */
export function closeGesture(history: History): History {
  const last = history.past[history.past.length - 1];
  if (!last || last.gesture === null) return history;
  return { ...history, past: [...history.past.slice(0, -1), { ...last, gesture: null }] };
}

export type Moved = { readonly history: History; readonly present: Present; readonly label: string };

export function undo(history: History, present: Present): Moved | null {
  const step = history.past[history.past.length - 1];
  if (!step) return null;
  return {
    label: step.label,
    present: { document: step.document, selection: step.selection },
    history: {
      past: history.past.slice(0, -1),
      future: [...history.future, { label: step.label, gesture: null, ...present }],
    },
  };
}

export function redo(history: History, present: Present): Moved | null {
  const step = history.future[history.future.length - 1];
  if (!step) return null;
  return {
    label: step.label,
    present: { document: step.document, selection: step.selection },
    history: {
      past: [...history.past, { label: step.label, gesture: null, ...present }],
      future: history.future.slice(0, -1),
    },
  };
}
