'use client';

import { Download } from 'lucide-react';
import { useMemo, useState } from 'react';
import { parseSheetDocument } from '@/canvas/document/schema';
import type { SheetDocument } from '@/canvas/document/types';
import { Button } from '@/components/button';
import { Dialog } from '@/components/dialog';
import { RelativeTime } from '@/components/relative-time';
import type { Theirs } from '../keeping/machine';
import { differences } from './differences';
import { SheetPicture } from './sheet-picture';

export type ConflictDialogProps = {
  readonly mine: SheetDocument;
  readonly theirs: Theirs;
  /** The revision that mine was made from. */
  readonly madeFrom: number;
  readonly mayClone: boolean;
  readonly onKeepMine: () => void;
  readonly onKeepTheirs: () => void;
  /** Makes a clone of mine; answers what could not be done, to be read. */
  readonly onKeepBoth: () => Promise<string | null>;
  readonly onDownload: () => void;
  readonly onClose: () => void;
};

/** The same sheet was changed in two places: both beside each other, and the three ways on. */
export function ConflictDialog({
  mine,
  theirs,
  madeFrom,
  mayClone,
  onKeepMine,
  onKeepTheirs,
  onKeepBoth,
  onDownload,
  onClose,
}: ConflictDialogProps) {
  const [dropping, setDropping] = useState(false);
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const read = useMemo(() => parseSheetDocument(theirs.document), [theirs.document]);

  const keepBoth = async () => {
    setBusy(true);
    setFailure(await onKeepBoth());
    setBusy(false);
  };

  if (dropping) {
    return (
      <Dialog
        open
        role="alertdialog"
        onClose={() => setDropping(false)}
        title="Drop your version?"
        description={`The sheet then shows ${theirs.changedBy}’s revision ${theirs.revision}, and what you changed is gone from this machine. There is no way back but the file, if you save one first.`}
        footer={
          <>
            <Button onClick={onDownload} icon={<Download size={16} strokeWidth={1.75} aria-hidden="true" />}>
              Save mine as a file
            </Button>
            <Button onClick={() => setDropping(false)} data-autofocus="">
              Back
            </Button>
            <Button variant="danger" onClick={onKeepTheirs}>
              Drop mine
            </Button>
          </>
        }
      />
    );
  }

  return (
    <Dialog
      open
      width="wide"
      onClose={onClose}
      title="This sheet was changed in two places"
      description={
        <>
          {theirs.changedBy} saved revision {theirs.revision}, <RelativeTime at={theirs.changedAt} />. Your changes were made
          from revision {madeFrom} and are kept on this machine. Nothing is saved until you choose.
        </>
      }
      footer={
        <>
          {mayClone && (
            // The focus starts where nothing is lost.
            <Button busy={busy} onClick={() => void keepBoth()} data-autofocus="">
              Keep both, mine as a clone
            </Button>
          )}
          <Button onClick={() => setDropping(true)}>Keep theirs</Button>
          <Button variant="primary" onClick={onKeepMine}>
            Keep mine
          </Button>
        </>
      }
    >
      <div className="grid grid-cols-2 gap-3">
        <Side title="Yours" aside={`from revision ${madeFrom}`} document={mine} />
        {read.ok ? (
          <Side title={theirs.changedBy} aside={`revision ${theirs.revision}`} document={read.document} />
        ) : (
          <p className="text-sm text-falls">{read.message}</p>
        )}
      </div>
      {read.ok && <DifferenceTable mine={mine} theirs={read.document} name={theirs.changedBy} />}
      {failure !== null && (
        <p role="alert" className="mt-3 text-sm text-falls">
          {failure}
        </p>
      )}
      <button
        type="button"
        onClick={onDownload}
        className="mt-3 min-h-6 cursor-pointer rounded-[5px] text-[13px] text-voltage underline underline-offset-2"
      >
        Save mine as a file
      </button>
    </Dialog>
  );
}

function Side({ title, aside, document }: { readonly title: string; readonly aside: string; readonly document: SheetDocument }) {
  return (
    <figure className="min-w-0 overflow-hidden rounded-lg border border-rule">
      <div className="h-36 bg-paper p-2 sm:h-48">
        <SheetPicture document={document} label={`The drawing of ${title}`} />
      </div>
      <figcaption className="flex flex-wrap items-baseline justify-between gap-x-2 border-t border-rule bg-sunken px-3 py-1.5">
        <span className="min-w-0 truncate text-[13px] font-semibold">{title}</span>
        <span className="text-xs text-muted">{aside}</span>
      </figcaption>
    </figure>
  );
}

/** A table of this many rows is read; the rest is counted. */
const MOST_ROWS = 40;

function DifferenceTable({
  mine,
  theirs,
  name,
}: {
  readonly mine: SheetDocument;
  readonly theirs: SheetDocument;
  readonly name: string;
}) {
  const all = useMemo(() => differences(mine, theirs), [mine, theirs]);
  return (
    <>
      <table className="mt-4 w-full table-fixed border-collapse text-left text-[13px]">
        <caption className="sr-only">What differs</caption>
        <thead>
          <tr className="border-b border-rule text-xs text-muted">
            <th scope="col" className="w-[34%] py-1 pr-2 font-medium">
              What differs
            </th>
            <th scope="col" className="py-1 pr-2 font-medium">
              Yours
            </th>
            <th scope="col" className="truncate py-1 font-medium">
              {name}
            </th>
          </tr>
        </thead>
        <tbody>
          {all.slice(0, MOST_ROWS).map((row, index) => (
            <tr key={`${row.what}${index}`} className="border-b border-rule align-top last:border-b-0">
              <th scope="row" className="py-1 pr-2 font-medium">
                {row.what}
              </th>
              <td className="py-1 pr-2 tabular-nums wrap-anywhere">{row.mine}</td>
              <td className="py-1 tabular-nums wrap-anywhere">{row.theirs}</td>
            </tr>
          ))}
        </tbody>
      </table>
      {all.length > MOST_ROWS && <p className="mt-1 text-[13px] text-muted">and {all.length - MOST_ROWS} more.</p>}
    </>
  );
}
