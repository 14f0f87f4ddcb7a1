import type { CommandContext, Screen } from '../commands/command';
import { freshId } from '../document/ids';
import type { SheetStore } from './sheet-store';

/** What a command sees of the open sheet, as it is now, and of the screen around it. */
export function commandContext(store: SheetStore, screen: Screen): CommandContext {
  const state = store.getState();
  const { past, future } = state.history;
  return {
    document: state.document,
    selection: state.selection,
    tool: state.tool,
    cursor: state.cursor,
    mayEdit: state.mayEdit,
    showing: state.showing,
    undoLabel: past[past.length - 1]?.label ?? null,
    redoLabel: future[future.length - 1]?.label ?? null,
    apply: state.apply,
    select: state.select,
    setTool: state.setTool,
    setCursor: state.setCursor,
    setShowing: state.setShowing,
    undo: state.undo,
    redo: state.redo,
    say: state.say,
    freshId: () => freshId(),
    screen,
  };
}
