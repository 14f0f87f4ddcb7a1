'use client';

import { FirstPartPicture } from './first-part-picture';
import type { ListSheetsInput } from '@/app/_shared/wire';
import { Button } from '@/components/button';
import { EmptyState } from '@/components/empty-state';

export type ListEmptyProps = {
  readonly query: ListSheetsInput;
  /** Not given to a role that may not. */
  readonly onBegin?: () => void;
  readonly onImport?: () => void;
  readonly onShowAll: () => void;
};

/** Why there is nothing to see, and the one press that changes it. */
export function ListEmpty({ query, onBegin, onImport, onShowAll }: ListEmptyProps) {
  const search = query.search.trim();
  if (search !== '') {
    return (
      <EmptyState title={`Nothing matches “${search}”`} action={<Button onClick={onShowAll}>Show all sheets</Button>}>
        {query.archived
          ? 'Neither a name nor a purpose in the archive holds these words. The sheets in use are not searched here.'
          : 'Neither a name nor a purpose holds these words. What is in the archive is not searched here.'}
      </EmptyState>
    );
  }
  if (query.archived) {
    return (
      <EmptyState title="The archive is empty" action={<Button onClick={onShowAll}>Show the sheets in use</Button>}>
        A sheet that is put away stands here, whole, until someone restores it.
      </EmptyState>
    );
  }
  return (
    <EmptyState
      picture={<FirstPartPicture />}
      title="No sheets yet"
      action={
        onBegin === undefined ? undefined : (
          <>
            {onImport !== undefined && <Button onClick={onImport}>Import a file</Button>}
            <Button variant="primary" onClick={onBegin}>
              Begin the first sheet
            </Button>
          </>
        )
      }
    >
      {onBegin === undefined
        ? 'As soon as a designer of the team begins one, it stands here, and you can read it and its readings.'
        : 'A sheet is one drawing and all that belongs to it. Begin one, or drop an exported file anywhere on this page.'}
    </EmptyState>
  );
}
