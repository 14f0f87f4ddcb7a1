import type { ReactNode } from 'react';

/** The title of a page, and beside it what can be begun there. */
export function PageHeading({ title, children }: { readonly title: string; readonly children?: ReactNode }) {
  return (
    <div className="mb-5 flex min-h-9 flex-wrap items-center justify-between gap-x-6 gap-y-3">
      <h1 className="text-[26px] leading-8 font-semibold tracking-[-0.015em]">{title}</h1>
      {children !== undefined && <div className="flex flex-wrap gap-2">{children}</div>}
    </div>
  );
}
