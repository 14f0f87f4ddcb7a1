'use client';

import { useCallback } from 'react';
import useSWR, { useSWRConfig } from 'swr';
import { listPath, type SheetList } from './list-query';
import { attempt } from '@/app/_client/attempt';
import { fetchResult, type ReadFailure } from '@/app/_client/fetch-result';
import { sayFailure } from '@/app/_client/say-failure';
import type { Result } from '@/app/_shared/result';
import type { ListSheetsInput, SheetListItem } from '@/app/_shared/wire';
import { archiveSheet, cloneSheet, renameSheet, restoreSheet } from '@/app/sheets/actions';
import { toast } from '@/components/toast';

const NOTHING: SheetList = { sheets: [], more: false };

const isListKey = (key: unknown): boolean => typeof key === 'string' && key.startsWith('/api/sheets?');

export type SheetListState = {
  /** Undefined only while nothing at all has come yet. */
  readonly list: SheetList | undefined;
  readonly failure: ReadFailure | undefined;
  /** What is shown belongs to an earlier query; the answer to this one is on its way. */
  readonly waiting: boolean;
  readonly refresh: () => Promise<void>;
  readonly rename: (sheet: SheetListItem, name: string) => Promise<void>;
  readonly archive: (sheet: SheetListItem) => Promise<void>;
  readonly restore: (sheet: SheetListItem) => Promise<void>;
  /** Answers the clone's id, or null when it was refused (which has then been said). */
  readonly clone: (sheet: SheetListItem) => Promise<string | null>;
};

/**
 * The list for a query, and what can be done to its sheets. A change shows at once; when the server refuses it, what
 * stood before stands again and the reason is said.
 */
export function useSheetList(query: ListSheetsInput, first: { readonly query: ListSheetsInput; readonly list: SheetList }): SheetListState {
  const path = listPath(query);
  const { mutate: mutateAll } = useSWRConfig();
  const { data, error, isLoading, mutate } = useSWR<SheetList, ReadFailure>(path, fetchResult<SheetList>, {
    fallbackData: path === listPath(first.query) ? first.list : undefined,
    keepPreviousData: true,
  });

  const refresh = useCallback(async () => {
    await mutateAll(isListKey);
  }, [mutateAll]);

  /** Shows `guess` while `act` runs; puts back what stood there if it is refused. */
  const change = useCallback(
    async <T,>(guess: (list: SheetList) => SheetList, act: () => Promise<Result<T>>): Promise<boolean> => {
      const standing = data ?? NOTHING;
      let done = false;
      await mutate(
        async () => {
          const result = await attempt(act);
          done = result.ok;
          if (!result.ok) sayFailure(result.error);
          return result.ok ? guess(standing) : standing;
        },
        { optimisticData: guess(standing), populateCache: true, revalidate: false },
      );
      await refresh();
      return done;
    },
    [data, mutate, refresh],
  );

  const rename = useCallback(
    async (sheet: SheetListItem, name: string) => {
      await change(
        (list) => withSheets(list, (sheets) => sheets.map((one) => (one.id === sheet.id ? { ...one, name } : one))),
        () => renameSheet({ id: sheet.id, name }),
      );
    },
    [change],
  );

  const restore = useCallback(
    async (sheet: SheetListItem) => {
      const done = await change((list) => without(list, sheet), () => restoreSheet({ id: sheet.id }));
      if (done) toast.done(`“${sheet.name}” is among the sheets again.`);
    },
    [change],
  );

  const archive = useCallback(
    async (sheet: SheetListItem) => {
      const done = await change((list) => without(list, sheet), () => archiveSheet({ id: sheet.id }));
      if (!done) return;
      toast.done(`“${sheet.name}” is in the archive.`, {
        action: {
          label: 'Undo',
          onPress: () => {
            void attempt(() => restoreSheet({ id: sheet.id })).then((result) => {
              if (!result.ok) sayFailure(result.error);
              return refresh();
            });
          },
        },
      });
    },
    [change, refresh],
  );

  const clone = useCallback(
    async (sheet: SheetListItem) => {
      const result = await attempt(() => cloneSheet({ id: sheet.id }));
      if (!result.ok) {
        sayFailure(result.error);
        return null;
      }
      await refresh();
      return result.value.id;
    },
    [refresh],
  );

  // SWR calls it loading while only what the page came with is shown; but that is the answer to its query.
  const waiting = isLoading && path !== listPath(first.query);
  return { list: data, failure: error, waiting, refresh, rename, archive, restore, clone };
}

function withSheets(list: SheetList, change: (sheets: readonly SheetListItem[]) => readonly SheetListItem[]): SheetList {
  return { ...list, sheets: change(list.sheets) };
}

function without(list: SheetList, sheet: SheetListItem): SheetList {
  return withSheets(list, (sheets) => sheets.filter((one) => one.id !== sheet.id));
}
