import { partsById } from '../document/lookup';
import { isEmptySelection, NOTHING_SELECTED, selectAll, selectParts, type Selection } from '../document/selection';
import type { SheetDocument } from '../document/types';
import { GRID, type Point } from '../geometry/point';
import { definitionOf } from '../parts/registry';
import type { Command, CommandContext } from './command';
import { clip, offsetTo, paste, readClipping, writeClipping, type Clipping } from './edits/clipboard';
import { mirrorParts, moveParts, removeFromSheet, turnParts } from './edits/parts';

/** What a selection is called in undo and aloud: "R1", "R1 and C2", "3 parts", "a wire". */
export function selectionWords(document: SheetDocument, selection: Selection): string {
  const parts = [...selection.parts].flatMap((id) => partsById(document).get(id) ?? []);
  const names = parts.map((part) => part.designator || definitionOf(part.kind).name.toLowerCase());
  if (names.length === 0) return selection.wires.size === 1 ? 'a wire' : `${selection.wires.size} wires`;
  if (names.length === 1) return names[0] ?? '';
  return names.length === 2 ? names.join(' and ') : `${names.length} parts`;
}

const someSelected = ({ selection }: CommandContext) => !isEmptySelection(selection);
const partsSelected = ({ selection, tool }: CommandContext) => tool.kind === 'select' && selection.parts.size > 0;

function remove(context: CommandContext, verb: string): void {
  const { document, selection } = context;
  const words = selectionWords(document, selection);
  context.apply({
    label: `${verb} ${words}`,
    document: removeFromSheet(document, selection.parts, selection.wires),
    selection: NOTHING_SELECTED,
    say: `${verb === 'Cut' ? 'Cut' : 'Deleted'} ${words}.`,
  });
}

async function copy(context: CommandContext): Promise<boolean> {
  const clipping = clip(context.document, context.selection);
  if (clipping.parts.length === 0) return false;
  try {
    await context.screen.writeClipboard(writeClipping(clipping));
    return true;
  } catch {
    context.say('The browser did not allow copying. Allow clipboard access for this page and try again.');
    return false;
  }
}

function pasteClipping(context: CommandContext, clipping: Clipping, by: Point, label: string): void {
  const pasted = paste(context.document, clipping, by, () => context.freshId());
  const selection = selectParts(pasted.parts.map(({ id }) => id));
  const words = selectionWords(pasted.document, selection);
  context.apply({ label: `${label} ${words}`, document: pasted.document, selection, say: `${label}d ${words}.` });
}

/** Pastes clipboard text; text that is not ours is refused softly. */
export function pasteText(context: CommandContext, text: string): void {
  const clipping = readClipping(text);
  if (!clipping || clipping.parts.length === 0) {
    context.say('There are no parts on the clipboard to paste.');
    return;
  }
  const middle = context.screen.middle();
  const taken = new Set(context.document.parts.map(({ at }) => `${at.x},${at.y}`));
  // Beside the originals when they are here; else where the person is looking.
  const besideOriginals = clipping.parts.some(({ at }) => taken.has(`${at.x},${at.y}`));
  const by = besideOriginals ? { x: 2 * GRID, y: 2 * GRID } : offsetTo(clipping, { x: middle.x - 60, y: middle.y - 40 });
  pasteClipping(context, clipping, by, 'Paste');
}

function nudge(name: string, x: number, y: number): Command[] {
  const make = (keys: string, steps: number, words: string): Command => ({
    id: `nudge.${words}${name}`,
    name: `Move what is selected ${words === 'far.' ? 'far ' : ''}${name}`,
    listedAs: `Move what is selected${words === 'far.' ? ', five squares at a time' : ''}`,
    group: 'Arrange',
    keys: [keys],
    edits: true,
    when: partsSelected,
    run: (context) => {
      const { document, selection } = context;
      const by = { x: x * steps * GRID, y: y * steps * GRID };
      context.apply({
        label: `Move ${selectionWords(document, selection)}`,
        document: moveParts(document, selection.parts, by),
        gesture: `nudge ${[...selection.parts].join(' ')}`,
      });
    },
  });
  return [make(`arrow${name}`, 1, ''), make(`shift+arrow${name}`, 5, 'far.')];
}

function arrange(
  id: string,
  name: string,
  keys: readonly string[],
  change: (document: SheetDocument, parts: Selection['parts']) => SheetDocument,
): Command {
  return {
    id,
    name,
    group: 'Arrange',
    keys,
    edits: true,
    when: partsSelected,
    run: (context) => {
      const { document, selection } = context;
      const verb = name.split(' ')[0] ?? name;
      context.apply({
        label: `${verb} ${selectionWords(document, selection)}`,
        document: change(document, selection.parts),
      });
    },
  };
}

/** Changing what is there: deleting, copying, arranging, undoing. */
export const editingCommands: readonly Command[] = [
  {
    id: 'edit.value',
    name: 'Edit the value of what is selected',
    group: 'Edit',
    keys: ['enter'],
    edits: true,
    when: ({ tool, selection }) => tool.kind === 'select' && selection.parts.size === 1,
    run: ({ selection, screen }) => {
      for (const id of selection.parts) screen.editPart(id);
    },
  },
  {
    id: 'edit.delete',
    name: 'Delete what is selected',
    group: 'Edit',
    keys: ['delete', 'backspace'],
    edits: true,
    when: someSelected,
    run: (context) => remove(context, 'Delete'),
  },
  {
    id: 'edit.cut',
    name: 'Cut',
    group: 'Edit',
    keys: ['mod+x'],
    edits: true,
    when: partsSelected,
    run: async (context) => {
      if (await copy(context)) remove(context, 'Cut');
    },
  },
  {
    id: 'edit.copy',
    name: 'Copy',
    group: 'Edit',
    keys: ['mod+c'],
    edits: false,
    when: partsSelected,
    run: async (context) => {
      if (await copy(context)) context.say(`Copied ${selectionWords(context.document, context.selection)}.`);
    },
  },
  {
    id: 'edit.paste',
    name: 'Paste',
    group: 'Edit',
    keys: ['mod+v'],
    edits: true,
    run: async (context) => {
      try {
        pasteText(context, await context.screen.readClipboard());
      } catch {
        context.say('The browser did not allow pasting. Allow clipboard access for this page and try again.');
      }
    },
  },
  {
    id: 'edit.duplicate',
    name: 'Duplicate',
    group: 'Edit',
    keys: ['mod+d'],
    edits: true,
    when: partsSelected,
    run: (context) => {
      pasteClipping(context, clip(context.document, context.selection), { x: 2 * GRID, y: 2 * GRID }, 'Duplicate');
    },
  },
  {
    id: 'edit.selectAll',
    name: 'Select all',
    group: 'Edit',
    keys: ['mod+a'],
    edits: false,
    run: (context) => context.select(selectAll(context.document)),
  },
  {
    id: 'edit.undo',
    name: 'Undo',
    group: 'Edit',
    keys: ['mod+z'],
    edits: true,
    when: ({ undoLabel }) => undoLabel !== null,
    run: (context) => context.undo(),
  },
  {
    id: 'edit.redo',
    name: 'Redo',
    group: 'Edit',
    keys: ['mod+shift+z', 'mod+y'],
    edits: true,
    when: ({ redoLabel }) => redoLabel !== null,
    run: (context) => context.redo(),
  },
  {
    id: 'edit.cancel',
    name: 'Step back: undo the last corner, put back what is in hand, or select nothing',
    group: 'Edit',
    keys: ['escape'],
    edits: false,
    run: (context) => stepBack(context),
  },
  ...[nudge('left', -1, 0), nudge('right', 1, 0), nudge('up', 0, -1), nudge('down', 0, 1)].flat(),
  arrange('arrange.turn', 'Turn clockwise', ['t'], (document, parts) => turnParts(document, parts, 1)),
  arrange('arrange.turnBack', 'Turn anticlockwise', ['shift+t'], (document, parts) => turnParts(document, parts, -1)),
  arrange('arrange.mirror', 'Mirror left to right', ['m'], (document, parts) =>
    mirrorParts(document, parts, 'leftRight'),
  ),
  arrange('arrange.flip', 'Mirror top to bottom', ['shift+m'], (document, parts) =>
    mirrorParts(document, parts, 'topBottom'),
  ),
];

function stepBack(context: CommandContext): void {
  const { tool } = context;
  if (tool.kind === 'wire' && tool.corners.length > 0) {
    context.setTool({ ...tool, corners: tool.corners.slice(0, -1) });
  } else if (tool.kind === 'wire' && tool.from !== null) {
    context.setTool({ kind: 'wire', from: null, corners: [] });
  } else if (tool.kind !== 'select') {
    context.setTool({ kind: 'select' });
    context.setCursor(null);
    context.say('Nothing in hand.');
  } else {
    context.select(NOTHING_SELECTED);
    context.setCursor(null);
  }
}
