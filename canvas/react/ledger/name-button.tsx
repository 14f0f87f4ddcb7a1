'use client';

import { useCommands } from '../screen-context';
import { showOnDrawing, type Place } from './show-on-drawing';

/** A name that is pressed to select what it stands for, and to bring it into view. */
export function NameButton({ name, place }: { readonly name: string; readonly place: Place }) {
  const commands = useCommands();
  return (
    <button
      type="button"
      onClick={() => showOnDrawing(commands.context(), place)}
      className="inline-flex h-6 min-w-9 cursor-pointer items-center justify-center rounded-[5px] border border-rule bg-raised px-1.5 text-[12.5px] font-medium text-ink hover:border-edge hover:bg-sunken"
    >
      {name}
    </button>
  );
}
