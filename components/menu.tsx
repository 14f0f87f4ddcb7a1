'use client';

import { Check } from 'lucide-react';
import { DropdownMenu as Primitive } from 'radix-ui';
import type { ReactElement } from 'react';
import { classNames } from './class-names';
import { Kbd } from './kbd';
import type { MenuEntry } from './menu-entry';
import { menuFrame, menuHeading, menuItem, menuSeparator } from './menu-style';

export type MenuProps = {
  /** The button that opens it; one element that takes a ref. */
  readonly trigger: ReactElement;
  readonly label: string;
  readonly entries: readonly MenuEntry[];
  readonly align?: 'start' | 'center' | 'end';
  readonly side?: 'top' | 'right' | 'bottom' | 'left';
  readonly open?: boolean;
  readonly onOpenChange?: (open: boolean) => void;
  /** Where the focus goes on closing, when not back to the trigger: call `event.preventDefault()` and focus it. */
  readonly onCloseFocus?: (event: Event) => void;
};

/** A button's menu. Not modal: the page behind it keeps scrolling, and nothing is injected into the document. */
export function Menu({ trigger, label, entries, align = 'end', side = 'bottom', open, onOpenChange, onCloseFocus }: MenuProps) {
  return (
    <Primitive.Root modal={false} open={open} onOpenChange={onOpenChange}>
      <Primitive.Trigger asChild>{trigger}</Primitive.Trigger>
      <Primitive.Portal>
        <Primitive.Content
          aria-label={label}
          // Else it would be named by the trigger, which may be only the place that it is laid out by.
          aria-labelledby={undefined}
          align={align}
          side={side}
          sideOffset={4}
          collisionPadding={8}
          loop
          onCloseAutoFocus={onCloseFocus}
          onKeyDown={(event) => event.stopPropagation()}
          className={menuFrame}
        >
          {entries.map((entry, index) => (
            <Entry key={keyOf(entry, index)} entry={entry} />
          ))}
        </Primitive.Content>
      </Primitive.Portal>
    </Primitive.Root>
  );
}

function Entry({ entry }: { readonly entry: MenuEntry }) {
  switch (entry.kind) {
    case 'separator':
      return <Primitive.Separator className={menuSeparator} />;
    case 'heading':
      return <Primitive.Label className={menuHeading}>{entry.label}</Primitive.Label>;
    case 'item':
      return (
        <Primitive.Item
          disabled={entry.disabled}
          onSelect={entry.onSelect}
          className={classNames(menuItem, entry.danger === true && 'text-falls')}
        >
          {entry.icon}
          <span className="min-w-0 flex-1">{entry.label}</span>
          {entry.shortcut !== undefined && <Kbd>{entry.shortcut}</Kbd>}
        </Primitive.Item>
      );
    case 'link':
      return (
        <Primitive.Item asChild className={menuItem}>
          <a href={entry.href} download={entry.download === true ? '' : undefined}>
            {entry.icon}
            <span className="min-w-0 flex-1">{entry.label}</span>
          </a>
        </Primitive.Item>
      );
    case 'switch':
      return (
        <Primitive.CheckboxItem
          checked={entry.checked}
          onCheckedChange={entry.onCheckedChange}
          className={classNames(menuItem, 'relative pl-8')}
        >
          <Ticked />
          {entry.label}
        </Primitive.CheckboxItem>
      );
    case 'choice':
      return (
        <Primitive.RadioGroup value={entry.value} onValueChange={entry.onValueChange} aria-label={entry.label}>
          <Primitive.Label className={menuHeading}>{entry.label}</Primitive.Label>
          {entry.options.map((option) => (
            <Primitive.RadioItem key={option.value} value={option.value} className={classNames(menuItem, 'relative pl-8')}>
              <Ticked />
              {option.label}
            </Primitive.RadioItem>
          ))}
        </Primitive.RadioGroup>
      );
  }
}

function Ticked() {
  return (
    <Primitive.ItemIndicator className="absolute left-2.5">
      <Check size={15} strokeWidth={2} aria-hidden="true" className="text-holds" />
    </Primitive.ItemIndicator>
  );
}

function keyOf(entry: MenuEntry, index: number): string {
  return entry.kind === 'separator' ? `separator-${index}` : `${entry.kind}-${entry.label}`;
}
