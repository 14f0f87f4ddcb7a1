'use client';

import { useEffect, useRef, useState } from 'react';
import { checkField, setValues } from '../../commands/edits/values';
import { bodyOf, partsById } from '../../document/lookup';
import type { Part } from '../../document/types';
import { definitionOf } from '../../parts/registry';
import { echoField } from '../figures/echo';
import { useSheet, useSheetStore } from '../sheet-context';

/** The field that opens on the drawing, beside the part, on a double press or Enter. */
export function ValueEditor() {
  const part = useSheet((state) => (state.editing === null ? undefined : partsById(state.document).get(state.editing)));
  return part && definitionOf(part.kind).fields.length > 0 ? <Editor key={part.id} part={part} /> : null;
}

function Editor({ part }: { part: Part }) {
  const store = useSheetStore();
  const field = definitionOf(part.kind).fields[0];
  const before = (field && part.values[field.key]) ?? '';
  const [text, setText] = useState(before);
  const input = useRef<HTMLInputElement>(null);
  useEffect(() => input.current?.select(), []);
  if (!field) return null;
  const fault = checkField(field, text.trim());
  const body = bodyOf(part);
  const name = part.designator || definitionOf(part.kind).name;

  /** Takes what is typed if it can be read; else the old value stays, and the reason is said. */
  const close = (take: boolean) => {
    const state = store.getState();
    if (state.editing !== part.id) return;
    state.setEditing(null);
    if (!take || text.trim() === before) return;
    if (fault !== null) {
      state.say(`${name} keeps ${before}. ${fault}`);
      return;
    }
    const result = setValues(state.document, part.id, { [field.key]: text });
    if (!result.ok) state.say(`${name} keeps ${before}. ${result.message}`);
    else state.apply({ label: `Set ${name} to ${text.trim()}`, document: result.document, say: `${name} is ${echoField(field, text) || text.trim()}.` });
  };

  return (
    <div
      className="nodrag nopan pointer-events-auto absolute left-0 top-0 z-[8] w-56 rounded-md border border-voltage bg-raised p-1.5 shadow-lg"
      style={{ transform: `translate(${(body.left + body.right) / 2 - 112}px, ${body.bottom + 10}px)` }}
    >
      <label className="flex items-center gap-2 text-[12px] text-muted">
        <span className="font-semibold text-ink">{name}</span>
        <input
          ref={input}
          value={text}
          autoFocus
          spellCheck={false}
          autoComplete="off"
          maxLength={200}
          aria-label={`${field.label} of ${name}`}
          aria-invalid={fault !== null}
          aria-describedby="value-editor-echo"
          className="min-w-0 flex-1 bg-transparent font-mono text-[13px] text-ink outline-none"
          onChange={(event) => setText(event.target.value)}
          onBlur={() => close(true)}
          onKeyDown={(event) => {
            event.stopPropagation();
            if (event.key === 'Enter' && fault === null) close(true);
            else if (event.key === 'Escape') close(false);
            else return;
            event.preventDefault();
            window.document.querySelector<HTMLElement>('[data-drawing]')?.focus();
          }}
        />
      </label>
      <p id="value-editor-echo" role="status" className={`mt-1 text-[12px] ${fault === null ? 'font-mono text-muted' : 'text-falls'}`}>
        {fault ?? echoField(field, text)}
      </p>
    </div>
  );
}
