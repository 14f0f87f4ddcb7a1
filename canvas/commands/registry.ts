import type { Command, CommandContext } from './command';
import { drawingCommands } from './drawing-commands';
import { editingCommands } from './editing-commands';
import { lookingCommands } from './looking-commands';

/** Every command there is. Where one key serves several, their `when` decides, in this order. */
export const commands: readonly Command[] = [...drawingCommands, ...editingCommands, ...lookingCommands];

/** What happened on the keyboard, as far as commands care. */
export type KeyStroke = {
  readonly key: string;
  readonly ctrlKey: boolean;
  readonly metaKey: boolean;
  readonly shiftKey: boolean;
  readonly altKey: boolean;
};

/** A keystroke as written in a command's keys. Shift counts with letters and named keys; `?` is `?` on every layout. */
export function keyName(stroke: KeyStroke): string {
  const key = stroke.key.toLowerCase();
  const shiftCounts = key.length > 1 || key.toUpperCase() !== key;
  const mods = [
    stroke.ctrlKey || stroke.metaKey ? 'mod+' : '',
    stroke.altKey ? 'alt+' : '',
    stroke.shiftKey && shiftCounts ? 'shift+' : '',
  ];
  return mods.join('') + key;
}

export function mayRun(command: Command, context: CommandContext): boolean {
  if (command.edits && !context.mayEdit) return false;
  return command.when ? command.when(context) : true;
}

/** The command that a keystroke runs now, if any. */
export function commandFor(stroke: KeyStroke, context: CommandContext): Command | null {
  const name = keyName(stroke);
  return commands.find((command) => command.keys.includes(name) && mayRun(command, context)) ?? null;
}

export function commandById(id: string): Command | null {
  return commands.find((command) => command.id === id) ?? null;
}
