'use client';

import { useId, type ReactNode, type Ref, type TextareaHTMLAttributes } from 'react';
import { classNames } from './class-names';
import { controlStyle, describedBy, Field } from './field';

export type TextAreaProps = Omit<TextareaHTMLAttributes<HTMLTextAreaElement>, 'id'> & {
  readonly label: ReactNode;
  readonly labelHidden?: boolean;
  readonly hint?: ReactNode;
  readonly error?: string;
  readonly ref?: Ref<HTMLTextAreaElement>;
};

export function TextArea({ label, labelHidden, hint, error, className, rows = 3, ...rest }: TextAreaProps) {
  const id = useId();
  const ids = { control: id, hint: `${id}-hint`, error: `${id}-error` };
  return (
    <Field ids={ids} label={label} labelHidden={labelHidden} hint={hint} error={error} className={className}>
      <textarea
        {...rest}
        id={ids.control}
        rows={rows}
        aria-invalid={error !== undefined || undefined}
        aria-describedby={describedBy(ids, hint, error)}
        className={classNames(
          controlStyle,
          'px-3 py-2 text-sm leading-snug',
          error === undefined ? 'border-edge' : 'border-falls',
        )}
      />
    </Field>
  );
}
