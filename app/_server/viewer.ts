import 'server-only';
import { cache } from 'react';
import { headers } from 'next/headers';
import { redirect } from 'next/navigation';
import type { Viewer } from '@/app/_shared/wire';
import { findViewer } from '@/db/queries/accounts';
import { readSession } from './session';

/**
 * Who is asking, as the database says now: a revoked session, a removed member, a changed role count at once. Null
 * without a session that holds. Throws when the database cannot be reached (never takes that for signed out).
 * Asked once a request.
 */
export const currentViewer: () => Promise<Viewer | null> = cache(async () => {
  const session = await readSession();
  return session ? await findViewer(session.userId, session.version) : null;
});

/** For pages: the viewer, or the way to the sign-in page and back. */
export async function requireViewer(): Promise<Viewer> {
  const viewer = await currentViewer();
  if (viewer) return viewer;
  const path = (await headers()).get('x-ohmstead-path');
  redirect(path ? `/sign-in?next=${encodeURIComponent(path)}` : '/sign-in');
}
