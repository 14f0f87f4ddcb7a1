import type { ReactNode } from 'react';
import { classNames } from '@/components/class-names';

export type HouseFrameProps = {
  readonly masthead: ReactNode;
  /** `list` for rows with figures, `text` for reading and forms. */
  readonly width?: 'list' | 'text';
  readonly children: ReactNode;
};

/** The layout of every page but the open sheet, which the skeletons share with the pages. */
export function HouseFrame({ masthead, width = 'list', children }: HouseFrameProps) {
  return (
    <div className="flex min-h-dvh flex-col">
      <a
        href="#content"
        className="sr-only z-50 rounded-md bg-ink px-3 py-2 text-sm text-paper focus:not-sr-only focus:fixed focus:top-2 focus:left-2"
      >
        Skip to the content
      </a>
      {masthead}
      <main
        id="content"
        tabIndex={-1}
        className={classNames(
          'mx-auto w-full flex-1 px-4 pt-7 pb-20 outline-none sm:px-8 sm:pt-9',
          width === 'list' ? 'max-w-[1180px]' : 'max-w-[820px]',
        )}
      >
        {children}
      </main>
    </div>
  );
}
