import type { ReactNode } from 'react';
import { classNames } from './class-names';

export type MastheadProps = {
  /** At the left: the mark, where one is, the state of the work. */
  readonly children: ReactNode;
  /** At the right: people, actions. */
  readonly actions?: ReactNode;
  readonly className?: string;
};

/** The 48 px strip at the top of every page: the page's one banner. */
export function Masthead({ children, actions, className }: MastheadProps) {
  return (
    <header
      className={classNames(
        'flex h-12 shrink-0 items-center gap-3 border-b border-rule bg-raised pr-3 pl-3 sm:pr-4 sm:pl-4',
        className,
      )}
    >
      <div className="flex min-w-0 flex-1 items-center gap-3">{children}</div>
      {actions !== undefined && <div className="flex shrink-0 items-center gap-1.5">{actions}</div>}
    </header>
  );
}
