import 'server-only';
import { headers } from 'next/headers';
import type { z } from 'zod';
import type { Result } from '@/app/_shared/result';
import type { Viewer } from '@/app/_shared/wire';
import { clientAddress } from './client-address';
import { declare } from './declared';
import { success } from './errors';
import { authorise, parseInput, perform } from './perform';
import type { Permission } from './permissions';

type Context<V, I> = { readonly viewer: V; readonly input: I; readonly address: string };

/**
 * Every server action is made here. The client's input is checked against `input`, the viewer against `permission`,
 * and only then does `work` run; its answer is a value, whatever happens.
 */
export function action<S extends z.core.$ZodType, T>(
  declaration: {
    readonly name: string;
    readonly permission: Permission;
    readonly input: S;
    readonly subject?: (viewer: Viewer, input: z.output<S>) => Promise<boolean>;
  },
  work: (context: Context<Viewer, z.output<S>>) => Promise<Result<T>>,
): (input: z.input<S>) => Promise<Result<T>> {
  const { name, permission } = declaration;
  return declare(
    async (input: z.input<S>) =>
      perform({
        name,
        flood: 'write',
        address: clientAddress(await headers()),
        parse: () => parseInput(declaration.input, input),
        identify: authorise(permission, declaration.subject),
        work,
      }),
    { kind: 'action', name, permission },
  );
}

/** A server action for someone who has no session yet. */
export function publicAction<S extends z.core.$ZodType, T>(
  declaration: { readonly name: string; readonly input: S },
  work: (context: Context<null, z.output<S>>) => Promise<Result<T>>,
): (input: z.input<S>) => Promise<Result<T>> {
  const { name } = declaration;
  return declare(
    async (input: z.input<S>) =>
      perform({
        name,
        flood: 'write',
        address: clientAddress(await headers()),
        parse: () => parseInput(declaration.input, input),
        identify: async () => success(null),
        work,
      }),
    { kind: 'action', name, permission: 'public' },
  );
}
