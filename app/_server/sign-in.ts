import 'server-only';
import { z } from 'zod';
import { SIGN_IN_ERRORS } from '@/app/_shared/sign-in-error';
import { emailSchema } from '@/app/_shared/wire';
import { isUnavailable } from '@/db/client';
import { hashOfNobody, verifyPassword } from '@/db/password';
import { findCredentials } from '@/db/queries/accounts';
import { forgetAttempts, giveBackAttempt, takeAttempt } from '@/db/queries/attempts';
import { clientAddress } from './client-address';
import { LIMITS, accountSubject, addressSubject } from './limits';
import { surprise } from './perform';

const credentialsSchema = z.object({ email: emailSchema, password: z.string().min(1).max(200) });

/** The part of next-auth's user that goes on into the token. */
export type SignedIn = { readonly id: string; readonly sessionVersion: number };

/**
 * Checks an address and a password. Null for both an unknown address and a wrong password, after the same work: the
 * attempts are counted before the password is looked at (so that many at once cannot slip past the limit), and where
 * there is no account the password is held against a hash of nobody's.
 * @throws Error with one of `SIGN_IN_ERRORS` as its message, which next-auth hands to the page: `tooMany:` and the
 *   time from which it may be tried again, `noTeam`, `unavailable`, or `unexpected`.
 */
export async function signIn(
  credentials: unknown,
  headers: { get(name: string): string | null },
): Promise<SignedIn | null> {
  const read = credentialsSchema.safeParse(credentials);
  if (!read.success) return null;
  const outcome = await check(read.data, clientAddress(headers)).catch((error: unknown) => {
    if (isUnavailable(error)) return { kind: 'refused', reason: SIGN_IN_ERRORS.unavailable } as const;
    surprise('auth.signIn', error);
    return { kind: 'refused', reason: SIGN_IN_ERRORS.unexpected } as const;
  });
  switch (outcome.kind) {
    case 'signedIn':
      return { id: outcome.userId, sessionVersion: outcome.sessionVersion };
    case 'wrong':
      return null;
    case 'refused':
      throw new Error(outcome.reason);
  }
}

type Outcome =
  | { readonly kind: 'signedIn'; readonly userId: string; readonly sessionVersion: number }
  | { readonly kind: 'wrong' }
  | { readonly kind: 'refused'; readonly reason: string };

async function check(credentials: z.infer<typeof credentialsSchema>, address: string): Promise<Outcome> {
  const byAddress = addressSubject('sign-in', address);
  const byAccount = accountSubject('sign-in', credentials.email);
  for (const [subject, limit] of [
    [byAddress, LIMITS.signInByAddress],
    [byAccount, LIMITS.signInByAccount],
  ] as const) {
    const attempt = await takeAttempt(subject, limit);
    if (!attempt.allowed) {
      return { kind: 'refused', reason: `${SIGN_IN_ERRORS.tooMany}:${attempt.again.toISOString()}` };
    }
  }
  const account = await findCredentials(credentials.email);
  const right = await verifyPassword(account?.passwordHash ?? (await hashOfNobody()), credentials.password);
  if (!account || !right) return { kind: 'wrong' };
  await forgetAttempts(byAccount);
  // Someone who knows the password was not guessing: a busy office must not run into the limit by signing in.
  await giveBackAttempt(byAddress);
  if (!account.inTeam) return { kind: 'refused', reason: SIGN_IN_ERRORS.noTeam };
  return { kind: 'signedIn', userId: account.userId, sessionVersion: account.sessionVersion };
}
