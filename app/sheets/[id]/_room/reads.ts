'use client';

import useSWR, { type SWRConfiguration, type SWRResponse } from 'swr';
import { fetchResult, type ReadFailure } from '@/app/_client/fetch-result';
import type { NoteThread, SheetRecord, SnapshotListItem } from '@/app/_shared/wire';

/** The path of a handler, which remembers what it answers. */
export type ReadKey<T> = string & { readonly answers?: T };

export const sheetKey = (sheetId: string): ReadKey<SheetRecord> => `/api/sheets/${sheetId}`;
export const snapshotsKey = (sheetId: string): ReadKey<readonly SnapshotListItem[]> => `/api/sheets/${sheetId}/snapshots`;
export const notesKey = (sheetId: string): ReadKey<readonly NoteThread[]> => `/api/sheets/${sheetId}/notes`;

/** Reads a handler and keeps reading it. */
export function useRead<T>(
  key: ReadKey<T> | null,
  options?: SWRConfiguration<T, ReadFailure>,
): SWRResponse<T, ReadFailure> {
  return useSWR<T, ReadFailure>(key, (path: string) => fetchResult<T>(path), options);
}
