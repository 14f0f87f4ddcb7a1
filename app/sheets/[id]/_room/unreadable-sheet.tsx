'use client';

import Link from 'next/link';
import { MessagePage } from '@/app/_frame/message-page';
import { Button } from '@/components/button';
import { buttonStyle } from '@/components/button-style';
import { saveSheetFile } from './save-file';

/** A sheet that this build cannot read: nothing is shown that could be saved over it. */
export function UnreadableSheet({
  name,
  document,
  message,
}: {
  readonly name: string;
  readonly document: string;
  readonly message: string;
}) {
  return (
    <MessagePage
      title={`“${name}” cannot be opened here`}
      action={
        <>
          <Link href="/sheets" className={buttonStyle('plain', 'large')}>
            Go to the sheets
          </Link>
          <Button variant="primary" size="large" onClick={() => saveSheetFile(name, document)}>
            Save it as a file
          </Button>
        </>
      }
    >
      {message} Nothing of it was changed.
    </MessagePage>
  );
}
