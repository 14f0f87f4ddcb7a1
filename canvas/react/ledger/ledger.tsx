'use client';

import type { ReactNode } from 'react';
import { Attention } from './attention';
import { ReadingsSection } from './readings-section';
import { SelectedSection } from './selected-section';

export type LedgerProps = {
  /** The notes, as a `LedgerSection` of their own. */
  readonly notes?: ReactNode;
};

/** The column at the right of the open sheet. It fills the landmark that it is put in, and scrolls by itself. */
export function Ledger({ notes }: LedgerProps) {
  return (
    <div className="flex h-full min-h-0 w-full flex-col overflow-x-hidden overflow-y-auto overscroll-contain bg-raised [scrollbar-gutter:stable] [scrollbar-width:thin] print:h-auto print:overflow-visible">
      <Attention />
      <SelectedSection />
      <ReadingsSection />
      {notes}
    </div>
  );
}
