'use client';

import { Tooltip as Primitive } from 'radix-ui';
import type { ReactElement, ReactNode } from 'react';
import { Kbd } from './kbd';

export type TooltipProps = {
  readonly label: ReactNode;
  /** A key or chord that does the same, such as `Ctrl Z`. */
  readonly shortcut?: string;
  readonly side?: 'top' | 'right' | 'bottom' | 'left';
  /** One element that takes a ref and pointer events. */
  readonly children: ReactElement;
};

/** Stands once around a page: makes neighbouring tooltips follow each other without the first one's wait. */
export function TooltipProvider({ children }: { readonly children: ReactNode }) {
  return (
    <Primitive.Provider delayDuration={450} skipDelayDuration={250}>
      {children}
    </Primitive.Provider>
  );
}

/** Words for something shown without them. Never the only carrier of a name: the element keeps its own label. */
export function Tooltip({ label, shortcut, side = 'bottom', children }: TooltipProps) {
  return (
    <Primitive.Root>
      <Primitive.Trigger asChild>{children}</Primitive.Trigger>
      <Primitive.Portal>
        <Primitive.Content
          side={side}
          sideOffset={6}
          collisionPadding={8}
          className="fade-in z-50 flex max-w-72 items-center gap-2 rounded-md bg-ink px-2.5 py-1.5 text-[13px] leading-snug text-paper shadow-float"
        >
          {label}
          {shortcut !== undefined && <Kbd tone="inverse">{shortcut}</Kbd>}
        </Primitive.Content>
      </Primitive.Portal>
    </Primitive.Root>
  );
}
