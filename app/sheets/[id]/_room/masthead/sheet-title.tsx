'use client';

import { useEffect, useRef, useState } from 'react';

export type SheetTitleProps = {
  readonly name: string;
  /** Absent for those who may not rename the sheet. */
  readonly onRename?: (name: string) => void;
};

/** A key that is meant for what is being typed is not meant for the page. */
function isTyping(target: EventTarget | null): boolean {
  return target instanceof HTMLElement && (target.isContentEditable || target.closest('input, textarea, select, dialog') !== null);
}

/** The sheet's name; a press or F2 makes a field of it. */
export function SheetTitle({ name, onRename }: SheetTitleProps) {
  const [editing, setEditing] = useState(false);
  const mayRename = onRename !== undefined;

  useEffect(() => {
    if (!mayRename) return;
    const onKey = (event: KeyboardEvent) => {
      if (event.key !== 'F2' || event.defaultPrevented || isTyping(event.target)) return;
      event.preventDefault();
      setEditing(true);
    };
    window.addEventListener('keydown', onKey);
    return () => window.removeEventListener('keydown', onKey);
  }, [mayRename]);

  if (!mayRename) {
    return (
      <h1 title={name} className="min-w-0 truncate text-[15px] font-semibold">
        {name}
      </h1>
    );
  }
  return (
    <h1 className="flex min-w-0 text-[15px] font-semibold">
      {editing ? (
        <TitleField
          name={name}
          onDone={(next) => {
            setEditing(false);
            if (next !== null && next !== name) onRename(next);
          }}
        />
      ) : (
        <button
          type="button"
          title={`${name}: press or F2 to rename`}
          onClick={() => setEditing(true)}
          className="-mx-1.5 h-[30px] min-w-0 cursor-text truncate rounded-[5px] px-1.5 hover:bg-wash"
        >
          {name}
        </button>
      )}
    </h1>
  );
}

/** Calls `onDone` once: with a name, or with null when it is left as it was. */
function TitleField({ name, onDone }: { readonly name: string; readonly onDone: (name: string | null) => void }) {
  const [text, setText] = useState(name);
  const field = useRef<HTMLInputElement>(null);
  // Taking the field away takes the focus from it, which must not count a second time.
  const over = useRef(false);

  useEffect(() => {
    field.current?.focus();
    field.current?.select();
  }, []);

  const finish = (next: string | null) => {
    if (over.current) return;
    over.current = true;
    onDone(next === '' ? null : next);
  };

  return (
    <input
      ref={field}
      aria-label="Name of the sheet"
      value={text}
      maxLength={120}
      autoComplete="off"
      spellCheck={false}
      size={Math.max(12, text.length)}
      onChange={(event) => setText(event.target.value)}
      onBlur={() => finish(text.trim())}
      onKeyDown={(event) => {
        event.stopPropagation();
        if (event.key === 'Enter') finish(text.trim());
        if (event.key === 'Escape') finish(null);
      }}
      className="-mx-1.5 h-[30px] max-w-full min-w-0 rounded-[5px] border border-edge bg-raised px-[5px] font-semibold"
    />
  );
}
