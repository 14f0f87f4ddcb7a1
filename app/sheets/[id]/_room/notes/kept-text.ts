'use client';

import { useCallback, useState } from 'react';

const PREFIX = 'ohmstead.note.';

/**
 * Text being typed for a note, kept on this machine until it is sent: a closed tab does not lose it.
 * @param name whose, on which sheet, to which note
 */
export function useKeptText(name: string): readonly [string, (text: string) => void] {
  const [text, setText] = useState(() => read(name));
  const change = useCallback(
    (next: string) => {
      setText(next);
      write(name, next);
    },
    [name],
  );
  return [text, change];
}

export function read(name: string): string {
  try {
    return localStorage.getItem(PREFIX + name) ?? '';
  } catch {
    return '';
  }
}

export function write(name: string, text: string): void {
  try {
    if (text === '') localStorage.removeItem(PREFIX + name);
    else localStorage.setItem(PREFIX + name, text);
  } catch {
    // Without storage the text holds for as long as the page is open.
  }
}
