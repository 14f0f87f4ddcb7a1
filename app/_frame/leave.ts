import { loadPage } from '@/app/_client/load-page';
import { toast } from '@/components/toast';

/** Signs out and goes to the sign-in page. A full load, so that nothing of the session stays in memory. */
export async function leave(): Promise<void> {
  // Fetched when pressed: it is not worth the first load of every page.
  const { signOut } = await import('@/app/_client/session');
  if (await signOut()) loadPage('/sign-in');
  else toast.failed('You are still signed in: the server does not answer. Check the connection, then try again.');
}
