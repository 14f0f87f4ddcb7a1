import { expect, test } from 'vitest';
import { initials } from '@/components/avatar';
import { relativeTime } from '@/components/relative-time-text';

const SECOND = 1_000;
const HOUR = 3_600 * SECOND;
const DAY = 24 * HOUR;

test.each([
  [0, 'just now'],
  [59 * SECOND, 'just now'],
  [60 * SECOND, '1 minute ago'],
  [59 * 60 * SECOND + 59 * SECOND, '59 minutes ago'],
  [HOUR, '1 hour ago'],
  [23 * HOUR + HOUR - 1, '23 hours ago'],
  [DAY, 'yesterday'],
  [6 * DAY, '6 days ago'],
  [7 * DAY, 'last week'],
  [29 * DAY, '4 weeks ago'],
  [31 * DAY, 'last month'],
  [364 * DAY, '11 months ago'],
  [366 * DAY, 'last year'],
  // A server's clock that runs ahead must not tell of the future.
  [-5 * HOUR, 'just now'],
])('%d ms ago is %s', (ago, words) => {
  expect(relativeTime(1_700_000_000_000 - ago, 1_700_000_000_000)).toBe(words);
});

test.each([
  ['Ines Harrow', 'IH'],
  ['Ana Maria de Sousa', 'AS'],
  ['Plato', 'PL'],
  ['  ', '?'],
  ['é x', 'ÉX'],
  ['𝔄lef Beth', '𝔄B'],
])('%s is %s in a ring', (name, letters) => {
  expect(initials(name)).toBe(letters);
});
