import { createStore, type StoreApi } from 'zustand/vanilla';
import type { Edit, Panel, Showing, Tool } from '../commands/command';
import { NOTHING_SELECTED, stillThere, type Selection } from '../document/selection';
import type { PartId, SheetDocument } from '../document/types';
import { limitPassed } from '../document/within-limits';
import type { Point } from '../geometry/point';
import { readNetwork, type Readings } from '../network/readings';
import { closeGesture, NO_HISTORY, redo, remember, undo, type History, type Moved } from './history';

/** The open sheet: the document, what was done to it, what is selected and in hand, and the readings. */
export type SheetState = {
  readonly document: SheetDocument;
  /** Always those of `document`: both change in the same step. */
  readonly readings: Readings;
  readonly selection: Selection;
  readonly history: History;
  readonly mayEdit: boolean;
  readonly tool: Tool;
  readonly cursor: Point | null;
  readonly showing: Showing;
  /** The part whose main field is being edited on the drawing. */
  readonly editing: PartId | null;
  readonly panel: Panel | null;
  /** What the live region says; a number with it, so that the same words can be said twice. */
  readonly spoken: { readonly text: string; readonly count: number };

  apply(edit: Edit): void;
  select(selection: Selection): void;
  setTool(tool: Tool): void;
  setCursor(cursor: Point | null): void;
  setShowing(showing: Showing): void;
  setEditing(part: PartId | null): void;
  setPanel(panel: Panel | null): void;
  endGesture(): void;
  undo(): void;
  redo(): void;
  say(text: string): void;
  /** Takes another document in place of this one, with no way back: after a conflict or a restore. */
  replace(document: SheetDocument): void;
};

export type SheetStore = StoreApi<SheetState>;

export const FIRST_SHOWING: Showing = { currents: true, voltages: false, powers: false, nodes: true };

/** Edits that only change how the sheet is looked at, and so are open to those who may not change it. */
function onlyLooks(before: SheetDocument, after: SheetDocument): boolean {
  return before.parts === after.parts && before.wires === after.wires && before.purpose === after.purpose;
}

export function createSheetStore(document: SheetDocument, mayEdit: boolean): SheetStore {
  return createStore<SheetState>()((set, get) => {
    const go = (moved: Moved | null, verb: 'Undid' | 'Redid') => {
      if (!moved) return;
      const { document: next, selection } = moved.present;
      set((state) => ({
        document: next,
        selection: stillThere(selection, next),
        readings: next === state.document ? state.readings : readNetwork(next),
        history: moved.history,
        editing: null,
        // A wire in hand may have begun on what has just gone.
        tool: { kind: 'select' },
        spoken: spoken(state, `${verb}: ${moved.label}.`),
      }));
    };
    return {
      document,
      readings: readNetwork(document),
      selection: NOTHING_SELECTED,
      history: NO_HISTORY,
      mayEdit,
      tool: { kind: 'select' },
      cursor: null,
      showing: FIRST_SHOWING,
      editing: null,
      panel: null,
      spoken: { text: '', count: 0 },

      apply(edit) {
        const state = get();
        if (!state.mayEdit && !onlyLooks(state.document, edit.document)) return;
        const passed = limitPassed(edit.document);
        if (passed !== null) {
          state.say(passed);
          return;
        }
        const changed = edit.document !== state.document;
        const selection = stillThere(edit.selection ?? state.selection, edit.document);
        set({
          document: edit.document,
          selection,
          readings: changed ? readNetwork(edit.document) : state.readings,
          history: changed
            ? remember(state.history, { document: state.document, selection: state.selection }, edit.label, edit.gesture ?? null)
            : state.history,
          ...(edit.say === undefined ? {} : { spoken: spoken(state, edit.say) }),
        });
      },
      select: (selection) => set((state) => ({ selection: stillThere(selection, state.document) })),
      setTool: (tool) => set({ tool, editing: null }),
      setCursor: (cursor) => set({ cursor }),
      setShowing: (showing) => set({ showing }),
      setEditing: (editing) => set({ editing }),
      setPanel: (panel) => set({ panel }),
      endGesture: () => set((state) => ({ history: closeGesture(state.history) })),
      undo: () => go(undo(get().history, get()), 'Undid'),
      redo: () => go(redo(get().history, get()), 'Redid'),
      say: (text) => set((state) => ({ spoken: spoken(state, text) })),
      replace: (next) =>
        set({ document: next, readings: readNetwork(next), selection: NOTHING_SELECTED, history: NO_HISTORY, editing: null, tool: { kind: 'select' } }),
    };
  });
}

function spoken(state: SheetState, text: string): SheetState['spoken'] {
  return { text, count: state.spoken.count + 1 };
}
