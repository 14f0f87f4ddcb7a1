'use client';

import { ChevronDown } from 'lucide-react';
import { useId, type ReactNode, type Ref, type SelectHTMLAttributes } from 'react';
import { classNames } from './class-names';
import { controlStyle, describedBy, Field } from './field';

export type SelectOption<Value extends string> = { readonly value: Value; readonly label: string };

export type SelectProps<Value extends string> = Omit<
  SelectHTMLAttributes<HTMLSelectElement>,
  'id' | 'value' | 'onChange' | 'size' | 'multiple' | 'children'
> & {
  readonly label: ReactNode;
  readonly labelHidden?: boolean;
  readonly hint?: ReactNode;
  readonly error?: string;
  readonly options: readonly SelectOption<Value>[];
  readonly value: Value;
  readonly onValueChange: (value: Value) => void;
  readonly controlSize?: 'small' | 'medium' | 'large';
  readonly ref?: Ref<HTMLSelectElement>;
};

const heights = { small: 'h-[30px] text-[13px]', medium: 'h-9 text-sm', large: 'h-11 text-base' } as const;

/** One of a few. The platform's own list: it works with every keyboard, screen reader and phone there is. */
export function Select<Value extends string>({
  label,
  labelHidden,
  hint,
  error,
  options,
  value,
  onValueChange,
  controlSize = 'medium',
  className,
  ...rest
}: SelectProps<Value>) {
  const id = useId();
  const ids = { control: id, hint: `${id}-hint`, error: `${id}-error` };
  return (
    <Field ids={ids} label={label} labelHidden={labelHidden} hint={hint} error={error} className={className}>
      <div className="relative flex">
        <select
          {...rest}
          id={ids.control}
          value={value}
          aria-invalid={error !== undefined || undefined}
          aria-describedby={describedBy(ids, hint, error)}
          onChange={(event) => {
            const chosen = options.find((option) => option.value === event.target.value);
            if (chosen !== undefined) onValueChange(chosen.value);
          }}
          className={classNames(
            controlStyle,
            heights[controlSize],
            'cursor-pointer appearance-none pr-8 pl-3',
            error === undefined ? 'border-edge' : 'border-falls',
          )}
        >
          {options.map((option) => (
            <option key={option.value} value={option.value}>
              {option.label}
            </option>
          ))}
        </select>
        <ChevronDown
          size={16}
          strokeWidth={1.75}
          aria-hidden="true"
          className="pointer-events-none absolute top-1/2 right-2.5 -translate-y-1/2 text-muted"
        />
      </div>
    </Field>
  );
}
