import 'server-only';
import { z } from 'zod';
import type { Result } from '@/app/_shared/result';
import type { Viewer } from '@/app/_shared/wire';
import { clientAddress } from './client-address';
import { declare } from './declared';
import { failure, statusOf, success } from './errors';
import { authorise, parseInput, perform } from './perform';
import type { Permission } from './permissions';

type Handler = (request: Request, context: { readonly params: Promise<unknown> }) => Promise<Response>;

/** Answers that are somebody's own are kept by nobody in between. */
const PRIVATE = { 'Cache-Control': 'private, no-store' };

/**
 * Every route handler is made here; each only reads. An answer is a `Result` as JSON with the error table's status,
 * or the `Response` that `work` made.
 * @param declaration.params the schema of the path's segments: an id of the wrong form is not found.
 * @param declaration.query the schema of the search parameters, each given once, as text.
 */
export function route<P extends z.core.$ZodType, Q extends z.core.$ZodType, T>(
  declaration: {
    readonly name: string;
    readonly permission: Permission;
    readonly params: P;
    readonly query: Q;
    readonly subject?: (viewer: Viewer, input: { readonly params: z.output<P>; readonly query: z.output<Q> }) => Promise<boolean>;
  },
  work: (context: {
    readonly viewer: Viewer;
    readonly params: z.output<P>;
    readonly query: z.output<Q>;
    readonly request: Request;
  }) => Promise<Result<T | Response>>,
): Handler {
  const { name, permission } = declaration;
  return declare(
    async (request: Request, context: { readonly params: Promise<unknown> }) => {
      const segments = await context.params;
      type Input = { readonly params: z.output<P>; readonly query: z.output<Q> };
      const result = await perform<Input, Viewer, T | Response>({
        name,
        flood: 'read',
        address: clientAddress(request.headers),
        parse: () => {
          const params = z.safeParse(declaration.params, segments ?? {});
          if (!params.success) return failure('notFound');
          const query = parseInput(declaration.query, Object.fromEntries(new URL(request.url).searchParams));
          return query.ok ? success({ params: params.data, query: query.value }) : query;
        },
        identify: authorise(permission, declaration.subject),
        work: ({ viewer, input }) => work({ viewer, params: input.params, query: input.query, request }),
      });
      return answer(result);
    },
    { kind: 'handler', name, permission },
  );
}

/** A handler that anyone may ask; it makes its own answer and must be cheap. */
export function publicRoute(
  declaration: { readonly name: string },
  work: () => Promise<Response>,
): Handler {
  const { name } = declaration;
  return declare(
    async (request: Request) =>
      answer(
        await perform({
          name,
          flood: 'read',
          address: clientAddress(request.headers),
          parse: () => success(null),
          identify: async () => success(null),
          work: async () => success(await work()),
        }),
      ),
    { kind: 'handler', name, permission: 'public' },
  );
}

export const noParams = z.object({});
export const noQuery = z.object({});

function answer(result: Result<unknown>): Response {
  if (result.ok && result.value instanceof Response) return result.value;
  return Response.json(result, { status: result.ok ? 200 : statusOf(result.error.code), headers: PRIVATE });
}
