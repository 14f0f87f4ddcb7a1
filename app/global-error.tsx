'use client';

import './globals.css';
import { MessagePage } from './_frame/message-page';
import { Button } from '@/components/button';

/** When even the frame of the page cannot be made; so it brings its own. */
export default function GlobalError({ error }: { readonly error: Error & { readonly digest?: string } }) {
  return (
    <html lang="en">
      <body className="bg-paper text-ink antialiased">
        <title>Ohmstead: this page could not be made</title>
        <MessagePage
          title="This page could not be made"
          action={
            <Button variant="primary" size="large" onClick={() => window.location.reload()}>
              Try again
            </Button>
          }
          small={error.digest === undefined ? undefined : `Reference ${error.digest}`}
        >
          Something went wrong that should not have. What you typed on a sheet is kept on this machine and is not lost.
        </MessagePage>
      </body>
    </html>
  );
}
