'use client';

import { useSyncExternalStore } from 'react';
import { relativeTime } from './relative-time-text';

const MINUTE_MS = 60_000;

function everyMinute(listener: () => void): () => void {
  const timer = setInterval(listener, MINUTE_MS);
  return () => clearInterval(timer);
}

// Whole minutes, so that the snapshot is equal from one render to the next.
const minuteNow = (): number => Math.floor(Date.now() / MINUTE_MS) * MINUTE_MS;

/** A moment as a person says it (“3 minutes ago”), kept up to date; the exact time is on hover. `at` is ISO 8601. */
export function RelativeTime({ at }: { readonly at: string }) {
  const now = useSyncExternalStore(everyMinute, minuteNow, minuteNow);
  const date = new Date(at);
  return (
    // The server's clock and time zone may differ from the reader's; the reader's text takes its place.
    <time dateTime={at} title={exactTime(date)} suppressHydrationWarning>
      {relativeTime(date.getTime(), Math.max(now, date.getTime()))}
    </time>
  );
}

function exactTime(date: Date): string {
  return date.toLocaleString('en-GB', { dateStyle: 'full', timeStyle: 'short' });
}
