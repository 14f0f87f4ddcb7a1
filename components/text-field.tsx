'use client';

import { useId, type InputHTMLAttributes, type ReactNode, type Ref } from 'react';
import { classNames } from './class-names';
import { controlStyle, describedBy, Field } from './field';

export type TextFieldProps = Omit<InputHTMLAttributes<HTMLInputElement>, 'id' | 'size'> & {
  readonly label: ReactNode;
  readonly labelHidden?: boolean;
  readonly hint?: ReactNode;
  readonly error?: string;
  readonly reserveLine?: boolean;
  /** Set in the figures' typeface, for values. */
  readonly figures?: boolean;
  /** Inside the frame, before the text: an icon. */
  readonly lead?: ReactNode;
  /** Inside the frame, after the text: a unit, a key, a small button. */
  readonly trail?: ReactNode;
  readonly controlSize?: 'small' | 'medium' | 'large';
  readonly ref?: Ref<HTMLInputElement>;
};

const heights = { small: 'h-[30px] text-[13px]', medium: 'h-9 text-sm', large: 'h-11 text-base' } as const;

export function TextField({
  label,
  labelHidden,
  hint,
  error,
  reserveLine,
  figures = false,
  lead,
  trail,
  controlSize = 'medium',
  className,
  type = 'text',
  ...rest
}: TextFieldProps) {
  const id = useId();
  const ids = { control: id, hint: `${id}-hint`, error: `${id}-error` };
  return (
    <Field
      ids={ids}
      label={label}
      labelHidden={labelHidden}
      hint={hint}
      error={error}
      reserveLine={reserveLine}
      className={className}
    >
      <div className="relative flex">
        {lead !== undefined && (
          <span className="pointer-events-none absolute inset-y-0 left-0 flex w-9 items-center justify-center text-muted">
            {lead}
          </span>
        )}
        <input
          {...rest}
          id={ids.control}
          type={type}
          aria-invalid={error !== undefined || undefined}
          aria-describedby={describedBy(ids, hint, error)}
          className={classNames(
            controlStyle,
            heights[controlSize],
            figures && 'font-mono tabular-nums',
            lead === undefined ? 'pl-3' : 'pl-9',
            trail === undefined ? 'pr-3' : 'pr-11',
            error === undefined ? 'border-edge' : 'border-falls',
          )}
        />
        {trail !== undefined && (
          <span className="absolute inset-y-0 right-0 flex items-center pr-1.5 text-muted">{trail}</span>
        )}
      </div>
    </Field>
  );
}
