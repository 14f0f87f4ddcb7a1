'use client';

import { Archive, ArchiveRestore, Copy, Download, EllipsisVertical, PencilLine } from 'lucide-react';
import { useState, type ReactNode } from 'react';
import type { ListPermissions } from './list-query';
import { RenameField } from './rename-field';
import { rowGrid } from './row-grid';
import { AheadLink } from '@/app/_frame/ahead-link';
import type { SheetListItem } from '@/app/_shared/wire';
import { classNames } from '@/components/class-names';
import { MenuButton } from '@/components/menu-button';
import type { MenuEntry } from '@/components/menu-entry';
import { RelativeTime } from '@/components/relative-time';

export type SheetRowActions = {
  readonly onRename: (sheet: SheetListItem) => void;
  readonly onRenamed: (sheet: SheetListItem, name: string) => void;
  readonly onRenameCancelled: (sheet: SheetListItem) => void;
  readonly onArchive: (sheet: SheetListItem) => void;
  readonly onRestore: (sheet: SheetListItem) => void;
  readonly onClone: (sheet: SheetListItem) => void;
};

export type SheetRowProps = {
  readonly sheet: SheetListItem;
  readonly may: ListPermissions;
  readonly actions: SheetRowActions;
  readonly renaming: boolean;
};

export function SheetRow({ sheet, may, actions, renaming }: SheetRowProps) {
  const href = `/sheets/${sheet.id}`;
  return (
    <li className={classNames(rowGrid, 'hover:bg-wash has-[[data-sheet-link]:focus-visible]:outline-2 has-[[data-sheet-link]:focus-visible]:-outline-offset-2 has-[[data-sheet-link]:focus-visible]:outline-voltage')}>
      <div className="min-w-0">
        {renaming ? (
          <RenameField
            name={sheet.name}
            onDone={(name) => actions.onRenamed(sheet, name)}
            onCancel={() => actions.onRenameCancelled(sheet)}
          />
        ) : (
          <AheadLink
            href={href}
            data-sheet-link={sheet.id}
            // The row shows the focus, as the row is what a press opens.
            className="block truncate text-[15px] leading-6 font-semibold outline-none after:absolute after:inset-0"
          >
            {sheet.name}
          </AheadLink>
        )}
        {sheet.purpose !== '' && <p className="truncate text-[13px] leading-5 text-muted">{firstLine(sheet.purpose)}</p>}
        {sheet.origin !== null && (
          <p className="truncate text-[13px] leading-5 text-muted">
            from{' '}
            <AheadLink
              href={`/sheets/${sheet.origin.sheetId}`}
              className="relative z-10 inline-block min-h-6 -outline-offset-2 text-voltage underline decoration-voltage/40 underline-offset-2 hover:decoration-voltage"
            >
              {sheet.origin.sheetName}
            </AheadLink>
            {sheet.origin.snapshotName !== null && `, snapshot “${sheet.origin.snapshotName}”`}
          </p>
        )}
        <p className="mt-1 flex flex-wrap gap-x-3 text-[13px] leading-5 text-muted lg:hidden">
          <span>{plural(sheet.partCount, 'part')}</span>
          {sheet.snapshotCount > 0 && <span>{plural(sheet.snapshotCount, 'snapshot')}</span>}
          {sheet.openNoteCount > 0 && <span className="font-medium text-power">{plural(sheet.openNoteCount, 'open note')}</span>}
          <span>revision {sheet.revision}</span>
          <span>
            <RelativeTime at={sheet.changedAt} /> by {sheet.changedBy}
          </span>
        </p>
      </div>
      <Figure label="parts">{sheet.partCount}</Figure>
      <Figure label="snapshots">{sheet.snapshotCount === 0 ? NONE : sheet.snapshotCount}</Figure>
      <Figure label="open notes">
        {sheet.openNoteCount === 0 ? (
          NONE
        ) : (
          <span className="inline-flex h-[22px] min-w-[22px] items-center justify-center rounded-full bg-power px-1.5 text-xs font-semibold text-paper">
            {sheet.openNoteCount}
          </span>
        )}
      </Figure>
      <Figure label="revision">{sheet.revision}</Figure>
      <p className="min-w-0 text-[13px] leading-5 max-lg:hidden">
        <RelativeTime at={sheet.changedAt} />
        <span className="block truncate text-muted">
          <span className="sr-only">by </span>
          {sheet.changedBy}
        </span>
      </p>
      <RowMenu sheet={sheet} may={may} actions={actions} />
    </li>
  );
}

const NONE = (
  <>
    <span aria-hidden="true" className="text-muted">
      –
    </span>
    <span className="sr-only">none</span>
  </>
);

/** A column's figure; its word is in the heading for the eye, and here for the ear. */
function Figure({ label, children }: { readonly label: string; readonly children: ReactNode }) {
  return (
    <p className="text-right font-mono text-[13px] tabular-nums max-lg:hidden">
      <span className="sr-only">{label}: </span>
      {children}
    </p>
  );
}

const icon = { size: 16, strokeWidth: 1.75, 'aria-hidden': true } as const;

function RowMenu({ sheet, may, actions }: Omit<SheetRowProps, 'renaming'>) {
  // Renaming begins when the menu has closed, and takes the focus that would go back to the button.
  const [renameNext, setRenameNext] = useState(false);
  const entries: MenuEntry[] = [];
  if (may.rename && !sheet.archived) {
    entries.push({
      kind: 'item',
      label: 'Rename',
      shortcut: 'F2',
      icon: <PencilLine {...icon} />,
      onSelect: () => setRenameNext(true),
    });
  }
  if (may.clone) {
    entries.push({ kind: 'item', label: 'Clone', icon: <Copy {...icon} />, onSelect: () => actions.onClone(sheet) });
  }
  if (may.export) {
    entries.push({
      kind: 'link',
      label: 'Export as a file',
      href: `/api/sheets/${sheet.id}/export`,
      download: true,
      icon: <Download {...icon} />,
    });
  }
  if (may.archive && !sheet.archived) {
    entries.push(
      { kind: 'separator' },
      {
        kind: 'item',
        label: 'Archive',
        shortcut: 'Del',
        icon: <Archive {...icon} />,
        onSelect: () => actions.onArchive(sheet),
      },
    );
  }
  if (may.restore && sheet.archived) {
    entries.push(
      { kind: 'separator' },
      { kind: 'item', label: 'Restore', icon: <ArchiveRestore {...icon} />, onSelect: () => actions.onRestore(sheet) },
    );
  }
  if (entries.length === 0) return null;
  return (
    <div className="relative z-10 max-lg:col-start-2 max-lg:row-start-1 max-lg:self-start">
      <MenuButton
        label={`Actions for ${sheet.name}`}
        entries={entries}
        onCloseFocus={(event) => {
          if (!renameNext) return;
          setRenameNext(false);
          event.preventDefault();
          actions.onRename(sheet);
        }}
        className="flex size-9 cursor-pointer items-center justify-center rounded-md text-muted hover:bg-wash hover:text-ink data-[state=open]:bg-wash data-[state=open]:text-ink"
      >
        <EllipsisVertical size={18} strokeWidth={1.75} aria-hidden="true" />
      </MenuButton>
    </div>
  );
}

function plural(count: number, word: string): string {
  return `${count} ${word}${count === 1 ? '' : 's'}`;
}

function firstLine(text: string): string {
  return text.split('\n', 1)[0] ?? '';
}
