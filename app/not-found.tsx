import type { Metadata } from 'next';
import { BrokenWire } from './_frame/broken-wire';
import { MessagePage } from './_frame/message-page';
import { buttonStyle } from '@/components/button-style';

export const metadata: Metadata = { title: 'Not here' };

export default function NotFound() {
  return (
    <MessagePage
      picture={<BrokenWire />}
      title="There is nothing at this address"
      action={
        <form action="/sheets">
          <button className={buttonStyle('primary', 'large')}>Go to the sheets</button>
        </form>
      }
    >
      It was never there, it is another team’s, or the link lost a piece on its way. Look for the sheet in the list, or
      ask whoever sent the link.
    </MessagePage>
  );
}
