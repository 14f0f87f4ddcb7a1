import Link from 'next/link';
import type { ReactNode } from 'react';
import { TerminalWires } from './terminal-wires';
import { Wordmark } from '@/components/logo';

/** Signing in and up: the form is the part that the two wires of the page end at. */
export default function AuthLayout({ children }: { readonly children: ReactNode }) {
  return (
    <div className="grid-paper relative flex min-h-dvh flex-col items-center overflow-x-clip px-4 pt-[max(5vh,1.5rem)] pb-10">
      <header>
        <Link href="/" className="inline-block rounded-md p-1">
          <Wordmark />
        </Link>
      </header>
      <div className="relative mt-[max(4vh,1.25rem)] w-full max-w-[420px]">
        <TerminalWires />
        <main className="relative rounded-xl border border-edge bg-raised px-5 pt-6 pb-6 sm:px-8 sm:pt-7">{children}</main>
      </div>
    </div>
  );
}
