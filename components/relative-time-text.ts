const STEPS: readonly { readonly unit: Intl.RelativeTimeFormatUnit; readonly seconds: number; readonly below: number }[] = [
  { unit: 'minute', seconds: 60, below: 3_600 },
  { unit: 'hour', seconds: 3_600, below: 86_400 },
  { unit: 'day', seconds: 86_400, below: 7 * 86_400 },
  { unit: 'week', seconds: 7 * 86_400, below: 30 * 86_400 },
  { unit: 'month', seconds: 30.44 * 86_400, below: 365 * 86_400 },
  { unit: 'year', seconds: 365.25 * 86_400, below: Infinity },
];

const formatter = new Intl.RelativeTimeFormat('en', { numeric: 'auto' });

/** How long ago `then` was at `now` (both in milliseconds since 1970), in words; under a minute is “just now”. */
export function relativeTime(then: number, now: number): string {
  const seconds = (now - then) / 1000;
  if (!(seconds >= 60)) return 'just now';
  for (const step of STEPS) {
    if (seconds < step.below) return formatter.format(-Math.floor(seconds / step.seconds), step.unit);
  }
  return formatter.format(-Math.floor(seconds / (365.25 * 86_400)), 'year');
}
