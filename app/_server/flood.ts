import 'server-only';

/**
 * A coarse limit on requests from one address, held in this process: it protects the process that holds it, so each
 * of several has its own. Guessing (sign-in, sign-up, passwords) is limited in the database instead, over all
 * processes and restarts (`db/queries/attempts`).
 *
 * An office of thirty people behind one address, each with a sheet open, polls about 900 times a minute.
 */
const PER_MINUTE = { read: 6000, write: 3000 } as const;
const WINDOW_MS = 60_000;
const MOST_ADDRESSES = 10_000;

export type FloodKind = keyof typeof PER_MINUTE;

const windows = new Map<string, { count: number; readonly endsAtMs: number }>();

/** Counts one request; false when this address has had its share of this minute. */
export function takeFlood(kind: FloodKind, address: string, nowMs = Date.now()): boolean {
  const key = `${kind} ${address}`;
  const window = windows.get(key);
  if (window && window.endsAtMs > nowMs) {
    window.count += 1;
    return window.count <= PER_MINUTE[kind];
  }
  windows.delete(key);
  // Oldest first out: a flood of made-up addresses must not fill the memory.
  if (windows.size >= MOST_ADDRESSES) {
    const oldest = windows.keys().next();
    if (!oldest.done) windows.delete(oldest.value);
  }
  windows.set(key, { count: 1, endsAtMs: nowMs + WINDOW_MS });
  return true;
}
