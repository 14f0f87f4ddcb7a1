import type { AppError, Result } from '@/app/_shared/result';

/** A read that the server refused, or that did not reach it; SWR keeps it as the `error` of its key. */
export class ReadFailure extends Error {
  readonly detail: AppError;

  constructor(detail: AppError) {
    super(detail.message);
    this.name = 'ReadFailure';
    this.detail = detail;
  }
}

export const NO_ANSWER: AppError = {
  code: 'unavailable',
  message: 'The server does not answer. Check the connection, then try again.',
};

/**
 * Reads a JSON handler of this application, for SWR.
 * @throws ReadFailure with what the person reads.
 */
export async function fetchResult<T>(path: string): Promise<T> {
  const response = await fetch(path, { headers: { accept: 'application/json' } }).catch(() => null);
  const body: unknown = await response?.json().catch(() => null);
  if (!isResult<T>(body)) throw new ReadFailure(NO_ANSWER);
  if (!body.ok) throw new ReadFailure(body.error);
  return body.value;
}

/** Every handler answers a `Result`; anything else is a proxy's or a broken server's page. */
function isResult<T>(body: unknown): body is Result<T> {
  return typeof body === 'object' && body !== null && 'ok' in body && typeof body.ok === 'boolean';
}
