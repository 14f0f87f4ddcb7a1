import 'server-only';
import { cookies } from 'next/headers';
import { decode, encode } from 'next-auth/jwt';
import { z } from 'zod';
import { env } from './env';

/** How long a signed-in browser stays so: thirty days without the password, unless the session is revoked. */
export const SESSION_SECONDS = 30 * 24 * 60 * 60;

/**
 * What the signed token holds: who, and which generation of the account's sessions. Nothing of it is believed before
 * the database has said that this generation still counts (`currentViewer`).
 */
export type Session = { readonly userId: string; readonly version: number };

const tokenSchema = z.object({ sub: z.string().min(1).max(40), version: z.number().int() });

function secure(): boolean {
  return env().publicUrl.startsWith('https://');
}

/** The name that next-auth gives its cookie; a Secure one is prefixed so that no plain-http page can set it. */
export function sessionCookieName(): string {
  return `${secure() ? '__Secure-' : ''}next-auth.session-token`;
}

/** Reads the session of this request; null when there is none, or it is forged, damaged or past its time. */
export async function readSession(): Promise<Session | null> {
  const jar = await cookies();
  const token = jar.get(sessionCookieName())?.value;
  if (token === undefined || token === '') return null;
  const payload = await decode({ token, secret: env().authSecret }).catch(() => null);
  const read = tokenSchema.safeParse(payload);
  return read.success ? { userId: read.data.sub, version: read.data.version } : null;
}

export function encodeSession(session: Session): Promise<string> {
  return encode({
    token: { sub: session.userId, version: session.version },
    secret: env().authSecret,
    maxAge: SESSION_SECONDS,
  });
}

/** Gives this browser a session of the new generation, when the person has just revoked all others. */
export async function renewSession(session: Session): Promise<void> {
  const jar = await cookies();
  jar.set(sessionCookieName(), await encodeSession(session), {
    httpOnly: true,
    sameSite: 'lax',
    path: '/',
    secure: secure(),
    maxAge: SESSION_SECONDS,
  });
}
