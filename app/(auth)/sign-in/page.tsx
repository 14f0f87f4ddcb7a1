import type { Metadata } from 'next';
import Link from 'next/link';
import { redirect } from 'next/navigation';
import { SignInForm } from './sign-in-form';
import { currentViewer } from '@/app/_server/viewer';
import { safeNext } from '@/app/_shared/safe-next';
import { signInErrorText } from '@/app/_shared/sign-in-error';

export const metadata: Metadata = { title: 'Sign in' };

export default async function SignInPage({
  searchParams,
}: {
  readonly searchParams: Promise<Readonly<Record<string, string | string[] | undefined>>>;
}) {
  const { next: wanted, error } = await searchParams;
  const next = safeNext(typeof wanted === 'string' ? wanted : undefined);
  if (await currentViewer()) redirect(next);
  return (
    <>
      <h1 className="text-[22px] leading-7 font-semibold tracking-[-0.01em]">Sign in</h1>
      <SignInForm next={next} refusal={typeof error === 'string' ? signInErrorText(error) : undefined} />
      <p className="mt-5 border-t border-rule pt-4 text-sm text-muted">
        New here?{' '}
        <Link
          href={next === '/sheets' ? '/sign-up' : `/sign-up?next=${encodeURIComponent(next)}`}
          className="font-medium text-voltage underline decoration-voltage/40 underline-offset-2 hover:decoration-voltage"
        >
          Make an account and a team
        </Link>
      </p>
    </>
  );
}
