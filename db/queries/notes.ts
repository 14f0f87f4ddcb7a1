import 'server-only';
import { literal, QueryTypes, type Transaction } from 'sequelize';
import type { NoteReply, NoteThread, Viewer } from '@/app/_shared/wire';
import { noteAnchorSchema, type NoteAnchor, type NoteClass } from '@/canvas/document/notes';
import { database, inTransaction, select } from '../client';
import { newId } from '../id';
import { models } from '../models/models';

/** Bounds of what one sheet's answer can hold; far above any review. */
const MOST_THREADS = 1000;
const MOST_REPLIES = 200;

type ThreadRow = {
  readonly id: string;
  readonly number: number;
  readonly anchor: string;
  readonly class: NoteClass;
  readonly text: string;
  readonly author: string;
  readonly writtenAt: Date;
  readonly resolvedAt: Date | null;
  readonly resolvedBy: string | null;
};
type ReplyRow = Omit<NoteReply, 'writtenAt'> & { readonly noteId: string; readonly writtenAt: Date };

const THREAD_COLUMNS = `notes.id, notes.number, notes.anchor, notes.class, notes.text, author.name AS author,
  notes.writtenAt, notes.resolvedAt, resolver.name AS resolvedBy`;
const THREAD_TABLES = `notes JOIN sheets ON sheets.id = notes.sheetId JOIN users author ON author.id = notes.writtenBy
  LEFT JOIN users resolver ON resolver.id = notes.resolvedBy`;

/** Moves at every change to the sheet's notes; null when the sheet is not there. */
export async function findNotesVersion(viewer: Viewer, sheetId: string): Promise<number | null> {
  const rows = await select<{ readonly notesVersion: number }>(
    'SELECT notesVersion FROM sheets WHERE id = :sheetId AND teamId = :teamId',
    { sheetId, teamId: viewer.teamId },
  );
  return rows[0]?.notesVersion ?? null;
}

/** All threads of a sheet, in the order of their numbers. */
export async function listNotes(viewer: Viewer, sheetId: string): Promise<readonly NoteThread[]> {
  const scope = { sheetId, teamId: viewer.teamId };
  const threads = await select<ThreadRow>(
    `SELECT ${THREAD_COLUMNS} FROM ${THREAD_TABLES}
      WHERE notes.sheetId = :sheetId AND sheets.teamId = :teamId ORDER BY notes.number LIMIT ${MOST_THREADS}`,
    scope,
  );
  const replies = await select<ReplyRow>(
    `SELECT replies.id, replies.noteId, users.name AS author, replies.text, replies.writtenAt
      FROM replies JOIN notes ON notes.id = replies.noteId JOIN sheets ON sheets.id = notes.sheetId
      JOIN users ON users.id = replies.writtenBy
      WHERE notes.sheetId = :sheetId AND sheets.teamId = :teamId ORDER BY replies.writtenAt, replies.id`,
    scope,
  );
  const byNote = new Map<string, ReplyRow[]>();
  for (const reply of replies) {
    const known = byNote.get(reply.noteId);
    if (known) known.push(reply);
    else byNote.set(reply.noteId, [reply]);
  }
  return threads.map((thread) => toThread(thread, byNote.get(thread.id) ?? []));
}

/** Pins a note to a sheet; null when the sheet is not there. */
export function createNote(
  viewer: Viewer,
  note: { readonly sheetId: string; readonly anchor: NoteAnchor; readonly class: NoteClass; readonly text: string },
): Promise<NoteThread | null> {
  const { Note, Sheet } = models();
  return inTransaction(async (transaction) => {
    // Counting up locks the row, so that two notes at once get two numbers.
    const [counted] = await Sheet.update(
      { lastNoteNumber: literal('lastNoteNumber + 1'), notesVersion: literal('notesVersion + 1') },
      { where: { id: note.sheetId, teamId: viewer.teamId }, transaction },
    );
    if (counted !== 1) return null;
    const sheet = await Sheet.findByPk(note.sheetId, { attributes: ['lastNoteNumber'], transaction, rejectOnEmpty: true });
    const id = newId();
    await Note.create(
      {
        id,
        sheetId: note.sheetId,
        number: sheet.lastNoteNumber,
        anchor: JSON.stringify(noteAnchorSchema.parse(note.anchor)),
        class: note.class,
        text: note.text,
        writtenAt: new Date(),
        writtenBy: viewer.userId,
      },
      { transaction },
    );
    return findThread(viewer, id, transaction);
  });
}

export type ReplyOutcome =
  | { readonly kind: 'changed'; readonly thread: NoteThread }
  | { readonly kind: 'full' }
  | { readonly kind: 'notFound' };

/** Answers a note; an answer neither closes nor opens it. */
export function replyNote(
  viewer: Viewer,
  reply: { readonly noteId: string; readonly text: string },
): Promise<ReplyOutcome> {
  return inTransaction<ReplyOutcome>(async (transaction) => {
    if (!(await touch(viewer, reply.noteId, transaction))) return { kind: 'notFound' };
    const { Reply } = models();
    if ((await Reply.count({ where: { noteId: reply.noteId }, transaction })) >= MOST_REPLIES) return { kind: 'full' };
    await Reply.create(
      { id: newId(), noteId: reply.noteId, text: reply.text, writtenAt: new Date(), writtenBy: viewer.userId },
      { transaction },
    );
    const thread = await findThread(viewer, reply.noteId, transaction);
    return thread ? { kind: 'changed', thread } : { kind: 'notFound' };
  });
}

/** Closes a note. One that is closed already stays closed by whom it was. */
export function resolveNote(viewer: Viewer, noteId: string): Promise<NoteThread | null> {
  return setResolved(viewer, noteId, true);
}

export function reopenNote(viewer: Viewer, noteId: string): Promise<NoteThread | null> {
  return setResolved(viewer, noteId, false);
}

function setResolved(viewer: Viewer, noteId: string, resolved: boolean): Promise<NoteThread | null> {
  return inTransaction(async (transaction) => {
    if (!(await touch(viewer, noteId, transaction))) return null;
    const { Note } = models();
    if (resolved) {
      await Note.update(
        { resolvedAt: new Date(), resolvedBy: viewer.userId },
        { where: { id: noteId, resolvedAt: null }, transaction },
      );
    } else {
      await Note.update({ resolvedAt: null, resolvedBy: null }, { where: { id: noteId }, transaction });
    }
    return findThread(viewer, noteId, transaction);
  });
}

/**
 * Moves the sheet's notes version, and with that locks the sheet's notes; false when the note is not the viewer's
 * team's. Must come first in its transaction: what is read before it may be older than the lock.
 */
async function touch(viewer: Viewer, noteId: string, transaction: Transaction): Promise<boolean> {
  const [, counted] = await database().query(
    `UPDATE sheets JOIN notes ON notes.sheetId = sheets.id SET sheets.notesVersion = sheets.notesVersion + 1
      WHERE notes.id = :noteId AND sheets.teamId = :teamId`,
    { type: QueryTypes.UPDATE, replacements: { noteId, teamId: viewer.teamId }, transaction },
  );
  return counted === 1;
}

async function findThread(viewer: Viewer, noteId: string, transaction: Transaction): Promise<NoteThread | null> {
  const scope = { noteId, teamId: viewer.teamId };
  const threads = await select<ThreadRow>(
    `SELECT ${THREAD_COLUMNS} FROM ${THREAD_TABLES} WHERE notes.id = :noteId AND sheets.teamId = :teamId`,
    scope,
    transaction,
  );
  const replies = await select<ReplyRow>(
    `SELECT replies.id, replies.noteId, users.name AS author, replies.text, replies.writtenAt
      FROM replies JOIN users ON users.id = replies.writtenBy
      WHERE replies.noteId = :noteId ORDER BY replies.writtenAt, replies.id`,
    scope,
    transaction,
  );
  return threads[0] ? toThread(threads[0], replies) : null;
}

function toThread(row: ThreadRow, replies: readonly ReplyRow[]): NoteThread {
  return {
    id: row.id,
    number: row.number,
    anchor: noteAnchorSchema.parse(JSON.parse(row.anchor)),
    class: row.class,
    text: row.text,
    author: row.author,
    writtenAt: row.writtenAt.toISOString(),
    resolved:
      row.resolvedAt && row.resolvedBy !== null ? { by: row.resolvedBy, at: row.resolvedAt.toISOString() } : null,
    replies: replies.map((reply) => ({
      id: reply.id,
      author: reply.author,
      text: reply.text,
      writtenAt: reply.writtenAt.toISOString(),
    })),
  };
}
