import { TriangleAlert } from 'lucide-react';
import type { ReactNode } from 'react';

/** A line that something is not as one might think: a triangle as well as the colour. */
export function WarningLine({ children }: { readonly children: ReactNode }) {
  return (
    <p className="flex gap-2 text-[13px] leading-[18px] text-caution">
      <TriangleAlert size={15} strokeWidth={1.75} aria-hidden="true" className="mt-px shrink-0" />
      <span>{children}</span>
    </p>
  );
}
