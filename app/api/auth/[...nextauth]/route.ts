import NextAuth from 'next-auth';
import type { NextRequest } from 'next/server';
import { authOptions } from '@/app/_server/auth';
import { failure, statusOf } from '@/app/_server/errors';

/** A sign-in form is a few hundred bytes; next-auth reads whatever comes, so the bound is here. */
const MOST_BYTES = 16_384;

type Context = { readonly params: Promise<{ readonly nextauth: string[] }> };

export async function GET(request: NextRequest, context: Context): Promise<Response> {
  return NextAuth(request, context, authOptions());
}

export async function POST(request: NextRequest, context: Context): Promise<Response> {
  const length = Number(request.headers.get('content-length') ?? Number.NaN);
  if (!(length <= MOST_BYTES)) {
    return Response.json(failure('tooLarge'), { status: statusOf('tooLarge') });
  }
  return NextAuth(request, context, authOptions());
}
