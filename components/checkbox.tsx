'use client';

import { useId, type InputHTMLAttributes, type ReactNode, type Ref } from 'react';
import { classNames } from './class-names';

export type CheckboxProps = Omit<InputHTMLAttributes<HTMLInputElement>, 'id' | 'type' | 'checked' | 'onChange'> & {
  readonly label: ReactNode;
  readonly hint?: ReactNode;
  readonly error?: string;
  readonly checked: boolean;
  readonly onCheckedChange: (checked: boolean) => void;
  readonly ref?: Ref<HTMLInputElement>;
};

export function Checkbox({ label, hint, error, checked, onCheckedChange, className, ...rest }: CheckboxProps) {
  const id = useId();
  const below = error ?? hint;
  return (
    <div className={classNames('flex flex-col', className)}>
      <label htmlFor={id} className="flex min-h-6 cursor-pointer items-center gap-2 text-sm text-ink">
        <input
          {...rest}
          id={id}
          type="checkbox"
          checked={checked}
          aria-invalid={error !== undefined || undefined}
          aria-describedby={below === undefined ? undefined : `${id}-below`}
          onChange={(event) => onCheckedChange(event.target.checked)}
          className="size-4 shrink-0 cursor-pointer accent-voltage"
        />
        {label}
      </label>
      {below !== undefined && (
        <p
          id={`${id}-below`}
          className={classNames('mt-0.5 pl-6 text-[13px]', error === undefined ? 'text-muted' : 'text-falls')}
        >
          {below}
        </p>
      )}
    </div>
  );
}
