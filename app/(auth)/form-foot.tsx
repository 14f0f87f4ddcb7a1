import type { ReactNode } from 'react';

/**
 * The last field of a form, and below it the server's sentence when it refused. Two lines are kept free for whatever
 * stands there, so that no answer moves the button.
 */
export function FormFoot({ refusal, children }: { readonly refusal?: string; readonly children: ReactNode }) {
  return (
    <div className="min-h-[118px]">
      {children}
      <p role="alert" className="mt-1.5 text-[13px] leading-[18px] text-pretty text-falls empty:mt-0">
        {refusal}
      </p>
    </div>
  );
}
