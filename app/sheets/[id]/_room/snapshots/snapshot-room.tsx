'use client';

import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useState, useSyncExternalStore, type ReactNode } from 'react';
import { attempt } from '@/app/_client/attempt';
import { fetchResult, ReadFailure } from '@/app/_client/fetch-result';
import { failureText } from '@/app/_client/say-failure';
import type { SheetRecord, SnapshotRecord } from '@/app/_shared/wire';
import { restoreSnapshot } from '@/app/sheets/[id]/actions';
import { parseSheetDocument } from '@/canvas/document/schema';
import type { SheetDocument } from '@/canvas/document/types';
import { Workbench } from '@/canvas/react/workbench';
import { createSheetStore } from '@/canvas/store/sheet-store';
import { Button } from '@/components/button';
import { buttonStyle } from '@/components/button-style';
import { Logo } from '@/components/logo';
import type { Theme } from '@/components/theme';
import { ThemeSwitch } from '@/components/theme-switch';
import { toast } from '@/components/toast';
import { Banner } from '../banner';
import { CloneDialog } from '../clone/clone-dialog';
import { sheetKey } from '../reads';
import { UnreadableSheet } from '../unreadable-sheet';
import type { Restored } from './restore';
import { RestoreQuestion } from './snapshots-dialog';

export type SnapshotRoomProps = {
  readonly snapshot: SnapshotRecord;
  readonly teamName: string;
  readonly mayRestore: boolean;
  readonly mayClone: boolean;
  readonly theme: Theme;
};

/** A frozen snapshot, to look at: the drawing and its readings, with nothing that changes it. */
export function SnapshotRoom(props: SnapshotRoomProps) {
  const { document, name } = props.snapshot;
  const [read] = useState(() => parseSheetDocument(document));
  if (!read.ok) return <UnreadableSheet name={name} document={document} message={read.message} />;
  return <OpenSnapshot {...props} document={read.document} />;
}

function OpenSnapshot({
  snapshot,
  teamName,
  mayRestore,
  mayClone,
  theme,
  document,
}: SnapshotRoomProps & { readonly document: SheetDocument }) {
  const router = useRouter();
  const [store] = useState(() => createSheetStore(document, false));
  const [dialog, setDialog] = useState<'restore' | 'clone' | null>(null);
  const sheetPath = `/sheets/${snapshot.sheetId}`;

  return (
    <Workbench
      store={store}
      masthead={
        <SnapshotHead
          teamName={teamName}
          sheetName={snapshot.sheetName}
          sheetPath={sheetPath}
          actions={
            <>
              <span className="hidden md:contents">
                <ThemeSwitch theme={theme} />
              </span>
              {mayClone && (
                <Button size="small" onClick={() => setDialog('clone')}>
                  Clone
                </Button>
              )}
              {mayRestore && (
                <Button size="small" onClick={() => setDialog('restore')}>
                  Restore
                </Button>
              )}
            </>
          }
        />
      }
      banner={
        <Banner
          words={{
            tone: 'plain',
            text: (
              <>
                <strong className="font-semibold">
                  Snapshot {snapshot.number} · {snapshot.name}
                </strong>{' '}
                · taken by {snapshot.takenBy}, <Moment at={snapshot.takenAt} /> (revision {snapshot.revision}) — frozen
              </>
            ),
            actions: (
              <Link href={sheetPath} className={buttonStyle('plain', 'small')}>
                Back to the sheet
              </Link>
            ),
          }}
        />
      }
      dialogs={
        <>
          {dialog === 'restore' && (
            <RestoreQuestion
              snapshot={snapshot}
              onClose={() => setDialog(null)}
              onRestore={() => restoreFromAfar(snapshot)}
              onRestored={(revision) => {
                toast.done(`Snapshot ${snapshot.number} is restored as revision ${revision}.`);
                router.push(sheetPath);
              }}
            />
          )}
          {dialog === 'clone' && (
            <CloneDialog
              sheetId={snapshot.sheetId}
              sheetName={snapshot.sheetName}
              snapshot={snapshot}
              unsaved={async () => null}
              onCloned={(id) => router.push(`/sheets/${id}`)}
              onClose={() => setDialog(null)}
            />
          )}
        </>
      }
    />
  );
}

/**
 * Restores onto whatever stands on the sheet now: the person here sees the snapshot, not the sheet, and was told that
 * it takes the sheet's place. Someone who saves in that same moment is not written over.
 */
async function restoreFromAfar(snapshot: SnapshotRecord): Promise<Restored> {
  let sheet: SheetRecord;
  try {
    sheet = await fetchResult<SheetRecord>(sheetKey(snapshot.sheetId));
  } catch (error) {
    if (error instanceof ReadFailure) return { ok: false, message: failureText(error.detail) };
    throw error;
  }
  const result = await attempt(() => restoreSnapshot({ snapshotId: snapshot.id, revision: sheet.revision }));
  if (!result.ok) return { ok: false, message: failureText(result.error) };
  if (result.value.kind === 'saved') return { ok: true, revision: result.value.revision };
  const { changedBy, revision } = result.value;
  return {
    ok: false,
    message: `${changedBy} saved revision ${revision} of the sheet just now. Look at it, then restore again if you still want to.`,
  };
}

function SnapshotHead({
  teamName,
  sheetName,
  sheetPath,
  actions,
}: {
  readonly teamName: string;
  readonly sheetName: string;
  readonly sheetPath: string;
  readonly actions: ReactNode;
}) {
  return (
    <div className="flex h-12 items-center gap-3 border-b border-rule bg-raised px-3 sm:px-4">
      <div className="flex min-w-0 flex-1 items-center gap-2 sm:gap-3">
        <Link href="/sheets" aria-label="Ohmstead: all sheets" className="-m-1 flex shrink-0 rounded-md p-1 text-ink">
          <Logo size={28} />
        </Link>
        <div className="flex min-w-0 items-center gap-1.5">
          <span className="hidden truncate text-sm text-muted lg:block lg:max-w-52">{teamName}</span>
          <span aria-hidden="true" className="hidden text-xs text-muted lg:inline">
            ▸
          </span>
          <h1 className="min-w-0 truncate text-[15px] font-semibold">
            <Link href={sheetPath} className="rounded-[5px] hover:underline">
              {sheetName}
            </Link>
          </h1>
        </div>
      </div>
      <div className="flex shrink-0 items-center gap-1.5 print:hidden">{actions}</div>
    </div>
  );
}

const noChange = () => () => {};

/** The exact moment, for a record: in the reader's time zone, and in UTC as long as only the server has spoken. */
function Moment({ at }: { readonly at: string }) {
  const text = useSyncExternalStore(
    noChange,
    () => momentText(at),
    () => `${momentText(at, 'UTC')} UTC`,
  );
  return <time dateTime={at}>{text}</time>;
}

function momentText(at: string, timeZone?: string): string {
  return new Date(at).toLocaleString('en-GB', { dateStyle: 'medium', timeStyle: 'short', timeZone });
}
