'use client';

import { partsById } from '../../document/lookup';
import type { Selection } from '../../document/selection';
import type { Part } from '../../document/types';
import { compareNames } from '../../network/reading-rows';
import { definitionOf, PART_KINDS } from '../../parts/registry';
import { useSheet } from '../sheet-context';
import { NameButton } from './name-button';

const MOST_NAMES = 40;

/** Several things: how many of each kind, and their names to go to one of them. */
export function SeveralPanel({ selection }: { readonly selection: Selection }) {
  const byId = useSheet((state) => partsById(state.document));
  const parts = [...selection.parts].flatMap((id) => byId.get(id) ?? []);
  const named = parts
    .filter(({ designator }) => designator !== '')
    .sort((a, b) => compareNames(a.designator, b.designator));
  return (
    <div className="flex flex-col gap-2">
      <p className="text-[13px] leading-[18px] text-muted">{countWords(parts, selection.wires.size)}</p>
      {named.length > 0 && (
        <div className="flex flex-wrap gap-1" role="group" aria-label="Selected parts">
          {named.slice(0, MOST_NAMES).map((part) => (
            <NameButton key={part.id} name={part.designator} place={{ parts: [part.id] }} />
          ))}
          {named.length > MOST_NAMES && (
            <span className="self-center text-[13px] text-muted">and {named.length - MOST_NAMES} more</span>
          )}
        </div>
      )}
    </div>
  );
}

function countWords(parts: readonly Part[], wires: number): string {
  const counts = PART_KINDS.flatMap((kind) => {
    const count = parts.filter((part) => part.kind === kind).length;
    return count === 0 ? [] : [plural(count, definitionOf(kind).name.toLowerCase())];
  });
  if (wires > 0) counts.push(plural(wires, 'wire'));
  return counts.join(', ');
}

/** A count with its noun: `1 wire`, `3 wires`. */
export function plural(count: number, noun: string): string {
  return `${count} ${noun}${count === 1 ? '' : 's'}`;
}
