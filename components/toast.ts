/*
 * The words that come up at the edge after something was done, and go again. A plain store outside React, so that any
 * code that acts can speak; one `Toaster` on the page shows them. (Ready-made ones inject an unsigned style element,
 * which the content security policy refuses.)
 */

export type ToastTone = 'done' | 'failed' | 'plain';

export type Toast = {
  readonly id: number;
  readonly tone: ToastTone;
  readonly text: string;
  /** One way back or on: “Undo”. */
  readonly action?: { readonly label: string; readonly onPress: () => void };
  /** How long it stays, in milliseconds, while nobody hovers or focuses it. */
  readonly staysMs: number;
};

export type ToastOptions = Pick<Toast, 'action'> & { readonly staysMs?: number };

/** More than this and the oldest goes: nobody reads a pile. */
const MOST = 4;
const STAYS_MS: Readonly<Record<ToastTone, number>> = { done: 5_000, plain: 6_000, failed: 12_000 };
/** A way back must not slip away while it is being reached for. */
const STAYS_WITH_ACTION_MS = 12_000;

let toasts: readonly Toast[] = [];
let nextId = 1;
const listeners = new Set<() => void>();

function set(next: readonly Toast[]): void {
  toasts = next;
  for (const listener of listeners) listener();
}

function show(tone: ToastTone, text: string, options: ToastOptions = {}): number {
  const id = nextId++;
  const usual = options.action === undefined ? STAYS_MS[tone] : Math.max(STAYS_MS[tone], STAYS_WITH_ACTION_MS);
  set([...toasts, { id, tone, text, action: options.action, staysMs: options.staysMs ?? usual }].slice(-MOST));
  return id;
}

/** Shows a sentence; answers its id, for `toast.dismiss`. */
export const toast = {
  done: (text: string, options?: ToastOptions): number => show('done', text, options),
  failed: (text: string, options?: ToastOptions): number => show('failed', text, options),
  plain: (text: string, options?: ToastOptions): number => show('plain', text, options),
  dismiss: (id: number): void => set(toasts.filter((one) => one.id !== id)),
} as const;

export function subscribeToToasts(listener: () => void): () => void {
  listeners.add(listener);
  return () => {
    listeners.delete(listener);
  };
}

export function currentToasts(): readonly Toast[] {
  return toasts;
}
