'use client';

import { useEffect, useRef, useState } from 'react';

export type RenameFieldProps = {
  readonly name: string;
  /** Enter, or the focus leaving. Never with an empty name. */
  readonly onDone: (name: string) => void;
  /** Escape, or nothing left of the name. */
  readonly onCancel: () => void;
};

/** The sheet's name as a field, in its own place in the row. */
export function RenameField({ name, onDone, onCancel }: RenameFieldProps) {
  const [text, setText] = useState(name);
  const field = useRef<HTMLInputElement>(null);
  // Leaving the page's tree takes the focus too, and must not count a second time.
  const over = useRef(false);

  useEffect(() => {
    field.current?.focus();
    field.current?.select();
  }, []);

  const finish = (keep: boolean): void => {
    if (over.current) return;
    over.current = true;
    const next = text.trim();
    if (keep && next !== '') onDone(next);
    else onCancel();
  };

  return (
    <input
      ref={field}
      aria-label={`New name of ${name}`}
      value={text}
      maxLength={120}
      autoComplete="off"
      spellCheck={false}
      onChange={(event) => setText(event.target.value)}
      onBlur={() => finish(true)}
      onKeyDown={(event) => {
        event.stopPropagation();
        if (event.key === 'Enter') finish(true);
        if (event.key === 'Escape') finish(false);
      }}
      className="relative z-10 -ml-2 block h-7 w-[calc(100%+0.5rem)] max-w-120 rounded-[5px] border border-edge bg-raised px-[7px] text-[15px] font-semibold"
    />
  );
}
