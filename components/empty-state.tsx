import type { ReactNode } from 'react';
import { classNames } from './class-names';

export type EmptyStateProps = {
  readonly picture?: ReactNode;
  readonly title: string;
  /** What to do next, in a sentence. */
  readonly children: ReactNode;
  /** The button that does it. */
  readonly action?: ReactNode;
  readonly headingLevel?: 2 | 3;
  readonly className?: string;
};

/** Where nothing is yet: says what to do next and does it in one press. */
export function EmptyState({ picture, title, children, action, headingLevel = 2, className }: EmptyStateProps) {
  const Heading = headingLevel === 2 ? 'h2' : 'h3';
  return (
    <div className={classNames('flex flex-col items-center px-6 py-12 text-center', className)}>
      {picture !== undefined && <div className="mb-5">{picture}</div>}
      <Heading className="text-[17px] font-semibold text-balance">{title}</Heading>
      <p className="mt-1.5 max-w-[46ch] text-sm leading-normal text-pretty text-muted">{children}</p>
      {action !== undefined && <div className="mt-5 flex flex-wrap justify-center gap-2">{action}</div>}
    </div>
  );
}
