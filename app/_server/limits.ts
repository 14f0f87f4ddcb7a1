import 'server-only';
import { createHash } from 'node:crypto';

/** How often guessing is let through: at most `most` within a window that begins at the first and is not drawn out. */
export type Limit = { readonly most: number; readonly windowSeconds: number };

/**
 * Ten guesses a quarter of an hour are a thousand a day: nothing against a password of ten characters, while a person
 * who forgot theirs waits a quarter of an hour at most. An address may be an office, so it has more.
 */
export const LIMITS = {
  signInByAccount: { most: 10, windowSeconds: 15 * 60 },
  signInByAddress: { most: 60, windowSeconds: 15 * 60 },
  signUpByAddress: { most: 40, windowSeconds: 60 * 60 },
  passwordByAccount: { most: 10, windowSeconds: 15 * 60 },
} as const satisfies Readonly<Record<string, Limit>>;

export type LimitedDoor = 'sign-in' | 'sign-up' | 'password';

/** The key that attempts on an account are counted under. Hashed: the table is not to be a list of addresses tried. */
export function accountSubject(door: LimitedDoor, account: string): string {
  return `${door}:account:${hashed(account)}`;
}

export function addressSubject(door: LimitedDoor, address: string): string {
  return `${door}:address:${hashed(address)}`;
}

function hashed(text: string): string {
  return createHash('sha256').update(text).digest('base64url').slice(0, 32);
}
