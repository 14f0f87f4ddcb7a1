'use client';

import { ChevronDown } from 'lucide-react';
import { useId, type ReactNode } from 'react';
import { classNames } from '@/components/class-names';
import { setFolded, useFolded } from './fold-store';

export type LedgerSectionProps = {
  /** What the fold state is kept under; unique in the Ledger. */
  readonly name: string;
  readonly title: string;
  /** A few words at the right of the heading. */
  readonly aside?: ReactNode;
  readonly children: ReactNode;
};

/** A section of the Ledger. Its content is not there while it is folded, so that nothing is computed for it. */
export function LedgerSection({ name, title, aside, children }: LedgerSectionProps) {
  const folded = useFolded(name);
  const id = useId();
  return (
    <section aria-labelledby={`${id}-title`} className="border-b border-rule py-1.5 pr-2.5 pl-4 last:border-b-0">
      <h2>
        <button
          type="button"
          aria-expanded={!folded}
          aria-controls={`${id}-content`}
          onClick={() => setFolded(name, !folded)}
          className="flex h-8 w-full cursor-pointer items-center gap-2 rounded-[5px] text-left"
        >
          <ChevronDown
            size={15}
            strokeWidth={1.75}
            aria-hidden="true"
            className={classNames('shrink-0 text-muted transition-transform duration-[120ms]', folded && '-rotate-90')}
          />
          <span id={`${id}-title`} className="shrink-0 text-sm font-semibold text-ink">
            {title}
          </span>
          <span className="min-w-0 flex-1 truncate text-right text-[13px] text-muted">{aside}</span>
        </button>
      </h2>
      <div id={`${id}-content`} hidden={folded} className={folded ? undefined : 'pb-2.5'}>
        {!folded && children}
      </div>
    </section>
  );
}
