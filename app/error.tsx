'use client';

import { loadPage } from './_client/load-page';
import { MessagePage } from './_frame/message-page';
import { Button } from '@/components/button';

/** When a page cannot be made. `digest` names the server's log line. */
export default function PageError({
  error,
  reset,
}: {
  readonly error: Error & { readonly digest?: string };
  readonly reset: () => void;
}) {
  return (
    <MessagePage
      title="This page could not be made"
      action={
        <>
          <Button size="large" onClick={() => loadPage('/sheets')}>
            Go to the sheets
          </Button>
          <Button variant="primary" size="large" onClick={() => retry(reset)}>
            Try again
          </Button>
        </>
      }
      small={error.digest === undefined ? undefined : `Reference ${error.digest}`}
    >
      Something went wrong that should not have: most often the server cannot reach its database for a moment. What you
      typed on a sheet is kept on this machine and is not lost.
    </MessagePage>
  );
}

/** A page of the server is asked for again; `reset` alone would draw the same answer once more. */
function retry(reset: () => void): void {
  reset();
  window.location.reload();
}
