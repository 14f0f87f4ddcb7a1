'use client';

import { commandById } from '../../commands/registry';
import { useCommands } from '../screen-context';
import { useSheet } from '../sheet-context';

const FIRST_STEPS = [
  { command: 'take.voltageSource', words: 'Take a voltage source', key: 'V' },
  { command: 'take.resistor', words: 'Take a resistor', key: 'R' },
  { command: 'wire.start', words: 'Draw a wire', key: 'W' },
  { command: 'sheet.keys', words: 'See all keys', key: '?' },
] as const;

/** What an empty sheet says: where to begin, and does it in one press. */
export function EmptySheet() {
  const empty = useSheet((state) => state.document.parts.length === 0 && state.tool.kind === 'select');
  const mayEdit = useSheet((state) => state.mayEdit);
  const commands = useCommands();
  if (!empty) return null;
  return (
    <section className="pointer-events-none absolute inset-0 z-10 grid place-items-center p-6">
      <div className="max-w-sm text-center">
        <h2 className="text-[17px] font-semibold">An empty sheet</h2>
        <p className="mt-1 text-[14px] text-muted">
          {mayEdit
            ? 'Drag parts from the Shelf, or take them with a key. Press a pin to start a wire. Give one node the reference mark, and readings appear as you draw.'
            : 'Nothing has been drawn here yet.'}
        </p>
        {mayEdit && (
          <ul className="pointer-events-auto mt-4 grid grid-cols-2 gap-2 text-[13px]">
            {FIRST_STEPS.map(({ command, words, key }) => (
              <li key={command}>
                <button
                  type="button"
                  className="flex w-full items-center justify-between gap-2 rounded-md border border-rule bg-raised px-3 py-2 hover:border-muted"
                  onClick={() => {
                    const found = commandById(command);
                    if (found) commands.run(found);
                    document.querySelector<HTMLElement>('[data-drawing]')?.focus();
                  }}
                >
                  {words}
                  <kbd className="rounded border border-rule px-1.5 font-mono text-[11px] text-muted">{key}</kbd>
                </button>
              </li>
            ))}
          </ul>
        )}
      </div>
    </section>
  );
}
