'use client';

import { useEffect } from 'react';
import type { ReadFailure } from '@/app/_client/fetch-result';
import type { SheetRecord } from '@/app/_shared/wire';
import { toast } from '@/components/toast';
import type { Keeper } from './keeping/keeper';
import { sheetKey, useRead } from './reads';

const REFRESH_MS = 3_000;

export type Following = {
  /** The sheet as the server last said, and its name as it was last given. */
  readonly record: SheetRecord;
  readonly error: ReadFailure | undefined;
  /** Shows another name or place at once, before the server says it. */
  readonly foresee: (change: Partial<Pick<SheetRecord, 'name' | 'archived'>>) => void;
  readonly refresh: () => void;
};

/** Keeps asking how the sheet stands on the server, and lets the keeper show what others saved. */
export function useFollowing(sheet: SheetRecord, keeper: Keeper): Following {
  const { data, error, mutate } = useRead(sheetKey(sheet.id), { refreshInterval: REFRESH_MS });
  const record = data ?? sheet;

  useEffect(() => {
    if (data === undefined) return;
    if (keeper.seen(data) && keeper.getView().keeping.hand === 'here') {
      toast.plain(`${data.changedBy} changed this sheet: revision ${data.revision} is shown.`);
    }
  }, [data, keeper]);

  return {
    record,
    error,
    foresee: (change) => void mutate({ ...record, ...change }, { revalidate: false }),
    refresh: () => void mutate(),
  };
}
