import type { NoteThread } from '@/app/_shared/wire';
import { NOTE_CLASSES, type NoteClass } from '@/canvas/document/notes';
import type { NotePin } from '@/canvas/react/workbench';

export const CLASS_NAMES: Readonly<Record<NoteClass, string>> = {
  major: 'Major',
  minor: 'Minor',
  query: 'Query',
  observation: 'Observation',
};

/** What each class asks of the person who answers. */
export const CLASS_HINTS: Readonly<Record<NoteClass, string>> = {
  major: 'Must be closed before signing off.',
  minor: 'Should be put right.',
  query: 'Wants an answer.',
  observation: 'For the record.',
};

const TITLE_CHARACTERS = 80;

/** Threads as the drawing shows them. */
export function pinsOf(threads: readonly NoteThread[]): readonly NotePin[] {
  return threads.map((thread) => ({
    id: thread.id,
    number: thread.number,
    anchor: thread.anchor,
    class: thread.class,
    resolved: thread.resolved !== null,
    title: titleOf(thread.text),
  }));
}

function titleOf(text: string): string {
  const line = Array.from(text.split('\n')[0] ?? '');
  return line.length <= TITLE_CHARACTERS ? line.join('') : `${line.slice(0, TITLE_CHARACTERS).join('')}…`;
}

/** How many are open, the weightiest class first: `1 major, 2 minor open`. */
export function openWords(threads: readonly NoteThread[]): string {
  const open = threads.filter((thread) => thread.resolved === null);
  if (threads.length === 0) return 'none';
  if (open.length === 0) return 'none open';
  const counts = NOTE_CLASSES.flatMap((one) => {
    const count = open.filter((thread) => thread.class === one).length;
    return count === 0 ? [] : [`${count} ${CLASS_NAMES[one].toLowerCase()}`];
  });
  return counts.length > 2 ? `${open.length} open` : `${counts.join(', ')} open`;
}
