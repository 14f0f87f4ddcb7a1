'use server';

import { action } from '@/app/_server/action';
import { failure, success } from '@/app/_server/errors';
import { noteSubject, sheetSubject, snapshotSubject } from '@/app/_server/subjects';
import {
  createNoteInput,
  noteInput,
  replyNoteInput,
  restoreSnapshotInput,
  saveSheetInput,
  takeSnapshotInput,
} from '@/app/_shared/wire';
import { parseSheetDocument } from '@/canvas/document/schema';
import * as notes from '@/db/queries/notes';
import * as sheets from '@/db/queries/sheet-changes';
import * as snapshots from '@/db/queries/snapshots';

/**
 * Saves a sheet made from the given revision. Safe to send twice: an answer that was lost on the way may be asked for
 * again with the same document, and is then the same. A conflict is a value: what stands on the server now.
 */
export const saveSheet = action(
  { name: 'sheet.save', permission: 'sheet.save', input: saveSheetInput, subject: sheetSubject },
  async ({ viewer, input }) => {
    const read = parseSheetDocument(input.document);
    if (!read.ok) return failure('invalid', read.message);
    const outcome = await sheets.saveSheet(viewer, { id: input.id, revision: input.revision, document: read.document });
    return outcome ? success(outcome) : failure('notFound');
  },
);

/** Freezes the revision that the person sees; refused when another one stands there by now. */
export const takeSnapshot = action(
  { name: 'snapshot.take', permission: 'snapshot.take', input: takeSnapshotInput, subject: sheetSubject },
  async ({ viewer, input }) => {
    const outcome = await snapshots.takeSnapshot(viewer, input);
    switch (outcome.kind) {
      case 'taken':
        return success(outcome.snapshot);
      case 'stale':
        return failure('conflict', 'The sheet was changed since you saw it. Look at it again, then take the snapshot.');
      case 'notFound':
        return failure('notFound');
    }
  },
);

/** Makes the snapshot's document the sheet's next revision; answers as a save does. */
export const restoreSnapshot = action(
  { name: 'snapshot.restore', permission: 'snapshot.restore', input: restoreSnapshotInput, subject: snapshotSubject },
  async ({ viewer, input }) => {
    const outcome = await snapshots.restoreSnapshot(viewer, input);
    return outcome ? success(outcome) : failure('notFound');
  },
);

export const createNote = action(
  { name: 'note.create', permission: 'note.create', input: createNoteInput, subject: sheetSubject },
  async ({ viewer, input }) => {
    const thread = await notes.createNote(viewer, input);
    return thread ? success(thread) : failure('notFound');
  },
);

export const replyNote = action(
  { name: 'note.reply', permission: 'note.reply', input: replyNoteInput, subject: noteSubject },
  async ({ viewer, input }) => {
    const outcome = await notes.replyNote(viewer, input);
    switch (outcome.kind) {
      case 'changed':
        return success(outcome.thread);
      case 'full':
        return failure('invalid', 'This note has as many answers as a note can hold (200). Write a new note.');
      case 'notFound':
        return failure('notFound');
    }
  },
);

export const resolveNote = action(
  { name: 'note.resolve', permission: 'note.resolve', input: noteInput, subject: noteSubject },
  async ({ viewer, input }) => {
    const thread = await notes.resolveNote(viewer, input.noteId);
    return thread ? success(thread) : failure('notFound');
  },
);

export const reopenNote = action(
  { name: 'note.reopen', permission: 'note.reopen', input: noteInput, subject: noteSubject },
  async ({ viewer, input }) => {
    const thread = await notes.reopenNote(viewer, input.noteId);
    return thread ? success(thread) : failure('notFound');
  },
);
