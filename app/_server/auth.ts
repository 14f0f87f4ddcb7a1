import 'server-only';
import type { NextAuthOptions } from 'next-auth';
import CredentialsProvider from 'next-auth/providers/credentials';
import { signIn } from './sign-in';
import { env } from './env';
import { log } from './log';
import { SESSION_SECONDS } from './session';

/**
 * next-auth's settings, made when they are first needed (the build has no secret). Callbacks ask no database: an
 * exception in them makes next-auth clear the cookie, and a stopped database would sign everyone out. Whether a
 * session still counts is decided in `currentViewer`.
 */
export function authOptions(): NextAuthOptions {
  return {
    secret: env().authSecret,
    session: { strategy: 'jwt', maxAge: SESSION_SECONDS },
    pages: { signIn: '/sign-in', error: '/sign-in', signOut: '/sign-in' },
    providers: [
      CredentialsProvider({
        name: 'account',
        credentials: { email: { type: 'email' }, password: { type: 'password' } },
        authorize: (credentials, request) => signIn(credentials, new Headers(onlyText(request.headers))),
      }),
    ],
    callbacks: {
      // No name and no address in the token: they would go on being true long after they changed.
      jwt: ({ token, user }) => {
        if (!user) return { sub: token.sub, version: token.version };
        return { sub: user.id, version: 'sessionVersion' in user ? user.sessionVersion : undefined };
      },
      session: ({ session }) => ({ expires: session.expires }),
    },
    logger: {
      // Metadata may hold what was typed; the code says enough.
      error: (code) => log.error({ door: 'auth', code }, 'next-auth'),
      warn: (code) => log.warn({ door: 'auth', code }, 'next-auth'),
      debug: () => {},
    },
  };
}

function onlyText(headers: Readonly<Record<string, unknown>> | undefined): Record<string, string> {
  const entries = Object.entries(headers ?? {}).filter(
    (entry): entry is [string, string] => typeof entry[1] === 'string',
  );
  return Object.fromEntries(entries);
}
