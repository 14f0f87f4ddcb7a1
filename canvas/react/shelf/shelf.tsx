'use client';

import { Popover } from 'radix-ui';
import { useState } from 'react';
import { takePart } from '../../commands/drawing-commands';
import { SHELF_GROUPS, type ShelfGroup } from '../../parts/definition';
import { definitionOf, PART_KINDS, type PartKind } from '../../parts/registry';
import { PART_DRAG_TYPE } from '../drawing/drawing';
import { Symbol } from '../drawing/symbol';
import { useCommands } from '../screen-context';
import { useSheet } from '../sheet-context';

/** The sign of each group: the symbol of its first part. */
const SIGN: Readonly<Record<ShelfGroup, PartKind>> = {
  Resist: 'resistor',
  Store: 'capacitor',
  Drive: 'voltageSource',
  Join: 'reference',
};

/** Where parts are taken from: groups that fly out, each part taken with a press, a key or a drag. */
export function Shelf() {
  const mayEdit = useSheet((state) => state.mayEdit);
  const held = useSheet((state) => (state.tool.kind === 'place' ? state.tool.part : null));
  if (!mayEdit) return null;
  return (
    <nav aria-label="Shelf" className="shelf flex h-full w-16 flex-col items-stretch gap-1 border-r border-rule bg-raised px-1 py-3">
      {SHELF_GROUPS.map((group) => (
        <Group key={group} group={group} held={held} />
      ))}
      <WireButton />
    </nav>
  );
}

function WireButton() {
  const commands = useCommands();
  const wiring = useSheet((state) => state.tool.kind === 'wire');
  return (
    <button
      type="button"
      aria-pressed={wiring}
      title="Draw a wire (W)"
      onClick={() => {
        const now = commands.context();
        now.setTool(wiring ? { kind: 'select' } : { kind: 'wire', from: null, corners: [] });
        focusDrawing();
      }}
      className={tile(wiring)}
    >
      <svg viewBox="-22 -14 44 28" width={42} height={27} aria-hidden="true">
        <path d="M-18 8H0V-8H18" fill="none" stroke="currentColor" strokeWidth={1.75} strokeLinejoin="round" />
        <circle cx={-18} cy={8} r={3} className="fill-raised" stroke="currentColor" strokeWidth={1.5} />
        <circle cx={18} cy={-8} r={3} className="fill-raised" stroke="currentColor" strokeWidth={1.5} />
      </svg>
      <span>Wire</span>
    </button>
  );
}

/** Keys go to the drawing again, where what was taken from the Shelf is to be put. */
function focusDrawing(): void {
  document.querySelector<HTMLElement>('[data-drawing]')?.focus({ preventScroll: true });
}

function tile(active: boolean): string {
  return `flex w-full flex-col items-center gap-1 rounded-md border px-0.5 py-2 text-[11px] leading-tight ${
    active ? 'border-voltage bg-voltage/10 text-ink' : 'border-transparent text-muted hover:bg-paper hover:text-ink'
  }`;
}

function Group({ group, held }: { group: ShelfGroup; held: PartKind | null }) {
  const [open, setOpen] = useState(false);
  const kinds = PART_KINDS.filter((kind) => definitionOf(kind).group === group);
  const holding = held !== null && kinds.includes(held);
  return (
    <Popover.Root open={open} onOpenChange={setOpen}>
      <Popover.Trigger className={tile(open || holding)} data-shelf-group={group}>
        <PartPicture kind={SIGN[group]} />
        <span>{group}</span>
      </Popover.Trigger>
      <Popover.Portal>
        <Popover.Content
          side="right"
          align="start"
          sideOffset={6}
          collisionPadding={8}
          aria-label={`${group}: parts`}
          className="fade-in z-40 w-72 rounded-lg border border-rule bg-raised p-1.5 shadow-lg"
          onCloseAutoFocus={(event) => {
            event.preventDefault();
            focusDrawing();
          }}
        >
          {kinds.map((kind) => (
            <PartRow key={kind} kind={kind} held={kind === held} close={() => setOpen(false)} />
          ))}
        </Popover.Content>
      </Popover.Portal>
    </Popover.Root>
  );
}

function PartRow({ kind, held, close }: { kind: PartKind; held: boolean; close: () => void }) {
  const commands = useCommands();
  const definition = definitionOf(kind);
  return (
    <button
      type="button"
      draggable
      data-shelf-part={kind}
      aria-pressed={held}
      onClick={() => {
        const now = commands.context();
        takePart(now, kind);
        // Pressed with the pointer, the part follows the pointer.
        now.setCursor(null);
        close();
      }}
      onDragStart={(event) => {
        event.dataTransfer.setData(PART_DRAG_TYPE, kind);
        event.dataTransfer.effectAllowed = 'copy';
        // The ghost on the grid shows where it will land; the browser's own picture would cover it.
        event.dataTransfer.setDragImage(document.createElement('span'), 0, 0);
        const now = commands.context();
        takePart(now, kind);
        now.setCursor(null);
      }}
      onDragEnd={() => {
        const now = commands.context();
        if (now.tool.kind === 'place') now.setTool({ kind: 'select' });
        close();
      }}
      className="flex w-full items-center gap-3 rounded-md px-2 py-1.5 text-left text-ink hover:bg-paper"
    >
      <PartPicture kind={kind} />
      <span className="min-w-0 flex-1">
        <span className="block text-[13px] font-semibold">{definition.name}</span>
        <span className="block text-[12px] text-muted">{definition.about}</span>
      </span>
      <kbd className="rounded border border-rule px-1.5 font-mono text-[11px] text-muted uppercase">{definition.key}</kbd>
    </button>
  );
}

function PartPicture({ kind }: { kind: PartKind }) {
  const box = kind === 'reference' ? '-22 -4 44 34' : kind === 'voltageSource' || kind === 'currentSource' ? '-34 -32 68 54' : '-34 -20 68 40';
  return (
    <svg viewBox={box} width={44} height={28} aria-hidden="true" className="shrink-0">
      {kind === 'nodeName' ? (
        <>
          <rect x={-24} y={-17} width={48} height={20} rx={10} fill="none" stroke="currentColor" strokeWidth={1.75} />
          <path d="M0 4V18" stroke="currentColor" strokeWidth={1.75} strokeDasharray="2 3" />
          <text x={0} y={-7} dy="0.35em" textAnchor="middle" className="fill-current text-[12px]">
            out
          </text>
        </>
      ) : (
        <Symbol kind={kind} placement={{ turn: 0, mirrored: false }} />
      )}
    </svg>
  );
}
