'use client';

import { Dialog } from '@/components/dialog';
import { Kbd } from '@/components/kbd';
import type { CommandGroup } from '../../commands/command';
import { commands } from '../../commands/registry';
import { useSheet, useSheetStore } from '../sheet-context';
import { isMac, keyWords } from './key-words';

const GROUPS: readonly CommandGroup[] = ['Draw', 'Edit', 'Arrange', 'Look', 'Drive', 'Sheet'];

const BY_POINTER = [
  ['Press a pin, then another', 'Draw a wire; a press in the open makes a corner'],
  ['Drag from a pin', 'Draw a wire in one go; end it on a pin or on a wire'],
  ['Drag across the open', 'Select everything in the box'],
  ['Shift and press', 'Add to what is selected, or take away'],
  ['Double press on a part', 'Edit its value'],
  ['Wheel or two fingers', 'Move the drawing; with Ctrl, or pinching, zoom'],
  ['Middle or right button, dragged', 'Move the drawing'],
] as const;

type Line = { readonly name: string; readonly keys: readonly string[] };

/** A line for each command of a group that has a key; commands that are listed together share one. */
function linesOf(group: CommandGroup): readonly Line[] {
  const lines = new Map<string, Line>();
  for (const { name, listedAs = name, keys, group: of } of commands) {
    if (of !== group || keys.length === 0) continue;
    lines.set(listedAs, { name: listedAs, keys: [...(lines.get(listedAs)?.keys ?? []), ...keys] });
  }
  return [...lines.values()];
}

/** Every key, from the same records that run them. */
export function KeysDialog() {
  const store = useSheetStore();
  const open = useSheet((state) => state.panel === 'keys');
  const onMac = isMac();
  return (
    <Dialog open={open} onClose={() => store.getState().setPanel(null)} title="Keys" width="wide">
      <div className="grid gap-x-8 gap-y-5 sm:grid-cols-2">
        {GROUPS.map((group) => (
          <section key={group}>
            <h3 className="mb-1.5 text-[13px] font-semibold text-muted">{group}</h3>
            <dl className="space-y-1">
              {linesOf(group).map(({ name, keys }) => (
                <div key={name} className="flex items-baseline justify-between gap-3 text-[13px]">
                  <dt>{name}</dt>
                  <dd className="flex shrink-0 flex-wrap justify-end gap-1.5">
                    {keys.map((key) => (
                      <Kbd key={key}>{keyWords(key, onMac)}</Kbd>
                    ))}
                  </dd>
                </div>
              ))}
            </dl>
          </section>
        ))}
        <section>
          <h3 className="mb-1.5 text-[13px] font-semibold text-muted">By pointer</h3>
          <dl className="space-y-1.5 text-[13px]">
            {BY_POINTER.map(([hand, does]) => (
              <div key={hand}>
                <dt className="font-medium">{hand}</dt>
                <dd className="text-muted">{does}</dd>
              </div>
            ))}
          </dl>
        </section>
      </div>
    </Dialog>
  );
}
