'use client';

import { ArrowDown, ArrowUp } from 'lucide-react';
import { memo, useCallback, useDeferredValue, useMemo, useRef, useState, type KeyboardEvent } from 'react';
import { classNames } from '@/components/class-names';
import type { ReadingConvention } from '../../network/format-reading';
import type { ReadingOrder, ReadingQuantity } from '../../network/reading-rows';
import { Dial } from '../figures/dial';
import { useCommands } from '../screen-context';
import { useSheetStore } from '../sheet-context';
import { figureTones, type FigureTone } from './figure-line';
import type { ReadingLine } from './reading-lines';
import { showOnDrawing } from './show-on-drawing';
import { useRowsInSight } from './use-rows-in-sight';

const TONES: Readonly<Record<ReadingQuantity, FigureTone>> = {
  current: 'current',
  voltage: 'voltage',
  power: 'power',
  node: 'voltage',
};

const CAPTIONS: Readonly<Record<ReadingQuantity, string>> = {
  current: 'Current of each part',
  voltage: 'Voltage of each part',
  power: 'Active and reactive power of each part',
  node: 'Voltage of each node',
};

export type ReadingsTableProps = {
  readonly lines: readonly ReadingLine[];
  readonly quantity: ReadingQuantity;
  readonly convention: ReadingConvention;
  readonly order: ReadingOrder;
  readonly onOrder: (order: ReadingOrder) => void;
  readonly selected: ReadonlySet<string>;
};

/*
 * A table whose rows are grids: a row off screen then costs nothing (`content-visibility` does not apply to table
 * rows), and columns of fixed width make no row wait for the widest. The roles are spelt out because a changed
 * `display` takes a table's own away in some browsers.
 */
export function ReadingsTable({ lines, quantity, convention, order, onOrder, selected }: ReadingsTableProps) {
  const store = useSheetStore();
  const commands = useCommands();
  const [active, setActive] = useState<string | null>(null);
  const tabbable = lines.some(({ id }) => id === active) ? active : lines[0]?.id;

  // What is in sight changes within the frame of an edit; the other rows follow when there is time.
  const body = useRef<HTMLTableSectionElement>(null);
  const { from, to } = useRowsInSight(body, ROW_HEIGHT_PX);
  const later = useDeferredValue(lines);
  const laterById = useMemo(() => new Map(later.map((line) => [line.id, line])), [later]);
  const shown = lines.map((line, place) => (place >= from && place < to ? line : (laterById.get(line.id) ?? line)));

  const onPress = useCallback(
    (id: string) => {
      if (quantity !== 'node') return showOnDrawing(commands.context(), { parts: [id] });
      const node = store.getState().readings.network.nodes.byName.get(id);
      if (node) showOnDrawing(commands.context(), { parts: [], wires: node.wires, pins: node.pins });
    },
    [commands, store, quantity],
  );

  return (
    <table role="table" className="block w-full text-[13px]">
      <caption className="sr-only">{CAPTIONS[quantity]}</caption>
      <thead role="rowgroup" className="block border-b border-rule">
        <HeadRow quantity={quantity} convention={convention} order={order} onOrder={onOrder} />
      </thead>
      <tbody ref={body} role="rowgroup" className="block" onKeyDown={moveFocus}>
        {shown.map((line) => (
          <Row
            key={line.id}
            id={line.id}
            name={line.name}
            degrees={line.degrees}
            length={line.length}
            first={line.first}
            second={line.second}
            tone={TONES[quantity]}
            isSelected={quantity !== 'node' && selected.has(line.id)}
            isTabbable={line.id === tabbable}
            onPress={onPress}
            onActive={setActive}
          />
        ))}
      </tbody>
    </table>
  );
}

/** Arrow keys go from line to line; one Tab goes past the table. */
function moveFocus(event: KeyboardEvent<HTMLElement>) {
  const steps: Readonly<Record<string, 'previous' | 'next' | 'first' | 'last'>> = {
    ArrowUp: 'previous',
    ArrowDown: 'next',
    Home: 'first',
    End: 'last',
  };
  const step = steps[event.key];
  if (step === undefined) return;
  event.preventDefault();
  event.stopPropagation();
  const buttons = [...event.currentTarget.querySelectorAll('button')];
  const at = buttons.findIndex((button) => button === document.activeElement);
  const target = { previous: Math.max(0, at - 1), next: Math.min(buttons.length - 1, at + 1), first: 0, last: buttons.length - 1 }[step];
  buttons[target]?.focus();
}

/** As the rows' class has it. */
const ROW_HEIGHT_PX = 26;

/** Columns: the name takes what is left; figures have their places, whatever they are. */
const TWO_FIGURES = 'grid grid-cols-[minmax(0,1fr)_86px_86px] items-center';
const ONE_FIGURE = 'grid grid-cols-[minmax(0,1fr)_auto] items-center';

type HeadRowProps = Pick<ReadingsTableProps, 'quantity' | 'convention' | 'order' | 'onOrder'>;

function HeadRow({ quantity, convention, order, onOrder }: HeadRowProps) {
  const sort = (by: ReadingOrder['by']) =>
    // A first press on figures brings the largest to the top.
    onOrder(order.by === by ? { by, descending: !order.descending } : { by, descending: by !== 'name' });
  const ofParts = quantity !== 'node';
  const head = (by: ReadingOrder['by'], label: string) => (
    <SortButton key={by} label={label} state={order.by === by ? (order.descending ? 'descending' : 'ascending') : null} onPress={() => sort(by)} />
  );
  const sorted = (...keys: readonly ReadingOrder['by'][]) =>
    keys.includes(order.by) ? (order.descending ? 'descending' : 'ascending') : undefined;

  const nameHead = (
    <th role="columnheader" scope="col" aria-sort={sorted('name')} className="text-left font-normal">
      {head('name', ofParts ? 'Part' : 'Node')}
    </th>
  );
  if (convention === 'direct') {
    return (
      <tr role="row" className={ONE_FIGURE}>
        {nameHead}
        <th role="columnheader" scope="col" aria-sort={sorted('first')} className="text-right font-normal">
          {head('first', quantity === 'power' ? 'Power' : 'Value')}
        </th>
      </tr>
    );
  }
  if (quantity !== 'power' && convention.form === 'rectangular') {
    return (
      <tr role="row" className={ONE_FIGURE}>
        {nameHead}
        <th role="columnheader" scope="col" aria-sort={sorted('first', 'second')} className="flex justify-end gap-2 font-normal">
          {head('first', 'Magnitude')}
          {head('second', 'Angle')}
        </th>
      </tr>
    );
  }
  return (
    <tr role="row" className={TWO_FIGURES}>
      {nameHead}
      <th role="columnheader" scope="col" aria-sort={sorted('first')} className="text-right font-normal">
        {head('first', quantity === 'power' ? 'Active' : 'Magnitude')}
      </th>
      <th role="columnheader" scope="col" aria-sort={sorted('second')} className="text-right font-normal">
        {head('second', quantity === 'power' ? 'Reactive' : 'Angle')}
      </th>
    </tr>
  );
}

type SortButtonProps = {
  readonly label: string;
  readonly state: 'ascending' | 'descending' | null;
  readonly onPress: () => void;
};

function SortButton({ label, state, onPress }: SortButtonProps) {
  const Arrow = state === 'descending' ? ArrowDown : ArrowUp;
  return (
    <button
      type="button"
      onClick={onPress}
      title={`Sort by ${label.toLowerCase()}`}
      className={classNames(
        'inline-flex h-6 cursor-pointer items-center gap-0.5 rounded-[5px] text-[12px] hover:text-ink',
        state === null ? 'text-muted' : 'font-medium text-ink',
      )}
    >
      <Arrow size={12} strokeWidth={2} aria-hidden="true" className={state === null ? 'invisible' : undefined} />
      {label}
    </button>
  );
}

type RowProps = ReadingLine & {
  readonly tone: FigureTone;
  readonly isSelected: boolean;
  readonly isTabbable: boolean;
  readonly onPress: (id: string) => void;
  readonly onActive: (id: string) => void;
};

const Row = memo(function Row({
  id,
  name,
  degrees,
  length,
  first,
  second,
  tone,
  isSelected,
  isTabbable,
  onPress,
  onActive,
}: RowProps) {
  const figure = classNames('text-right font-mono whitespace-nowrap tabular-nums', length === null ? 'text-muted' : figureTones[tone]);
  return (
    <tr
      role="row"
      className={classNames(
        'relative h-[26px] rounded-[5px] [contain-intrinsic-size:auto_26px] [content-visibility:auto]',
        'has-focus-visible:outline-2 has-focus-visible:-outline-offset-2 has-focus-visible:outline-voltage',
        second === null ? ONE_FIGURE : TWO_FIGURES,
        isSelected ? 'bg-voltage/10' : 'hover:bg-wash',
      )}
    >
      <th role="rowheader" scope="row" className="flex min-w-0 items-center gap-2.5 text-left font-medium">
        <span className={figureTones[tone]}>
          <Dial degrees={degrees} length={length} />
        </span>
        <button
          type="button"
          tabIndex={isTabbable ? 0 : -1}
          aria-current={isSelected || undefined}
          onClick={() => onPress(id)}
          onFocus={() => onActive(id)}
          className="min-w-0 cursor-pointer truncate text-ink outline-none after:absolute after:inset-0 focus-visible:outline-none"
        >
          {name}
        </button>
      </th>
      <td role="cell" className={figure}>
        {length === null ? <Undetermined /> : first}
      </td>
      {second !== null && (
        <td role="cell" className={figure}>
          {second}
        </td>
      )}
    </tr>
  );
});

function Undetermined() {
  return (
    <>
      <span aria-hidden="true">{'\u2014'}</span>
      <span className="sr-only">not determined</span>
    </>
  );
}
