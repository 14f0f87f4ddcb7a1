'use client';

import { useId, useState, type KeyboardEvent } from 'react';
import { Dialog } from '@/components/dialog';
import { Kbd } from '@/components/kbd';
import type { Command } from '../../commands/command';
import { commands, mayRun } from '../../commands/registry';
import { useCommands } from '../screen-context';
import { useSheet, useSheetStore } from '../sheet-context';
import { isMac, keyWords } from './key-words';

/** Every command that can run now, found by typing: a name for everything, and a way to it without its key. */
export function CommandList() {
  const store = useSheetStore();
  const open = useSheet((state) => state.panel === 'commands');
  return (
    <Dialog open={open} onClose={() => store.getState().setPanel(null)} title="Commands">
      <Choice close={() => store.getState().setPanel(null)} />
    </Dialog>
  );
}

function Choice({ close }: { close: () => void }) {
  const { context, run } = useCommands();
  const [text, setText] = useState('');
  const [chosen, setChosen] = useState(0);
  const id = useId();
  const onMac = isMac();
  const now = context();
  const wanted = text.trim().toLowerCase().split(/\s+/);
  const found = commands.filter(
    (command) =>
      !command.id.startsWith('cursor.') &&
      command.id !== 'sheet.commands' &&
      mayRun(command, now) &&
      wanted.every((word) => command.name.toLowerCase().includes(word)),
  );
  const at = Math.min(chosen, found.length - 1);
  const start = (command: Command | undefined) => {
    if (!command) return;
    close();
    // After the dialog has given the focus back: the command may want it elsewhere.
    queueMicrotask(() => run(command));
  };
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.key === 'ArrowDown') setChosen(Math.min(found.length - 1, at + 1));
    else if (event.key === 'ArrowUp') setChosen(Math.max(0, at - 1));
    else if (event.key === 'Enter') start(found[at]);
    else return;
    event.preventDefault();
  };
  return (
    <div>
      <input
        value={text}
        onChange={(event) => {
          setText(event.target.value);
          setChosen(0);
        }}
        onKeyDown={onKeyDown}
        role="combobox"
        aria-expanded="true"
        aria-controls={id}
        aria-activedescendant={found[at] ? `${id}-${found[at].id}` : undefined}
        aria-label="Find a command"
        placeholder="Type what you want to do"
        data-autofocus=""
        className="h-10 w-full rounded-md border border-rule bg-paper px-3 text-[14px]"
      />
      <ul id={id} role="listbox" aria-label="Commands" className="mt-2 max-h-80 overflow-y-auto">
        {found.map((command, index) => (
          <li
            key={command.id}
            id={`${id}-${command.id}`}
            role="option"
            aria-selected={index === at}
            ref={(element) => {
              if (index === at) element?.scrollIntoView({ block: 'nearest' });
            }}
            onPointerMove={() => setChosen(index)}
            onClick={() => start(command)}
            className={`flex cursor-pointer items-center justify-between gap-3 rounded-md px-2.5 py-1.5 text-[13px] ${index === at ? 'bg-voltage/10' : ''}`}
          >
            <span>{command.name}</span>
            {command.keys[0] !== undefined && <Kbd>{keyWords(command.keys[0], onMac)}</Kbd>}
          </li>
        ))}
        {found.length === 0 && <li className="px-2.5 py-3 text-[13px] text-muted">No command is called that.</li>}
      </ul>
    </div>
  );
}
