'use client';

import { useMemo } from 'react';
import { attempt } from '@/app/_client/attempt';
import { ReadFailure } from '@/app/_client/fetch-result';
import type { AppError, Result } from '@/app/_shared/result';
import type { NoteThread } from '@/app/_shared/wire';
import { createNote, reopenNote, replyNote, resolveNote } from '@/app/sheets/[id]/actions';
import type { NoteAnchor, NoteClass } from '@/canvas/document/notes';
import { notesKey, useRead } from '../reads';

/** A note reaches another open browser within three seconds: this, and the way there and back. */
const REFRESH_MS = 2_000;

/** What could not be done, for the person to read; null when it was done. */
type Failure = Promise<AppError | null>;

export type Notes = {
  readonly threads: readonly NoteThread[];
  /** Not read yet. */
  readonly loading: boolean;
  readonly error: AppError | null;
  create(note: { readonly anchor: NoteAnchor; readonly class: NoteClass; readonly text: string }): Failure;
  reply(noteId: string, text: string): Failure;
  resolve(noteId: string): Failure;
  reopen(noteId: string): Failure;
};

/** Marks what is shown before the server has it. */
const PENDING = 'pending-';

export function isPending(id: string): boolean {
  return id.startsWith(PENDING);
}

/** The notes of a sheet, kept up to date. A change shows at once, and is taken back when the server refuses it. */
export function useNotes(sheetId: string, person: string): Notes {
  const { data, error, isLoading, mutate } = useRead(notesKey(sheetId), {
    refreshInterval: REFRESH_MS,
    keepPreviousData: true,
    dedupingInterval: 500,
  });

  const changes = useMemo(() => {
    const change = async (
      act: () => Promise<Result<NoteThread>>,
      foresee: (threads: readonly NoteThread[]) => readonly NoteThread[],
    ): Failure => {
      let failure: AppError | null = null;
      await mutate(
        async (threads = []) => {
          const result = await attempt(act);
          if (result.ok) return withThread(threads, result.value);
          failure = result.error;
          throw new ReadFailure(result.error);
        },
        { optimisticData: (threads = []) => foresee(threads), rollbackOnError: true, revalidate: false, throwOnError: false },
      );
      return failure;
    };
    const now = () => new Date().toISOString();
    return {
      create: (note: { readonly anchor: NoteAnchor; readonly class: NoteClass; readonly text: string }) =>
        change(
          () => createNote({ sheetId, ...note }),
          (threads) => [
            ...threads,
            {
              ...note,
              id: `${PENDING}${threads.length}`,
              number: 1 + Math.max(0, ...threads.map((thread) => thread.number)),
              author: person,
              writtenAt: now(),
              resolved: null,
              replies: [],
            },
          ],
        ),
      reply: (noteId: string, text: string) =>
        change(
          () => replyNote({ noteId, text }),
          (threads) =>
            threads.map((thread) =>
              thread.id === noteId
                ? {
                    ...thread,
                    replies: [
                      ...thread.replies,
                      { id: `${PENDING}${thread.replies.length}`, author: person, text, writtenAt: now() },
                    ],
                  }
                : thread,
            ),
        ),
      resolve: (noteId: string) =>
        change(
          () => resolveNote({ noteId }),
          (threads) =>
            threads.map((thread) => (thread.id === noteId ? { ...thread, resolved: { by: person, at: now() } } : thread)),
        ),
      reopen: (noteId: string) =>
        change(
          () => reopenNote({ noteId }),
          (threads) => threads.map((thread) => (thread.id === noteId ? { ...thread, resolved: null } : thread)),
        ),
    };
  }, [mutate, person, sheetId]);

  return { threads: data ?? NONE, loading: isLoading, error: error?.detail ?? null, ...changes };
}

const NONE: readonly NoteThread[] = [];

function withThread(threads: readonly NoteThread[], thread: NoteThread): readonly NoteThread[] {
  const others = threads.filter((one) => one.id !== thread.id);
  return [...others, thread].sort((a, b) => a.number - b.number);
}
