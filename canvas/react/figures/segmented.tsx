import { useId } from 'react';
import { classNames } from '@/components/class-names';

export type SegmentedProps<Value extends string> = {
  readonly label: string;
  readonly options: readonly { readonly value: Value; readonly label: string }[];
  readonly value: Value;
  readonly onValueChange: (value: Value) => void;
  readonly disabled?: boolean;
  /** Takes the whole width, in equal parts. */
  readonly wide?: boolean;
};

/** One of a few, all in view. Radio buttons underneath, so arrow keys and screen readers know what to do. */
export function Segmented<Value extends string>({
  label,
  options,
  value,
  onValueChange,
  disabled = false,
  wide = false,
}: SegmentedProps<Value>) {
  const name = useId();
  return (
    <div
      role="radiogroup"
      aria-label={label}
      className={classNames('inline-flex rounded-md border border-rule bg-sunken p-px', wide && 'flex w-full')}
    >
      {options.map((option) => (
        <label
          key={option.value}
          className={classNames(
            'relative flex h-6 items-center justify-center rounded-[5px] border px-2 text-[12.5px] leading-none whitespace-nowrap select-none',
            'has-focus-visible:outline-2 has-focus-visible:outline-voltage',
            wide && 'min-w-0 flex-1 px-1',
            disabled ? 'cursor-default' : 'cursor-pointer',
            option.value === value
              ? 'border-edge bg-raised font-medium text-ink'
              : classNames('border-transparent text-muted', !disabled && 'hover:text-ink'),
          )}
        >
          <input
            type="radio"
            name={name}
            value={option.value}
            checked={option.value === value}
            disabled={disabled}
            onChange={() => onValueChange(option.value)}
            className="absolute inset-0 cursor-[inherit] opacity-0"
          />
          {option.label}
        </label>
      ))}
    </div>
  );
}
