import type { Panel, Screen } from '@/canvas/commands/command';
import { targetAt } from '@/canvas/commands/edits/wires';
import { commandById, commandFor, mayRun } from '@/canvas/commands/registry';
import { allPins, coursesOf } from '@/canvas/document/lookup';
import type { SheetDocument } from '@/canvas/document/types';
import type { Point } from '@/canvas/geometry/point';
import { commandContext } from '@/canvas/store/command-context';
import { createSheetStore, type SheetStore } from '@/canvas/store/sheet-store';

/** An open sheet without a browser: the real store and commands, and a screen that only notes what was asked of it. */
export class OpenSheet {
  readonly store: SheetStore;
  readonly opened: Panel[] = [];
  readonly edited: string[] = [];
  clipboard = '';

  constructor(document: SheetDocument, mayEdit = true) {
    this.store = createSheetStore(document, mayEdit);
  }

  get document(): SheetDocument {
    return this.store.getState().document;
  }

  get said(): string {
    return this.store.getState().spoken.text;
  }

  context() {
    return commandContext(this.store, this.screen());
  }

  /** Runs a command by its id, if it may run now. Answers whether it did. */
  async run(id: string): Promise<boolean> {
    const command = commandById(id);
    if (!command) throw new Error(`there is no command ${id}`);
    const context = this.context();
    if (!mayRun(command, context)) return false;
    await command.run(context);
    return true;
  }

  /** Presses keys as written in commands, `mod+shift+z arrowleft`, one after the other. */
  async press(...keys: readonly string[]): Promise<void> {
    for (const written of keys) {
      const parts = written.split('+');
      const key = written === '+' ? '+' : (parts[parts.length - 1] ?? '');
      const stroke = {
        key,
        ctrlKey: parts.includes('mod'),
        metaKey: false,
        shiftKey: parts.includes('shift'),
        altKey: parts.includes('alt'),
      };
      const context = this.context();
      const command = commandFor(stroke, context);
      if (command) await command.run(context);
    }
  }

  private screen(): Screen {
    return {
      zoomIn: () => undefined,
      zoomOut: () => undefined,
      zoomToFit: () => undefined,
      zoomToFull: () => undefined,
      middle: () => ({ x: 403, y: 198 }),
      reveal: () => undefined,
      targetAt: (place: Point) => targetAt(this.document, place, 6, allPins(this.document), coursesOf(this.document)),
      writeClipboard: async (text) => {
        this.clipboard = text;
      },
      readClipboard: async () => this.clipboard,
      editPart: (id) => this.edited.push(id),
      open: (panel) => this.opened.push(panel),
    };
  }
}
