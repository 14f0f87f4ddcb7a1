import type { Viewer } from '@/app/_shared/wire';
import { encodeSession, sessionCookieName } from '@/app/_server/session';
import type { Browser } from './browser';

/** A browser with a session of this viewer, as signing in would have left it. */
export async function browserOf(viewer: Viewer, version = 1): Promise<Browser> {
  return { cookies: new Map([[sessionCookieName(), await encodeSession({ userId: viewer.userId, version })]]) };
}
