import type { ListSheetsInput, SheetListItem } from '@/app/_shared/wire';

/** What the handler answers; `more` when only the first of them are in it. */
export type SheetList = { readonly sheets: readonly SheetListItem[]; readonly more: boolean };

/** What the list shows at first, and what it goes back to. */
export const FIRST_QUERY: ListSheetsInput = { search: '', sort: 'changed', archived: false };

export const SORTS = [
  { value: 'changed', label: 'Last changed' },
  { value: 'name', label: 'Name' },
  { value: 'created', label: 'Newest' },
] as const satisfies readonly { readonly value: ListSheetsInput['sort']; readonly label: string }[];

/** The handler's address for a list, which is also SWR's key of it. */
export function listPath(query: ListSheetsInput): string {
  const parameters = new URLSearchParams({ sort: query.sort, archived: String(query.archived) });
  const search = query.search.trim();
  if (search !== '') parameters.set('search', search);
  return `/api/sheets?${parameters.toString()}`;
}

/** What a role may do in the list; decided on the server, which asks again at every action. */
export type ListPermissions = {
  readonly create: boolean;
  readonly import: boolean;
  readonly rename: boolean;
  readonly clone: boolean;
  readonly archive: boolean;
  readonly restore: boolean;
  readonly export: boolean;
};
