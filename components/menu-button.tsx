'use client';

import { useRef, useState, type ComponentType, type ReactNode } from 'react';
import type { MenuProps } from './menu';
import type { MenuEntry } from './menu-entry';

export type MenuButtonProps = {
  /** The button's accessible name, and the menu's. */
  readonly label: string;
  /** What stands on the button. */
  readonly children: ReactNode;
  readonly entries: readonly MenuEntry[];
  readonly align?: 'start' | 'center' | 'end';
  /** Where the focus goes on closing, when not back to the button: call `event.preventDefault()` and focus it. */
  readonly onCloseFocus?: (event: Event) => void;
  readonly className?: string;
};

let loaded: ComponentType<MenuProps> | undefined;

async function load(): Promise<ComponentType<MenuProps>> {
  loaded ??= (await import('./menu')).Menu;
  return loaded;
}

/**
 * A button whose menu is fetched when a hand or the focus first comes near it: for pages that should be read long
 * before anything on them is chosen from a menu. On a page that works with menus from the start, take `Menu`.
 */
export function MenuButton({ label, children, entries, align = 'end', onCloseFocus, className }: MenuButtonProps) {
  const button = useRef<HTMLButtonElement>(null);
  const pressedOpen = useRef(false);
  const [Menu, setMenu] = useState<ComponentType<MenuProps> | undefined>(() => loaded);
  const [open, setOpen] = useState(false);
  const prepare = (): void => {
    if (Menu === undefined) void load().then((found) => setMenu(() => found));
  };

  return (
    <span className="relative inline-flex">
      <button
        ref={button}
        type="button"
        aria-label={label}
        aria-haspopup="menu"
        aria-expanded={open}
        data-state={open ? 'open' : 'closed'}
        onPointerEnter={prepare}
        onFocus={prepare}
        onPointerDown={() => {
          pressedOpen.current = open;
        }}
        onClick={() => {
          prepare();
          // An open menu closes as the pointer goes down beside it, so on this button too; the press ends there.
          setOpen(!pressedOpen.current);
          pressedOpen.current = false;
        }}
        onKeyDown={(event) => {
          if (event.key !== 'ArrowDown') return;
          event.preventDefault();
          event.stopPropagation();
          prepare();
          setOpen(true);
        }}
        className={className}
      >
        {children}
      </button>
      {Menu !== undefined && (
        <Menu
          label={label}
          entries={entries}
          align={align}
          open={open}
          onOpenChange={setOpen}
          onCloseFocus={(event) => {
            onCloseFocus?.(event);
            if (event.defaultPrevented) return;
            event.preventDefault();
            button.current?.focus();
          }}
          // What the menu is laid out by; the button itself was there before the menu's code.
          trigger={<span aria-hidden="true" className="pointer-events-none absolute inset-0" />}
        />
      )}
    </span>
  );
}
