'use client';

import { useEffect, useRef, useState } from 'react';
import { Checkbox } from '@/components/checkbox';
import { TextArea } from '@/components/text-area';
import type { Showing } from '../../commands/command';
import { MAX_PURPOSE } from '../../document/limits';
import type { Convention } from '../../document/types';
import { Segmented } from '../figures/segmented';
import { useSheet, useSheetStore } from '../sheet-context';
import { plural } from './several-panel';

/** Nothing is selected: the sheet itself, what it is for, and how it is read. */
export function SheetPanel() {
  return (
    <div className="flex flex-col gap-3">
      <Purpose />
      <ConventionSwitches />
      <ShowingSwitches />
      <Counts />
    </div>
  );
}

function Purpose() {
  const store = useSheetStore();
  const purpose = useSheet((state) => state.document.purpose);
  const mayEdit = useSheet((state) => state.mayEdit);
  const [draft, setDraft] = useState<string | null>(null);

  const commit = () => {
    const { document, apply } = store.getState();
    if (draft !== null && draft !== document.purpose) {
      apply({ label: 'Change the purpose', document: { ...document, purpose: draft } });
    }
    setDraft(null);
  };
  const leaving = useRef<() => void>(() => {});
  useEffect(() => {
    leaving.current = commit;
  });
  // Selecting a part takes this field away, perhaps without leaving it first.
  useEffect(() => () => leaving.current(), []);

  if (!mayEdit) {
    return <p className="text-[13px] leading-[19px] whitespace-pre-line text-ink">{purpose === '' ? 'No purpose is given.' : purpose}</p>;
  }
  const text = draft ?? purpose;
  const nearEnd = MAX_PURPOSE - text.length <= 200;
  return (
    <TextArea
      label="Purpose"
      value={text}
      rows={5}
      maxLength={MAX_PURPOSE}
      placeholder="What the network is for, what drives it, what it must reach."
      hint={nearEnd ? `${MAX_PURPOSE - text.length} characters left.` : undefined}
      onChange={(event) => setDraft(event.target.value)}
      onBlur={commit}
      onKeyDown={(event) => {
        if (event.key !== 'Escape' || draft === null) return;
        event.stopPropagation();
        setDraft(null);
      }}
    />
  );
}

const AMPLITUDES = [
  { value: 'rms', label: 'rms' },
  { value: 'peak', label: 'peak' },
] as const;
const FORMS = [
  { value: 'polar', label: 'polar' },
  { value: 'rectangular', label: 'rectangular' },
] as const;

function ConventionSwitches() {
  const store = useSheetStore();
  const convention = useSheet((state) => state.document.convention);
  const set = (change: Partial<Convention>, label: string) => {
    const { document, apply } = store.getState();
    apply({ label, document: { ...document, convention: { ...document.convention, ...change } } });
  };
  return (
    <div className="flex items-center justify-between gap-2">
      <Segmented
        label="Amplitude of readings"
        options={AMPLITUDES}
        value={convention.amplitude}
        onValueChange={(amplitude) => set({ amplitude }, `Show readings as ${amplitude}`)}
      />
      <Segmented
        label="Form of readings"
        options={FORMS}
        value={convention.form}
        onValueChange={(form) => set({ form }, `Show readings in ${form} form`)}
      />
    </div>
  );
}

const SHOWN: readonly { readonly which: keyof Showing; readonly label: string }[] = [
  { which: 'currents', label: 'Currents' },
  { which: 'voltages', label: 'Voltages' },
  { which: 'powers', label: 'Powers' },
  { which: 'nodes', label: 'Node voltages' },
];

function ShowingSwitches() {
  const showing = useSheet((state) => state.showing);
  const setShowing = useSheet((state) => state.setShowing);
  return (
    <fieldset>
      <legend className="mb-0.5 text-[13px] text-muted">On the drawing</legend>
      <div className="grid grid-cols-2">
        {SHOWN.map(({ which, label }) => (
          <Checkbox
            key={which}
            label={label}
            checked={showing[which]}
            onCheckedChange={(shown) => setShowing({ ...showing, [which]: shown })}
          />
        ))}
      </div>
    </fieldset>
  );
}

function Counts() {
  const parts = useSheet((state) => state.readings.network.list.elements.length);
  const nodes = useSheet((state) => state.readings.network.nodes.all.length);
  const wires = useSheet((state) => state.document.wires.length);
  return (
    <p className="text-[13px] text-muted">
      {[plural(parts, 'part'), plural(wires, 'wire'), plural(nodes, 'node')].join(' · ')}
    </p>
  );
}
