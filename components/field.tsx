import type { ReactNode } from 'react';
import { classNames } from './class-names';

/** Ids that tie a control to its label, hint and error. */
export type FieldIds = { readonly control: string; readonly hint: string; readonly error: string };

export type FieldProps = {
  readonly ids: FieldIds;
  readonly label: ReactNode;
  /** The label is for assistive technology only: something visible beside the control already says it. */
  readonly labelHidden?: boolean;
  readonly hint?: ReactNode;
  readonly error?: string;
  /** Keeps one line free below the control, so that an error appearing there moves nothing. */
  readonly reserveLine?: boolean;
  readonly className?: string;
  readonly children: ReactNode;
};

/** The frame of a form control: label above; below it the hint, or in its place the error. */
export function Field({ ids, label, labelHidden = false, hint, error, reserveLine = false, className, children }: FieldProps) {
  const below = error ?? hint;
  return (
    <div className={classNames('flex min-w-0 flex-col', className)}>
      <label htmlFor={ids.control} className={labelHidden ? 'sr-only' : 'mb-1.5 text-[13px] font-medium text-ink'}>
        {label}
      </label>
      {children}
      {(reserveLine || below !== undefined) && (
        <p
          id={error === undefined ? ids.hint : ids.error}
          className={classNames(
            'mt-1.5 text-[13px] leading-[18px]',
            reserveLine && 'min-h-[18px]',
            error === undefined ? 'text-muted' : 'text-falls',
          )}
        >
          {error !== undefined && <ErrorMark />}
          {below}
        </p>
      )}
    </div>
  );
}

/** What `aria-describedby` of the control should hold, given what the frame shows. */
export function describedBy(ids: FieldIds, hint: ReactNode, error: string | undefined): string | undefined {
  if (error !== undefined) return ids.error;
  return hint === undefined ? undefined : ids.hint;
}

export const controlStyle =
  'w-full min-w-0 rounded-md border bg-raised text-ink placeholder:text-muted transition-[border-color] duration-[120ms] ' +
  'hover:border-muted disabled:cursor-not-allowed disabled:bg-sunken disabled:text-muted';

/** Red alone says nothing to many readers; the cross says it again. */
function ErrorMark() {
  return (
    <svg viewBox="0 0 12 12" aria-hidden="true" className="mr-1.5 inline-block size-3 align-[-1px]">
      <path d="M2.5 2.5l7 7m0-7l-7 7" fill="none" stroke="currentColor" strokeWidth="1.75" strokeLinecap="round" />
    </svg>
  );
}
