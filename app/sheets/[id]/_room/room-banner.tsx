'use client';

import type { ReadFailure } from '@/app/_client/fetch-result';
import { Button } from '@/components/button';
import { RelativeTime } from '@/components/relative-time';
import { Banner, type BannerWords } from './banner';
import { isSaved } from './keeping/machine';
import type { Keeper, KeeperView } from './keeping/keeper';
import { useKept } from './keeping/use-keeper';
import { NO_STORAGE, troubleText } from './keeping/words';

/** A server that is away for a moment is told by the state alone; a strip that comes and goes would only shake the page. */
const FAILURES_BEFORE_WORDS = 3;

export type RoomBannerProps = {
  readonly keeper: Keeper;
  readonly archived: boolean;
  readonly followError: ReadFailure | undefined;
  readonly onConflict: () => void;
  readonly onSaveFile: () => void;
  readonly onSaveLeftover: (document: string) => void;
  /** Absent for those who may not. */
  readonly onUnarchive?: () => void;
};

export function RoomBanner(props: RoomBannerProps) {
  const view = useKept(props.keeper, (whole) => whole);
  return <Banner words={roomBanner(props, view)} />;
}

/** The one thing that the whole sheet must say now, the weightiest first; null when there is none. */
function roomBanner(input: RoomBannerProps, view: KeeperView): BannerWords | null {
  const { keeper, archived, followError } = input;
  const { keeping, leftover } = view;
  const saveFile = (
    <Button size="small" onClick={input.onSaveFile}>
      Save as a file
    </Button>
  );
  if (keeping.conflict !== null) {
    return {
      tone: 'caution',
      text: `${keeping.conflict.changedBy} changed this sheet too. Your changes are kept on this machine and are not saved until you choose.`,
      actions: (
        <Button size="small" variant="primary" onClick={input.onConflict}>
          Compare and choose
        </Button>
      ),
    };
  }
  const { trouble } = keeping;
  if (trouble !== null && !isSaved(keeping) && (trouble.kind !== 'unreachable' || keeping.failures >= FAILURES_BEFORE_WORDS)) {
    return {
      tone: 'caution',
      text: troubleText(trouble),
      actions: (
        <>
          {saveFile}
          {trouble.kind === 'outdated' && (
            <Button size="small" variant="primary" onClick={() => window.location.reload()}>
              Load again
            </Button>
          )}
          {trouble.kind === 'signedOut' && <SignInElsewhere />}
        </>
      ),
    };
  }
  if (keeping.storage === 'fails' && keeping.hand === 'here' && !isSaved(keeping)) {
    return { tone: 'caution', text: NO_STORAGE, actions: saveFile };
  }
  if (leftover !== null) {
    return {
      tone: 'caution',
      text: (
        <>
          {leftover.reason === 'notAllowed'
            ? 'You changed this sheet and it was never saved, and your role does not allow changing it now. What you typed is on this machine'
            : 'This machine keeps changes to this sheet that cannot be read here, by another version of the application perhaps'}
          , from <RelativeTime at={new Date(leftover.at).toISOString()} />.
        </>
      ),
      actions: (
        <>
          <Button size="small" onClick={() => keeper.dropLeftover()}>
            Drop
          </Button>
          <Button size="small" onClick={() => input.onSaveLeftover(leftover.document)}>
            Save as a file
          </Button>
        </>
      ),
    };
  }
  if (archived) {
    return {
      tone: 'plain',
      text: 'This sheet is in the archive. It can be read, and changed again when it is restored.',
      actions: input.onUnarchive !== undefined && (
        <Button size="small" onClick={input.onUnarchive}>
          Restore the sheet
        </Button>
      ),
    };
  }
  if (keeping.hand === 'elsewhere') {
    return {
      tone: 'plain',
      text: 'This sheet is open for drawing in another tab of this browser. Here you can read it.',
      actions: (
        <Button size="small" onClick={() => keeper.takeHand()}>
          Draw here instead
        </Button>
      ),
    };
  }
  if (followError !== undefined && keeping.hand === 'nobody') {
    const signedOut = followError.detail.code === 'unauthenticated';
    return { tone: 'caution', text: readerWords(followError), actions: signedOut && <SignInElsewhere /> };
  }
  return null;
}

function readerWords(error: ReadFailure): string {
  switch (error.detail.code) {
    case 'unauthenticated':
      return 'You are not signed in any more. Sign in again in another tab to see what changes here.';
    case 'notFound':
    case 'forbidden':
      return 'This sheet is not on the server any more, or not your team’s. What is shown is how it last stood.';
    default:
      return 'The server does not answer. What is shown is how the sheet last stood.';
  }
}

function SignInElsewhere() {
  return (
    <Button size="small" variant="primary" onClick={() => window.open('/sign-in', '_blank', 'noopener')}>
      Sign in
    </Button>
  );
}
