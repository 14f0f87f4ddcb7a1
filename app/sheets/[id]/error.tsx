'use client';

import { useRouter } from 'next/navigation';
import { startTransition } from 'react';
import { LeftHere } from './_room/left-here';
import { useRetryWhenHealthy } from './_room/use-retry-when-healthy';
import { MessagePage } from '@/app/_frame/message-page';
import { loadPage } from '@/app/_client/load-page';
import { Button } from '@/components/button';

/** When the room could not be made, or broke while it was open. `digest` names the server's log line. */
export default function SheetError({
  error,
  reset,
}: {
  readonly error: Error & { readonly digest?: string };
  readonly reset: () => void;
}) {
  const router = useRouter();
  const again = () =>
    // Both in one: drawn anew from what the server then says.
    startTransition(() => {
      router.refresh();
      reset();
    });
  // A digest means that the server failed; without one this page did, and would again.
  const waits = error.digest !== undefined;
  useRetryWhenHealthy(waits, again);

  return (
    <MessagePage
      title="This sheet could not be shown"
      action={
        <>
          <Button size="large" onClick={() => loadPage('/sheets')}>
            Go to the sheets
          </Button>
          <Button variant="primary" size="large" onClick={again}>
            Try again
          </Button>
        </>
      }
      small={
        <>
          <LeftHere />
          {error.digest !== undefined && <span className="mt-2 block">Reference {error.digest}</span>}
        </>
      }
    >
      Something went wrong that should not have: most often the server cannot reach its database for a moment. What you
      typed is kept on this machine, and is taken up when the sheet opens again.
      {waits && ' It is tried again by itself as soon as the server answers.'}
    </MessagePage>
  );
}
