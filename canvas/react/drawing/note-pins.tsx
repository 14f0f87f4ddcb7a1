'use client';

import { bodyOf, findPin, partsById } from '../../document/lookup';
import type { NoteAnchor, NoteClass } from '../../document/notes';
import type { SheetDocument } from '../../document/types';
import { samePoint, type Point } from '../../geometry/point';
import { useSheet } from '../sheet-context';

/** A note as the drawing shows it. */
export type NotePin = {
  readonly id: string;
  readonly number: number;
  readonly anchor: NoteAnchor;
  readonly class: NoteClass;
  readonly resolved: boolean;
  /** Its first words, for the tooltip and the accessible name. */
  readonly title: string;
};

/** Where a note points: its part or pin as it lies now, or where that was, if it is gone. */
export function anchorPlace(document: SheetDocument, anchor: NoteAnchor): Point {
  switch (anchor.kind) {
    case 'part': {
      const part = partsById(document).get(anchor.part);
      if (!part) return anchor.at;
      const body = bodyOf(part);
      return { x: body.right - 4, y: body.top };
    }
    case 'node': {
      const at = findPin(document, anchor)?.at ?? anchor.at;
      // A node's name stands above it; the note stands on the name.
      const named = document.parts.some((part) => part.kind === 'nodeName' && samePoint(part.at, at));
      return named ? { x: at.x, y: at.y - 54 } : at;
    }
    case 'place':
      return anchor.at;
  }
}

/** Notes on the drawing: a numbered disc on a stem, filled while open, hollow once resolved. */
export function NotePins({
  notes,
  open,
  onOpen,
}: {
  notes: readonly NotePin[];
  open: string | null;
  onOpen?: (id: string) => void;
}) {
  const document = useSheet((state) => state.document);
  return (
    <div className="absolute left-0 top-0 z-[6]">
      {notes.map((note) => {
        const { x, y } = anchorPlace(document, note.anchor);
        return (
          <button
            key={note.id}
            type="button"
            data-note={note.number}
            title={note.title}
            aria-label={`Note ${note.number}, ${note.class}${note.resolved ? ', resolved' : ''}: ${note.title}`}
            aria-pressed={note.id === open}
            onClick={() => onOpen?.(note.id)}
            style={{ transform: `translate(${x - 12}px, ${y - 42}px)` }}
            className="nodrag nopan pointer-events-auto absolute h-[42px] w-6 cursor-pointer"
          >
            <span
              className={`grid size-6 place-items-center rounded-full border-2 border-power text-[12px] font-semibold ${
                note.resolved ? 'bg-paper text-power' : 'bg-power text-paper'
              } ${note.id === open ? 'outline-2 outline-offset-2 outline-power' : ''}`}
            >
              {note.number}
            </span>
            <span className="mx-auto block h-[18px] w-0.5 bg-power" />
          </button>
        );
      })}
    </div>
  );
}
