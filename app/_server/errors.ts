import 'server-only';
import type { AppError, ErrorCode, Result } from '@/app/_shared/result';

/** The one error table: what a client sees as status, and what the person reads when nothing more exact is known. */
const ERRORS: Readonly<Record<ErrorCode, { readonly status: number; readonly message: string }>> = {
  unauthenticated: {
    status: 401,
    message: 'You are not signed in any more. Sign in again; what you typed is kept on this machine.',
  },
  forbidden: {
    status: 403,
    message: 'Your role in this team does not allow that. An owner of the team can change your role.',
  },
  notFound: { status: 404, message: 'That is not here: it does not exist, or it is not your team’s.' },
  invalid: { status: 400, message: 'Something in what was sent is not right. Look at it again and send it once more.' },
  conflict: { status: 409, message: 'Someone else changed this in between. Look at what stands there now.' },
  tooMany: { status: 429, message: 'That was tried too often. Wait a little, then try again.' },
  tooLarge: { status: 413, message: 'That is larger than the server takes. Send less at once.' },
  unavailable: {
    status: 503,
    message:
      'The server cannot reach its database; your work is kept on this machine and will be sent when it answers.',
  },
  unexpected: {
    status: 500,
    message: 'Something went wrong on the server that should not have. Try again; if it stays so, quote the reference.',
  },
};

export function statusOf(code: ErrorCode): number {
  return ERRORS[code].status;
}

export function success<T>(value: T): Result<T> {
  return { ok: true, value };
}

/**
 * An expected failure. Give `message` where something more exact than the table's sentence is known; never put an
 * exception's text there.
 */
export function failure(
  code: ErrorCode,
  message?: string,
  more?: Pick<AppError, 'reference' | 'fields'>,
): { readonly ok: false; readonly error: AppError } {
  return { ok: false, error: { code, message: message ?? ERRORS[code].message, ...more } };
}
