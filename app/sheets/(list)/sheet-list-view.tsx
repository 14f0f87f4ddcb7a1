'use client';

import { FileUp, Plus } from 'lucide-react';
import { useRouter } from 'next/navigation';
import { useCallback, useRef, useState } from 'react';
import { FileDrop } from './file-drop';
import { importFile } from './import-file';
import { ListBody } from './list-body';
import { FIRST_QUERY, type ListPermissions, type SheetList } from './list-query';
import { ListToolbar } from './list-toolbar';
import { NewSheetDialog } from './new-sheet-dialog';
import { useDebounced } from './use-debounced';
import { useSheetList } from './use-sheet-list';
import { PageHeading } from '@/app/_frame/page-heading';
import { Button } from '@/components/button';
import { toast } from '@/components/toast';

export type SheetListViewProps = { readonly first: SheetList; readonly may: ListPermissions };

/** Long enough for the next letter of someone typing, short enough not to be felt after the last. */
const TYPING_PAUSE_MS = 180;

/** The team's sheets: found, begun, brought in, and what else is done to a sheet from outside. */
export function SheetListView({ first, may }: SheetListViewProps) {
  const router = useRouter();
  const [query, setQuery] = useState(FIRST_QUERY);
  const [beginning, setBeginning] = useState(false);
  const [importing, setImporting] = useState(false);
  const picker = useRef<HTMLInputElement>(null);
  const asked = { ...query, search: useDebounced(query.search, TYPING_PAUSE_MS) };
  const state = useSheetList(asked, { query: FIRST_QUERY, list: first });
  const { refresh } = state;

  const bringIn = useCallback(
    async (files: readonly File[]) => {
      setImporting(true);
      for (const file of files) {
        const outcome = await importFile(file);
        if (outcome.ok) {
          const { id, name } = outcome;
          toast.done(`“${name}” was imported.`, { action: { label: 'Open', onPress: () => router.push(`/sheets/${id}`) } });
        } else {
          toast.failed(outcome.message);
        }
      }
      await refresh();
      setImporting(false);
    },
    [refresh, router],
  );

  const begin = may.create ? () => setBeginning(true) : undefined;
  const pick = (): void => picker.current?.click();

  return (
    <>
      <PageHeading title="Sheets">
        {may.import && (
          <Button busy={importing} icon={<FileUp size={16} strokeWidth={1.75} aria-hidden="true" />} onClick={pick}>
            Import
          </Button>
        )}
        {begin !== undefined && (
          <Button variant="primary" icon={<Plus size={16} strokeWidth={2} aria-hidden="true" />} onClick={begin}>
            New sheet
          </Button>
        )}
      </PageHeading>
      <ListToolbar query={query} onChange={setQuery} />
      <ListBody
        state={state}
        query={asked}
        may={may}
        onBegin={begin}
        onImport={may.import ? pick : undefined}
        onShowAll={() => setQuery(FIRST_QUERY)}
      />
      {may.import && (
        <>
          <input
            ref={picker}
            type="file"
            accept=".json,application/json"
            multiple
            hidden
            aria-label="Sheet files to import"
            onChange={(event) => {
              const files = [...(event.target.files ?? [])];
              // Else the same file could not be chosen twice.
              event.target.value = '';
              if (files.length > 0) void bringIn(files);
            }}
          />
          <FileDrop onFiles={bringIn} />
        </>
      )}
      <NewSheetDialog open={beginning} onClose={() => setBeginning(false)} onMade={(id) => router.push(`/sheets/${id}`)} />
    </>
  );
}
