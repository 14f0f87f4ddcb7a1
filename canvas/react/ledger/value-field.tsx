'use client';

import { useEffect, useId, useRef, useState, type KeyboardEvent } from 'react';
import { classNames } from '@/components/class-names';
import { MAX_TEXT } from '../../document/limits';
import { useSheetStore } from '../sheet-context';

export type ValueFieldProps = {
  readonly label: string;
  /** The text as last accepted. */
  readonly value: string;
  /** The sentence that names the fault of a text, or null. */
  readonly check: (text: string) => string | null;
  /** What is understood of a text, shown at its right while it is typed; empty for nothing. */
  readonly echo?: (text: string) => string;
  /** Called with a text that has no fault and differs from `value`. */
  readonly onCommit: (text: string) => void;
  /** Whose value it is, for the sentence that says what was kept: “L1”. */
  readonly owner: string;
  readonly readOnly?: boolean;
  readonly placeholder?: string;
  /** `large` stands alone under its label; `row` stands at the right of a line that carries the label. */
  readonly size?: 'large' | 'row';
};

/**
 * A value as typed, with what is understood of it beside it. Enter and leaving the field commit; Escape goes back. A text
 * with a fault is never committed: on leaving, the old value stands again, and a sentence says why.
 */
export function ValueField({
  label,
  value,
  check,
  echo,
  onCommit,
  owner,
  readOnly = false,
  placeholder,
  size = 'row',
}: ValueFieldProps) {
  const id = useId();
  const store = useSheetStore();
  const [draft, setDraft] = useState<string | null>(null);
  const [refused, setRefused] = useState<string | null>(null);
  const text = draft ?? value;
  const changed = draft !== null && draft.trim() !== value;
  const fault = changed ? check(draft.trim()) : null;
  const understood = fault === null ? (echo?.(text) ?? '') : '';
  const sentence = fault ?? refused;

  const leaving = useRef<() => void>(() => {});
  useEffect(() => {
    leaving.current = () => {
      if (changed && fault === null) onCommit(draft.trim());
    };
  });
  // Another part may be selected without the field being left first: what was typed is kept all the same.
  useEffect(() => () => leaving.current(), []);

  const commit = () => {
    if (changed && fault === null) onCommit(draft.trim());
    setDraft(null);
  };

  const leave = () => {
    if (changed && fault !== null) {
      const kept = `“${draft.trim()}” was not taken; ${owner} keeps ${echo?.(value) || value || 'none'}. ${fault}`;
      setRefused(kept);
      store.getState().say(kept);
      setDraft(null);
      return;
    }
    commit();
  };

  const onKeyDown = (event: KeyboardEvent<HTMLInputElement>) => {
    if (event.key === 'Enter') {
      event.preventDefault();
      if (fault !== null) store.getState().say(fault);
      else commit();
    } else if (event.key === 'Escape' && (draft !== null || refused !== null)) {
      // The next Escape is the drawing's.
      event.preventDefault();
      event.stopPropagation();
      setDraft(null);
      setRefused(null);
    }
  };

  const large = size === 'large';
  return (
    <div className={classNames('relative', large ? 'flex flex-col' : 'flex min-h-7 flex-wrap items-center justify-between gap-x-3')}>
      <label htmlFor={id} className={large ? 'mb-1 text-[12.5px] text-muted' : 'text-[13px] text-muted'}>
        {label}
      </label>
      <div
        className={classNames(
          'flex min-w-0 items-baseline gap-2 rounded-md border font-mono text-[13px] tabular-nums',
          'has-focus-visible:outline-2 has-focus-visible:outline-offset-[-1px]',
          large ? 'h-9 px-2.5' : 'h-[26px] w-42 px-2',
          readOnly ? 'border-rule bg-sunken' : 'bg-raised',
          !readOnly && (fault === null ? 'border-edge hover:border-muted' : 'border-falls'),
          fault === null ? 'has-focus-visible:outline-voltage' : 'has-focus-visible:outline-falls',
        )}
      >
        <input
          id={id}
          type="text"
          value={text}
          readOnly={readOnly}
          placeholder={placeholder}
          maxLength={MAX_TEXT}
          autoComplete="off"
          autoCapitalize="off"
          spellCheck={false}
          aria-invalid={fault !== null || undefined}
          aria-describedby={[sentence === null ? '' : `${id}-fault`, understood === '' ? '' : `${id}-echo`].join(' ').trim() || undefined}
          onFocus={() => setRefused(null)}
          onChange={(event) => setDraft(event.target.value)}
          onBlur={leave}
          onKeyDown={onKeyDown}
          className={classNames(
            'h-full min-w-0 flex-1 bg-transparent text-ink outline-none placeholder:text-muted focus-visible:outline-none',
            large && 'text-[15px]',
          )}
        />
        {understood !== '' && (
          <output id={`${id}-echo`} htmlFor={id} className="shrink-0 text-muted">
            <span className="sr-only">understood as </span>
            {understood}
          </output>
        )}
      </div>
      {sentence !== null && (
        <p
          id={`${id}-fault`}
          className={classNames(
            'fade-in text-[12.5px] leading-[17px] text-falls',
            // Over what follows while it is typed: a half-typed value must not make the column jump.
            fault !== null
              ? 'absolute top-full right-0 left-0 z-20 mt-1 rounded-md border border-falls bg-raised px-2.5 py-1.5 shadow-float'
              : 'mt-1 w-full',
          )}
        >
          {sentence}
        </p>
      )}
    </div>
  );
}
