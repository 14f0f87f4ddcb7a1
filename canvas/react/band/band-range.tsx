'use client';

import { MoveHorizontal } from 'lucide-react';
import { Popover } from 'radix-ui';
import { useState, type FormEvent } from 'react';
import { Button } from '@/components/button';
import type { BandRange } from '../../document/types';
import { formatHertz, formatWhole } from '../figures/echo';
import { useSheet, useSheetStore } from '../sheet-context';
import { EntryField } from './entry-field';
import { readBand, widenedBand } from './read-band';

/** Opens the small window in which the ends of the Band are typed. */
export function BandRangeButton() {
  const [open, setOpen] = useState(false);
  return (
    <Popover.Root open={open} onOpenChange={setOpen}>
      <Popover.Trigger asChild>
        <button
          type="button"
          aria-label="Set the range of the Band"
          title="Set the range of the Band"
          className="inline-flex size-7 cursor-pointer items-center justify-center rounded-md text-muted hover:bg-wash hover:text-ink"
        >
          <MoveHorizontal size={16} strokeWidth={1.75} aria-hidden="true" />
        </button>
      </Popover.Trigger>
      <Popover.Portal>
        <Popover.Content
          side="top"
          align="end"
          sideOffset={8}
          collisionPadding={8}
          aria-label="Range of the Band"
          onKeyDown={(event) => event.stopPropagation()}
          className="fade-in z-50 w-80 rounded-lg border border-rule bg-raised p-3 text-ink shadow-float"
        >
          <BandRangeForm onDone={() => setOpen(false)} />
        </Popover.Content>
      </Popover.Portal>
    </Popover.Root>
  );
}

function BandRangeForm({ onDone }: { readonly onDone: () => void }) {
  const store = useSheetStore();
  const band = useSheet((state) => state.document.band);
  const hz = useSheet((state) => state.readings.frequencyHz);
  const [from, setFrom] = useState(() => endText(band.fromHz));
  const [to, setTo] = useState(() => endText(band.toHz));
  const read = readBand(from, to);

  const set = (next: BandRange) => {
    const { document, apply } = store.getState();
    const isSame = next.fromHz === document.band.fromHz && next.toHz === document.band.toHz;
    const words = `${endText(next.fromHz)} to ${endText(next.toHz)}`;
    if (!isSame) apply({ label: `Set the Band from ${words}`, document: { ...document, band: next }, say: `The Band runs from ${words}.` });
    onDone();
  };
  const submit = (event: FormEvent) => {
    event.preventDefault();
    if (read.ok) set(read.band);
    else store.getState().say(read.message);
  };

  const faultAt = (end: 'from' | 'to') => (!read.ok && read.end === end ? read.message : null);
  const isOffBand = hz > 0 && (hz < band.fromHz || hz > band.toHz);
  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-2">
      <div className="flex gap-3">
        <EntryField label="From" text={from} onText={setFrom} fault={faultAt('from')} note="" />
        <EntryField label="To" text={to} onText={setTo} fault={faultAt('to')} note="" />
      </div>
      <div className="flex items-center justify-end gap-2">
        {isOffBand && (
          <Button size="small" onClick={() => set(widenedBand(band, hz))}>
            Widen to hold {formatHertz(hz)}
          </Button>
        )}
        <Button type="submit" size="small" variant="primary">
          Set
        </Button>
      </div>
    </form>
  );
}

/** An end with all its digits, as it would be typed. */
function endText(hz: number): string {
  return formatWhole(hz, 'Hz', 1).replace(/\u2009/g, ' ');
}
