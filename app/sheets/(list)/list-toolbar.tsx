'use client';

import { Archive, Search } from 'lucide-react';
import { useEffect, useRef } from 'react';
import { SORTS } from './list-query';
import type { ListSheetsInput } from '@/app/_shared/wire';
import { buttonStyle } from '@/components/button-style';
import { classNames } from '@/components/class-names';
import { Kbd } from '@/components/kbd';
import { Select } from '@/components/select';
import { TextField } from '@/components/text-field';

export type ListToolbarProps = { readonly query: ListSheetsInput; readonly onChange: (query: ListSheetsInput) => void };

export function ListToolbar({ query, onChange }: ListToolbarProps) {
  const search = useRef<HTMLInputElement>(null);

  useEffect(() => {
    const onKeyDown = (event: KeyboardEvent): void => {
      // With Ctrl or ⌘, since a single key that works everywhere could be set off by dictation (WCAG 2.1.4).
      if (event.key.toLowerCase() !== 'k' || !(event.ctrlKey || event.metaKey) || event.altKey) return;
      event.preventDefault();
      search.current?.focus();
      search.current?.select();
    };
    window.addEventListener('keydown', onKeyDown);
    return () => window.removeEventListener('keydown', onKeyDown);
  }, []);

  return (
    <div role="search" className="mb-4 flex flex-wrap gap-2">
      <TextField
        ref={search}
        type="search"
        label="Search the sheets"
        labelHidden
        placeholder="Search by name or purpose"
        maxLength={120}
        enterKeyHint="search"
        autoComplete="off"
        value={query.search}
        onChange={(event) => onChange({ ...query, search: event.target.value })}
        onKeyDown={(event) => {
          if (event.key === 'Escape' && query.search !== '') {
            event.preventDefault();
            onChange({ ...query, search: '' });
          }
          if (event.key === 'ArrowDown') {
            event.preventDefault();
            document.querySelector<HTMLElement>('[data-sheet-link]')?.focus();
          }
        }}
        lead={<Search size={16} strokeWidth={1.75} aria-hidden="true" />}
        trail={
          query.search === '' && (
            <span className="pointer-events-none pr-1.5 max-sm:hidden">
              <Kbd>Ctrl K</Kbd>
            </span>
          )
        }
        className="min-w-0 basis-full sm:max-w-90 sm:flex-1 sm:basis-auto"
      />
      <Select
        label="Order"
        labelHidden
        options={SORTS}
        value={query.sort}
        onValueChange={(sort) => onChange({ ...query, sort })}
        className="w-40"
      />
      <button
        type="button"
        aria-pressed={query.archived}
        onClick={() => onChange({ ...query, archived: !query.archived })}
        className={classNames(buttonStyle('plain'), query.archived && 'border-voltage! bg-voltage/10! text-voltage!')}
      >
        <Archive size={16} strokeWidth={1.75} aria-hidden="true" />
        Archive
      </button>
    </div>
  );
}
