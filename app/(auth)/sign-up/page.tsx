import type { Metadata } from 'next';
import Link from 'next/link';
import { redirect } from 'next/navigation';
import { SignUpForm } from './sign-up-form';
import { currentViewer } from '@/app/_server/viewer';
import { safeNext } from '@/app/_shared/safe-next';

export const metadata: Metadata = { title: 'Make an account' };

export default async function SignUpPage({
  searchParams,
}: {
  readonly searchParams: Promise<Readonly<Record<string, string | string[] | undefined>>>;
}) {
  const { next: wanted } = await searchParams;
  const next = safeNext(typeof wanted === 'string' ? wanted : undefined);
  if (await currentViewer()) redirect(next);
  return (
    <>
      <h1 className="text-[22px] leading-7 font-semibold tracking-[-0.01em]">Make an account and a team</h1>
      <p className="mt-1 text-sm text-pretty text-muted">You will own the team, and can draw at once.</p>
      <SignUpForm next={next} />
      <p className="mt-5 border-t border-rule pt-4 text-sm text-muted">
        Have an account?{' '}
        <Link
          href={next === '/sheets' ? '/sign-in' : `/sign-in?next=${encodeURIComponent(next)}`}
          className="font-medium text-voltage underline decoration-voltage/40 underline-offset-2 hover:decoration-voltage"
        >
          Sign in
        </Link>
      </p>
    </>
  );
}
