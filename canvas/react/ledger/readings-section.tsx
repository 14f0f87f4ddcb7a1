'use client';

import { Search } from 'lucide-react';
import { useDeferredValue, useMemo, useState } from 'react';
import { conventionAt } from '../../network/format-reading';
import {
  filterRows,
  orderRows,
  readingRows,
  type ReadingOrder,
  type ReadingQuantity,
} from '../../network/reading-rows';
import { readingsCsv } from '../../network/readings-csv';
import { conventionWords } from '../figures/convention-words';
import { CopyButton } from '../figures/copy-button';
import { Segmented } from '../figures/segmented';
import { useSheet, useSheetStore } from '../sheet-context';
import { LedgerSection } from './ledger-section';
import { linesOf } from './reading-lines';
import { ReadingsTable } from './readings-table';

const QUANTITIES = [
  { value: 'current', label: 'Current' },
  { value: 'voltage', label: 'Voltage' },
  { value: 'power', label: 'Power' },
  { value: 'node', label: 'Nodes' },
] as const;

/** All readings, one quantity at a time. */
export function ReadingsSection() {
  const convention = useSheet((state) => state.document.convention);
  const isDirect = useSheet((state) => state.readings.frequencyHz === 0);
  const [quantity, setQuantity] = useState<ReadingQuantity>('current');
  const [filter, setFilter] = useState('');
  const [order, setOrder] = useState<ReadingOrder>({ by: 'name', descending: false });
  // Powers are the same in every convention.
  const words = quantity === 'power' && !isDirect ? 'active, reactive' : conventionWords(isDirect ? 'direct' : convention);
  return (
    <LedgerSection name="readings" title="Readings" aside={words}>
      <div className="flex flex-col gap-1.5">
        <Segmented label="Quantity" options={QUANTITIES} value={quantity} onValueChange={setQuantity} wide />
        <FilterAndCopy filter={filter} onFilter={setFilter} />
        <Lines quantity={quantity} filter={filter} order={order} onOrder={setOrder} />
      </div>
    </LedgerSection>
  );
}

type FilterAndCopyProps = { readonly filter: string; readonly onFilter: (text: string) => void };

function FilterAndCopy({ filter, onFilter }: FilterAndCopyProps) {
  const store = useSheetStore();
  return (
    <div className="flex items-center gap-1.5">
      <label className="flex h-7 min-w-0 flex-1 items-center gap-1.5 rounded-md border border-edge bg-raised px-2 hover:border-muted has-focus-visible:outline-2 has-focus-visible:outline-offset-[-1px] has-focus-visible:outline-voltage">
        <Search size={14} strokeWidth={1.75} aria-hidden="true" className="shrink-0 text-muted" />
        <span className="sr-only">Filter by name</span>
        <input
          type="search"
          value={filter}
          placeholder="Filter by name"
          maxLength={40}
          autoComplete="off"
          spellCheck={false}
          onChange={(event) => onFilter(event.target.value)}
          onKeyDown={(event) => {
            if (event.key !== 'Escape' || filter === '') return;
            event.preventDefault();
            event.stopPropagation();
            onFilter('');
          }}
          className="h-full min-w-0 flex-1 bg-transparent text-[13px] text-ink outline-none placeholder:text-muted focus-visible:outline-none [&::-webkit-search-cancel-button]:hidden"
        />
      </label>
      <CopyButton
        label={filter.trim() === '' ? 'Copy all readings as CSV' : 'Copy the readings of these names as CSV'}
        text={() => {
          const { document, readings } = store.getState();
          return readingsCsv(document, readings, filter);
        }}
      >
        CSV
      </CopyButton>
    </div>
  );
}

type LinesProps = {
  readonly quantity: ReadingQuantity;
  readonly filter: string;
  readonly order: ReadingOrder;
  readonly onOrder: (order: ReadingOrder) => void;
};

/** The largest sheet whose lines in sight are set within the frame of an edit; past it all follow when there is time. */
const MOST_AT_ONCE = 120;

function Lines({ quantity, filter, order, onOrder }: LinesProps) {
  const now = useSheet((state) => state.readings);
  const later = useDeferredValue(now);
  const readings = now.network.list.elements.length > MOST_AT_ONCE ? later : now;
  const document = useSheet((state) => state.document);
  const selected = useSheet((state) => state.selection.parts);
  const { convention: sheetConvention } = document;

  const convention = conventionAt(sheetConvention, readings.frequencyHz);
  const lines = useMemo(() => {
    const rows = readingRows(document, readings, quantity);
    return linesOf(orderRows(filterRows(rows, filter), order, quantity, convention), rows, quantity, convention);
  }, [document, readings, quantity, filter, order, convention]);

  if (document.parts.length === 0) {
    return <p className="text-[13px] leading-[18px] text-muted">Nothing is drawn yet. Take a part from the Shelf: R takes a resistor.</p>;
  }
  if (lines.length === 0) {
    return (
      <p className="text-[13px] leading-[18px] text-muted">
        {filter.trim() === '' ? 'Nothing here has a reading yet.' : `No name here holds “${filter.trim()}”.`}
      </p>
    );
  }
  return (
    <ReadingsTable
      lines={lines}
      quantity={quantity}
      convention={convention}
      order={order}
      onOrder={onOrder}
      selected={selected}
    />
  );
}
