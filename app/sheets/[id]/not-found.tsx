import Link from 'next/link';
import { BrokenWire } from '@/app/_frame/broken-wire';
import { MessagePage } from '@/app/_frame/message-page';
import { buttonStyle } from '@/components/button-style';
import { LeftHere } from './_room/left-here';

export default function SheetNotFound() {
  return (
    <MessagePage
      picture={<BrokenWire />}
      title="There is no such sheet"
      action={
        <Link href="/sheets" className={buttonStyle('primary', 'large')}>
          Go to the sheets
        </Link>
      }
      small={<LeftHere />}
    >
      It does not exist, or it is another team’s. Look for it in the list, or ask whoever sent the link.
    </MessagePage>
  );
}
