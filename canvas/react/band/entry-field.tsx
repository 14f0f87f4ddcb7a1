import { useId } from 'react';
import { classNames } from '@/components/class-names';

export type EntryFieldProps = {
  readonly label: string;
  readonly text: string;
  readonly onText: (text: string) => void;
  readonly fault: string | null;
  /** What was understood; in the place of the fault. */
  readonly note: string;
};

/** A value typed in a small window over the Band. Two lines are kept for what is said of it, so that nothing jumps. */
export function EntryField({ label, text, onText, fault, note }: EntryFieldProps) {
  const id = useId();
  return (
    <div className="min-w-0 flex-1">
      <label htmlFor={id} className="mb-1 block text-[13px] font-medium">
        {label}
      </label>
      <input
        id={id}
        type="text"
        value={text}
        maxLength={40}
        autoComplete="off"
        autoCapitalize="off"
        spellCheck={false}
        onFocus={(event) => event.target.select()}
        onChange={(event) => onText(event.target.value)}
        aria-invalid={fault !== null || undefined}
        aria-describedby={`${id}-said`}
        className={classNames(
          'h-9 w-full min-w-0 rounded-md border bg-raised px-2.5 font-mono text-[15px] text-ink tabular-nums',
          fault === null ? 'border-edge hover:border-muted' : 'border-falls',
        )}
      />
      <p
        id={`${id}-said`}
        className={classNames('mt-1 min-h-[34px] text-[12.5px] leading-[17px] tabular-nums', fault === null ? 'text-muted' : 'text-falls')}
      >
        {fault ?? note}
      </p>
    </div>
  );
}
