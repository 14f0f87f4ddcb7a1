import type { ReactNode } from 'react';
import { Wordmark } from '@/components/logo';

export type MessagePageProps = {
  readonly picture?: ReactNode;
  readonly title: string;
  readonly children: ReactNode;
  readonly action: ReactNode;
  /** A reference to quote, or the like. */
  readonly small?: ReactNode;
};

/**
 * A page that only says something: what is wrong, and the way on. Every page carries those that may have to take its
 * place, so they are made of little: no link component, no typeface, no icons.
 */
export function MessagePage({ picture, title, children, action, small }: MessagePageProps) {
  return (
    <div className="grid-paper flex min-h-dvh flex-col items-center px-5 pt-[max(5vh,1.5rem)] pb-10">
      <header className="p-1">
        <Wordmark />
      </header>
      <main className="flex w-full max-w-[560px] flex-1 flex-col items-center justify-center pb-[8vh] text-center">
        {picture !== undefined && <div className="mb-7">{picture}</div>}
        <h1 className="text-[26px] leading-8 font-semibold tracking-[-0.015em] text-balance">{title}</h1>
        <div className="mt-3 text-[15px] leading-relaxed text-pretty text-muted">{children}</div>
        <div className="mt-6 flex flex-wrap justify-center gap-2">{action}</div>
        {small !== undefined && <p className="mt-6 font-mono text-[13px] text-muted">{small}</p>}
      </main>
    </div>
  );
}
