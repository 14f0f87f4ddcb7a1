'use client';

import { useEffect, useRef, useState, type KeyboardEvent } from 'react';
import { failureText } from '@/app/_client/say-failure';
import type { AppError } from '@/app/_shared/result';
import { NOTE_CLASSES, type NoteClass } from '@/canvas/document/notes';
import { Button } from '@/components/button';
import { Select } from '@/components/select';
import { TextArea } from '@/components/text-area';
import { CLASS_HINTS, CLASS_NAMES } from './note-words';
import { useKeptText } from './kept-text';

const MOST_CHARACTERS = 4_000;

export type NoteComposerProps = {
  /** What it is pinned to, in words. */
  readonly where: string;
  /** What this text is kept under while it is typed. */
  readonly keptAs: string;
  readonly onSend: (note: { readonly class: NoteClass; readonly text: string }) => Promise<AppError | null>;
  readonly onClose: () => void;
};

/** A new note being written. */
export function NoteComposer({ where, keptAs, onSend, onClose }: NoteComposerProps) {
  const [text, setText] = useKeptText(keptAs);
  const [noteClass, setNoteClass] = useState<NoteClass>('minor');
  const { box, busy, error, send } = useSending(text, setText, (ready) => onSend({ class: noteClass, text: ready }), onClose);

  useEffect(() => {
    box.current?.focus({ preventScroll: true });
    // The whole form with its buttons, not the text alone.
    box.current?.form?.scrollIntoView({ block: 'nearest' });
  }, [box]);

  const drop = () => {
    setText('');
    onClose();
  };

  return (
    <form
      aria-label={`New note ${where}`}
      onSubmit={(event) => {
        event.preventDefault();
        void send();
      }}
      className="mb-2 flex flex-col gap-2.5 rounded-lg border border-power/40 bg-raised p-3"
    >
      <p className="text-[13px] font-semibold text-power">New note, {where}</p>
      <Select
        label="Class"
        controlSize="small"
        hint={CLASS_HINTS[noteClass]}
        value={noteClass}
        options={NOTE_CLASSES.map((value) => ({ value, label: CLASS_NAMES[value] }))}
        onValueChange={setNoteClass}
      />
      <TextArea
        ref={box}
        label="Note"
        rows={4}
        maxLength={MOST_CHARACTERS}
        value={text}
        error={error ?? undefined}
        onChange={(event) => setText(event.target.value)}
        onKeyDown={(event) => onWritingKey(event, send, () => text.trim() === '' && drop())}
      />
      <div className="flex justify-end gap-2">
        <Button size="small" onClick={drop}>
          Cancel
        </Button>
        <Button size="small" variant="primary" type="submit" busy={busy}>
          Pin note
        </Button>
      </div>
    </form>
  );
}

export type ReplyComposerProps = {
  readonly number: number;
  readonly keptAs: string;
  readonly onSend: (text: string) => Promise<AppError | null>;
  readonly onClose: () => void;
};

/** An answer being written. */
export function ReplyComposer({ number, keptAs, onSend, onClose }: ReplyComposerProps) {
  const [text, setText] = useKeptText(keptAs);
  const { box, busy, error, send } = useSending(text, setText, onSend, onClose);

  useEffect(() => {
    box.current?.focus();
  }, [box]);

  return (
    <form
      aria-label={`Reply to note ${number}`}
      onSubmit={(event) => {
        event.preventDefault();
        void send();
      }}
      className="mt-2 flex flex-col gap-2"
    >
      <TextArea
        ref={box}
        label={`Reply to note ${number}`}
        labelHidden
        rows={2}
        maxLength={MOST_CHARACTERS}
        value={text}
        error={error ?? undefined}
        onChange={(event) => setText(event.target.value)}
        onKeyDown={(event) => onWritingKey(event, send, onClose)}
      />
      <div className="flex justify-end gap-2">
        <Button size="small" onClick={onClose}>
          Cancel
        </Button>
        <Button size="small" variant="primary" type="submit" busy={busy}>
          Reply
        </Button>
      </div>
    </form>
  );
}

/** Sends once at a time; what could not be sent stays in its box, with the reason under it. */
function useSending(
  text: string,
  setText: (text: string) => void,
  onSend: (text: string) => Promise<AppError | null>,
  onClose: () => void,
) {
  const box = useRef<HTMLTextAreaElement>(null);
  const [busy, setBusy] = useState(false);
  const [error, setError] = useState<string | null>(null);
  const send = async () => {
    if (busy) return;
    const ready = text.trim();
    if (ready === '') {
      setError('Write the note first.');
      box.current?.focus();
      return;
    }
    setBusy(true);
    const failure = await onSend(ready);
    setBusy(false);
    if (failure === null) {
      setText('');
      onClose();
      return;
    }
    setError(failureText(failure));
    box.current?.focus();
  };
  return { box, busy, error, send };
}

/** Ctrl or ⌘ with Enter sends, Escape leaves; no key reaches the drawing's own. */
function onWritingKey(event: KeyboardEvent, send: () => Promise<void>, leave: () => void): void {
  event.stopPropagation();
  if (event.key === 'Enter' && (event.ctrlKey || event.metaKey)) {
    event.preventDefault();
    void send();
  }
  if (event.key === 'Escape') leave();
}
