'use server';

import { publicAction } from '@/app/_server/action';
import { failure, success } from '@/app/_server/errors';
import { LIMITS, addressSubject } from '@/app/_server/limits';
import { signUpInput } from '@/app/_shared/wire';
import { createAccount } from '@/db/queries/accounts';
import { takeAttempt } from '@/db/queries/attempts';

/**
 * Makes an account and a team of its own, with the account as its owner. The page then signs in with the same
 * credentials. A taken address is said to be taken: someone who forgot that they have an account must be able to
 * learn it, and without e-mail there is no other way; the limit on each network address keeps it from being a way
 * to try out lists.
 */
export const signUp = publicAction({ name: 'account.signUp', input: signUpInput }, async ({ input, address }) => {
  const attempt = await takeAttempt(addressSubject('sign-up', address), LIMITS.signUpByAddress);
  if (!attempt.allowed) {
    return failure('tooMany', 'Too many accounts were made from this network. Try again in an hour.');
  }
  const outcome = await createAccount(input);
  switch (outcome) {
    case 'created':
      return success({ email: input.email });
    case 'taken': {
      const message = 'There is an account with this address already. Sign in instead.';
      return failure('invalid', message, { fields: { email: message } });
    }
  }
});
