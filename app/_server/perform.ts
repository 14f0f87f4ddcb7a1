import 'server-only';
import { randomBytes } from 'node:crypto';
import { unstable_rethrow } from 'next/navigation';
import { z } from 'zod';
import type { Result } from '@/app/_shared/result';
import type { Viewer } from '@/app/_shared/wire';
import { isUnavailable } from '@/db/client';
import { failure, success } from './errors';
import { takeFlood, type FloodKind } from './flood';
import { log } from './log';
import { allowed, type Permission } from './permissions';
import { currentViewer } from './viewer';

export type Steps<I, V, T> = {
  readonly name: string;
  readonly flood: FloodKind;
  readonly address: string;
  readonly parse: () => Result<I>;
  readonly identify: (input: I) => Promise<Result<V>>;
  readonly work: (context: { readonly viewer: V; readonly input: I; readonly address: string }) => Promise<Result<T>>;
};

/**
 * The one way in: limit, parse, identify, authorise, work. Whatever is thrown inside ends here, as a value that a
 * person can read and a line in the log that says the rest.
 */
export async function perform<I, V, T>(steps: Steps<I, V, T>): Promise<Result<T>> {
  try {
    if (!takeFlood(steps.flood, steps.address)) return failure('tooMany');
    const input = steps.parse();
    if (!input.ok) return input;
    const viewer = await steps.identify(input.value);
    if (!viewer.ok) return viewer;
    return await steps.work({ viewer: viewer.value, input: input.value, address: steps.address });
  } catch (error) {
    // What the framework throws to steer itself is not ours to keep.
    unstable_rethrow(error);
    if (isUnavailable(error)) {
      log.warn({ door: steps.name, error }, 'the database cannot be reached');
      return failure('unavailable');
    }
    return surprise(steps.name, error);
  }
}

/** Logs an exception and answers with nothing of it but a number to find it by. */
export function surprise(door: string, error: unknown): Result<never> {
  const reference = randomBytes(4).toString('hex').toUpperCase();
  log.error({ door, reference, error }, 'unexpected');
  return failure('unexpected', undefined, { reference });
}

/**
 * Identifies the viewer and holds the role against the table.
 * @param subject whether the thing that is acted on belongs to the viewer's team; asked only when the role refuses,
 *   so that what is another team's is not found whatever the role, and a refusal never proves that it exists.
 */
export function authorise<I>(
  permission: Permission,
  subject?: (viewer: Viewer, input: I) => Promise<boolean>,
): (input: I) => Promise<Result<Viewer>> {
  return async (input) => {
    const viewer = await currentViewer();
    if (!viewer) return failure('unauthenticated');
    if (allowed(viewer, permission)) return success(viewer);
    if (subject && !(await subject(viewer, input))) return failure('notFound');
    return failure('forbidden');
  };
}

/** Reads untrusted input; every message is the schema's own, so none can carry what was sent. */
export function parseInput<S extends z.core.$ZodType>(schema: S, data: unknown): Result<z.output<S>> {
  const read = z.safeParse(schema, data);
  if (read.success) return success(read.data);
  const fields: Record<string, string> = Object.create(null);
  for (const issue of read.error.issues) {
    const field = String(issue.path[0] ?? '');
    if (field !== '' && !(field in fields)) fields[field] = issue.message;
  }
  return failure('invalid', read.error.issues[0]?.message, { fields: { ...fields } });
}
