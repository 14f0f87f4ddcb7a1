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
              {commands
                .filter((command) => command.group === group && command.keys.length > 0)
                .map((command) => (
                  <div key={command.id} className="flex items-baseline justify-between gap-3 text-[13px]">
                    <dt>{command.name}</dt>
                    <dd className="flex shrink-0 gap-1.5">
                      {command.keys.map((key) => (
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
