'use server';

import { action } from '@/app/_server/action';
import { failure, success } from '@/app/_server/errors';
import { LIMITS, accountSubject } from '@/app/_server/limits';
import { renewSession } from '@/app/_server/session';
import { changePasswordInput } from '@/app/_shared/wire';
import { changePasswordOf } from '@/db/queries/accounts';
import { forgetAttempts, takeAttempt } from '@/db/queries/attempts';

/** Changes one's own password. Every other session of the account ends at once; this browser's goes on. */
export const changePassword = action(
  { name: 'account.changePassword', permission: 'account.changePassword', input: changePasswordInput },
  async ({ viewer, input }) => {
    const subject = accountSubject('password', viewer.userId);
    const attempt = await takeAttempt(subject, LIMITS.passwordByAccount);
    if (!attempt.allowed) {
      return failure('tooMany', 'The present password was wrong too often. Try again in a quarter of an hour.');
    }
    const outcome = await changePasswordOf(viewer, input);
    if (outcome.kind === 'wrong') {
      const message = 'That is not your present password.';
      return failure('invalid', message, { fields: { current: message } });
    }
    await forgetAttempts(subject);
    await renewSession({ userId: viewer.userId, version: outcome.sessionVersion });
    return success({ changed: true as const });
  },
);
