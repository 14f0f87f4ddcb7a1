import 'server-only';
import { pino, type Logger } from 'pino';

/** Kept out of the log wherever an object carries them: the log is read by more people than the database is. */
const SECRET = ['password', 'passwordHash', 'current', 'next', 'cookie', 'authorization', 'token', 'secret', 'document', 'text'];
const LEVELS = ['fatal', 'error', 'warn', 'info', 'debug', 'trace', 'silent'];

/** @param destination where lines go, for tests; standard output otherwise. */
export function makeLog(destination?: { write(line: string): void }): Logger {
  const wanted = process.env.LOG_LEVEL ?? 'info';
  const options = {
    level: LEVELS.includes(wanted) ? wanted : 'info',
    base: undefined,
    timestamp: () => `,"time":"${new Date().toISOString()}"`,
    redact: { paths: SECRET.flatMap((name) => [name, `*.${name}`, `*.*.${name}`]), censor: '(kept back)' },
    serializers: { error: describeError },
  };
  return destination ? pino(options, destination) : pino(options);
}

export const log = makeLog();

/**
 * What of an exception may be logged. The database driver puts the statement, with every value in it, into its
 * message after a line break; the ORM adds it as `sql`. Both hold documents and password hashes, so only the first
 * line of the message and the stack's frames are kept.
 */
export function describeError(error: unknown): Readonly<Record<string, unknown>> {
  if (!(error instanceof Error)) return { message: String(error).slice(0, 200) };
  const cause = 'parent' in error && error.parent instanceof Error ? error.parent : error.cause;
  return {
    type: error.name,
    message: firstLine(error.message),
    ...('code' in error && typeof error.code === 'string' ? { code: error.code } : {}),
    frames: (error.stack ?? '').split('\n').filter((line) => /^\s+at /.test(line)).slice(0, 12).map((line) => line.trim()),
    ...(cause instanceof Error && cause !== error ? { cause: { type: cause.name, message: firstLine(cause.message) } } : {}),
  };
}

function firstLine(message: string): string {
  return (message.split('\n')[0] ?? '').slice(0, 300);
}
