'use client';

import { useRouter } from 'next/navigation';
import { useCallback, useRef, useState, type KeyboardEvent } from 'react';
import { ListEmpty } from './list-empty';
import type { ListPermissions } from './list-query';
import { rowGrid } from './row-grid';
import { SheetRow, type SheetRowActions } from './sheet-row';
import type { SheetListState } from './use-sheet-list';
import { failureText } from '@/app/_client/say-failure';
import type { ListSheetsInput } from '@/app/_shared/wire';
import { Button } from '@/components/button';
import { classNames } from '@/components/class-names';
import { LiveRegion } from '@/components/live-region';
import { toast } from '@/components/toast';

export type ListBodyProps = {
  readonly state: SheetListState;
  /** The query that the list answers. */
  readonly query: ListSheetsInput;
  readonly may: ListPermissions;
  readonly onBegin?: () => void;
  readonly onImport?: () => void;
  readonly onShowAll: () => void;
};

const COLUMNS = ['Parts', 'Snapshots', 'Open notes', 'Revision'] as const;

export function ListBody({ state, query, may, onBegin, onImport, onShowAll }: ListBodyProps) {
  const router = useRouter();
  const rows = useRef<HTMLUListElement>(null);
  const [renaming, setRenaming] = useState<string | null>(null);
  const { list, failure, waiting, refresh, rename, archive, restore, clone } = state;
  const sheets = list?.sheets ?? [];

  const focusRow = useCallback((id: string) => {
    rows.current?.querySelector<HTMLElement>(`[data-sheet-link="${id}"]`)?.focus();
  }, []);

  const actions: SheetRowActions = {
    onRename: (sheet) => setRenaming(sheet.id),
    onRenamed: (sheet, name) => {
      setRenaming(null);
      // The field goes away with this render; the row's link is there after it.
      requestAnimationFrame(() => focusRow(sheet.id));
      if (name !== sheet.name) void rename(sheet, name);
    },
    onRenameCancelled: (sheet) => {
      setRenaming(null);
      requestAnimationFrame(() => focusRow(sheet.id));
    },
    onArchive: (sheet) => {
      const next = neighbour(sheets, sheet.id);
      void archive(sheet);
      requestAnimationFrame(() => (next === null ? undefined : focusRow(next)));
    },
    onRestore: (sheet) => {
      const next = neighbour(sheets, sheet.id);
      void restore(sheet);
      requestAnimationFrame(() => (next === null ? undefined : focusRow(next)));
    },
    onClone: (sheet) => {
      void clone(sheet).then((id) => {
        if (id === null) return;
        toast.done(`“${sheet.name}” was cloned.`, {
          action: { label: 'Open', onPress: () => router.push(`/sheets/${id}`) },
        });
        requestAnimationFrame(() => focusRow(id));
      });
    },
  };

  const onKeyDown = (event: KeyboardEvent<HTMLUListElement>): void => {
    const id = event.target instanceof HTMLElement ? event.target.dataset.sheetLink : undefined;
    const sheet = sheets.find((one) => one.id === id);
    if (sheet === undefined || event.ctrlKey || event.metaKey || event.altKey) return;
    const target = keyTarget(event.key, sheets.indexOf(sheet), sheets.length);
    if (target !== null) {
      event.preventDefault();
      const next = sheets[target];
      if (next !== undefined) focusRow(next.id);
    } else if (event.key === 'F2' && may.rename && !query.archived) {
      event.preventDefault();
      actions.onRename(sheet);
    } else if (event.key === 'Delete' && may.archive && !query.archived) {
      event.preventDefault();
      actions.onArchive(sheet);
    }
  };

  return (
    <>
      <LiveRegion>{waiting || list === undefined ? '' : countText(sheets.length, query)}</LiveRegion>
      {failure !== undefined && (
        <div role="alert" className="mb-4 flex flex-wrap items-center gap-x-4 gap-y-2 rounded-md border border-falls px-3 py-2 text-sm">
          <p className="min-w-0 flex-1">{failureText(failure.detail)}</p>
          <Button size="small" onClick={() => void refresh()}>
            Try again
          </Button>
        </div>
      )}
      {list !== undefined && sheets.length === 0 ? (
        <ListEmpty query={query} onBegin={onBegin} onImport={onImport} onShowAll={onShowAll} />
      ) : (
        <>
          <div
            aria-hidden="true"
            className={classNames(rowGrid, '-mx-2 py-0! pb-1.5! text-xs text-muted max-lg:hidden')}
          >
            <span>Sheet</span>
            {COLUMNS.map((label) => (
              <span key={label} className="text-right">
                {label}
              </span>
            ))}
            <span>Changed</span>
          </div>
          {/* Safari drops the list from a list without bullets unless it is told. */}
          <ul
            ref={rows}
            role="list"
            aria-label={query.archived ? 'Archived sheets' : 'Sheets'}
            aria-busy={waiting}
            onKeyDown={onKeyDown}
            className={classNames('-mx-2 max-lg:border-t max-lg:border-rule', waiting && 'opacity-70')}
          >
            {sheets.map((sheet) => (
              <SheetRow key={sheet.id} sheet={sheet} may={may} actions={actions} renaming={renaming === sheet.id} />
            ))}
          </ul>
          {list?.more === true && (
            <p className="pt-4 text-sm text-muted">
              The first {sheets.length} are shown. Search by name or purpose to see the others.
            </p>
          )}
        </>
      )}
    </>
  );
}

/** Where a key leads in a list of `count` rows from row `from`; null for a key that leads nowhere. */
function keyTarget(key: string, from: number, count: number): number | null {
  switch (key) {
    case 'ArrowDown':
      return Math.min(from + 1, count - 1);
    case 'ArrowUp':
      return Math.max(from - 1, 0);
    case 'Home':
      return 0;
    case 'End':
      return count - 1;
    default:
      return null;
  }
}

/** Where the focus goes when a row leaves: to the next one, or else the one before. */
function neighbour(sheets: readonly { readonly id: string }[], id: string): string | null {
  const at = sheets.findIndex((one) => one.id === id);
  return (sheets[at + 1] ?? sheets[at - 1])?.id ?? null;
}

function countText(count: number, query: ListSheetsInput): string {
  const what = query.archived ? (count === 1 ? 'archived sheet' : 'archived sheets') : count === 1 ? 'sheet' : 'sheets';
  const search = query.search.trim();
  return search === '' ? `${count} ${what}` : `${count} ${what} for “${search}”`;
}
