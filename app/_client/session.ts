import * as z from 'zod/mini';
import { SIGN_IN_ERRORS, signInErrorText } from '@/app/_shared/sign-in-error';

/*
 * Signing in and out through next-auth's own endpoints. Its browser module does the same, but when the network is away
 * it leaves the page, and what was typed with it; here that is a sentence beside the form.
 */

const csrfAnswer = z.object({ csrfToken: z.string() });
const signInAnswer = z.object({ url: z.string() });

const UNREACHED = 'The server does not answer. Check the connection, then try again.';

async function csrfToken(): Promise<string> {
  const response = await fetch('/api/auth/csrf', { headers: { accept: 'application/json' } });
  return csrfAnswer.parse(await response.json()).csrfToken;
}

function post(path: string, fields: Readonly<Record<string, string>>): Promise<Response> {
  return fetch(path, { method: 'POST', body: new URLSearchParams({ ...fields, json: 'true' }) });
}

export type SignInOutcome = { readonly ok: true } | { readonly ok: false; readonly message: string };

/** Starts a session in this browser, or says in a sentence why not. */
export async function signInWithPassword(email: string, password: string): Promise<SignInOutcome> {
  try {
    const response = await post('/api/auth/callback/credentials', {
      csrfToken: await csrfToken(),
      email,
      password,
      callbackUrl: window.location.origin,
    });
    const answer = signInAnswer.safeParse(await response.json());
    if (!answer.success) return { ok: false, message: signInErrorText(SIGN_IN_ERRORS.unexpected) };
    const error = new URL(answer.data.url, window.location.origin).searchParams.get('error');
    return error === null && response.ok ? { ok: true } : { ok: false, message: signInErrorText(error ?? '') };
  } catch {
    return { ok: false, message: UNREACHED };
  }
}

/** Ends the session of this browser; false when the server could not be reached and the session still stands. */
export async function signOut(): Promise<boolean> {
  try {
    const response = await post('/api/auth/signout', { csrfToken: await csrfToken(), callbackUrl: window.location.origin });
    return response.ok;
  } catch {
    return false;
  }
}
