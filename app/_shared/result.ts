/** Every code a person or a client can meet; the server's table (`app/_server/errors.ts`) gives each its status and text. */
export type ErrorCode =
  | 'unauthenticated'
  | 'forbidden'
  | 'notFound'
  | 'invalid'
  | 'conflict'
  | 'tooMany'
  | 'tooLarge'
  | 'unavailable'
  | 'unexpected';

export type AppError = {
  readonly code: ErrorCode;
  /** What the person reads: what is wrong, and what to do. */
  readonly message: string;
  /** Names the log line of a surprise, so that someone can look it up. */
  readonly reference?: string;
  /** Messages by form field, for `invalid`. */
  readonly fields?: Readonly<Record<string, string>>;
};

/** What every server action and JSON handler answers: an expected failure is a value. */
export type Result<T> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly error: AppError };
