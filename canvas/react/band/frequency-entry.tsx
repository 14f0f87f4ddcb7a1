'use client';

import { useState, type FormEvent } from 'react';
import { Button } from '@/components/button';
import { setOperatingFrequency } from '../../commands/looking-commands';
import { readFrequency } from '../../parts/read-values';
import { formatAngular, formatHertz } from '../figures/echo';
import { useCommands } from '../screen-context';
import { useSheet } from '../sheet-context';
import { EntryField } from './entry-field';

/** The operating frequency as typed, in hertz or radians a second; 0 is direct current. */
export function FrequencyEntry({ onDone }: { readonly onDone: () => void }) {
  const commands = useCommands();
  const current = useSheet((state) => state.document.operatingFrequency);
  const [text, setText] = useState(current);
  const read = readFrequency(text);

  const submit = (event: FormEvent) => {
    event.preventDefault();
    if (!read.ok) {
      commands.context().say(read.message);
      return;
    }
    setOperatingFrequency(commands.context(), text.trim());
    onDone();
  };

  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-2">
      <EntryField
        label="Operating frequency"
        text={text}
        onText={setText}
        fault={read.ok ? null : read.message}
        note={read.ok ? understood(read.value) : ''}
      />
      <div className="flex items-center justify-between gap-2">
        <span className="text-[12.5px] text-muted">In Hz, or with rad/s behind it</span>
        <Button type="submit" size="small" variant="primary">
          Set
        </Button>
      </div>
    </form>
  );
}

function understood(hz: number): string {
  return hz === 0 ? '0 Hz: direct current' : `${formatHertz(hz)} · ω ${formatAngular(hz)}`;
}
