'use client';

import { useSyncExternalStore } from 'react';

/** Which sections of the Ledger are folded, kept on this machine from sheet to sheet. */
const KEY = 'ohmstead.ledger.folded';

let folded: ReadonlySet<string> | null = null;
const listeners = new Set<() => void>();

function read(): ReadonlySet<string> {
  if (folded) return folded;
  try {
    const kept: unknown = JSON.parse(localStorage.getItem(KEY) ?? '[]');
    folded = new Set(Array.isArray(kept) ? kept.filter((name): name is string => typeof name === 'string') : []);
  } catch {
    // Storage is refused, or holds something else: every section is open.
    folded = new Set();
  }
  return folded;
}

/** Folds a section or opens it. */
export function setFolded(section: string, fold: boolean): void {
  const next = new Set(read());
  if (fold) next.add(section);
  else next.delete(section);
  folded = next;
  try {
    localStorage.setItem(KEY, JSON.stringify([...next]));
  } catch {
    // It holds for as long as the page is open.
  }
  for (const listener of listeners) listener();
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  return () => {
    listeners.delete(listener);
  };
}

/** Whether a section is folded; on the server every one is open. */
export function useFolded(section: string): boolean {
  return useSyncExternalStore(
    subscribe,
    () => read().has(section),
    () => false,
  );
}
