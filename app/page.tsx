import Link from 'next/link';
import { redirect } from 'next/navigation';
import { FrontFigure } from './_front/front-figure';
import { responseDb } from './_front/front-network';
import { currentViewer } from './_server/viewer';
import { buttonStyle } from '@/components/button-style';
import { Wordmark } from '@/components/logo';
import { Masthead } from '@/components/masthead';

export default async function FrontPage() {
  if (await currentViewer()) redirect('/sheets');
  return (
    <div className="flex min-h-dvh flex-col">
      <Masthead
        actions={
          <Link href="/sign-in" className={buttonStyle('plain', 'small')}>
            Sign in
          </Link>
        }
      >
        <Wordmark />
      </Masthead>
      <main className="mx-auto w-full max-w-[1080px] flex-1 px-4 pt-10 pb-16 sm:px-8 sm:pt-16">
        <h1 className="max-w-[21ch] text-[32px] leading-[1.12] font-semibold tracking-[-0.022em] text-balance sm:text-[46px]">
          Draw a linear network, and read every voltage and current as you draw it.
        </h1>
        <div className="mt-6 mb-9 flex flex-wrap items-end justify-between gap-x-10 gap-y-6 sm:mb-11">
          <p className="max-w-[52ch] text-[17px] leading-relaxed text-pretty text-muted">
            A hardware team keeps its filters, matching sections and supplies here: a colleague pins notes on the
            drawing, a snapshot freezes what was agreed, and a clone begins the next one.
          </p>
          <p className="flex flex-wrap gap-2">
            <Link href="/sign-up" className={buttonStyle('primary', 'large')}>
              Make an account
            </Link>
            <Link href="/sign-in" className={buttonStyle('plain', 'large')}>
              Sign in
            </Link>
          </p>
        </div>
        <FrontFigure response={responseDb()} />
      </main>
    </div>
  );
}
