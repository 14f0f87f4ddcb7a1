'use client';

import { Download } from 'lucide-react';
import { useParams } from 'next/navigation';
import { useEffect, useState } from 'react';
import { Button } from '@/components/button';
import { RelativeTime } from '@/components/relative-time';
import { openDraftBox } from './keeping/drafts';
import { recallRoom } from './open-room';
import { saveSheetFile } from './save-file';

type Left = { readonly name: string; readonly document: string; readonly at: number };

/**
 * What this person left unsaved of the sheet at this address, as a file to take away: for the pages that stand in for
 * the sheet. Shows nothing when nothing was left, or when this tab does not know whose it would be.
 */
export function LeftHere() {
  const { id } = useParams<{ readonly id: string }>();
  const [left, setLeft] = useState<Left | null>(null);

  useEffect(() => {
    let over = false;
    void findLeft(id).then((found) => {
      if (!over) setLeft(found);
    });
    return () => {
      over = true;
    };
  }, [id]);

  if (left === null) return null;
  return (
    <span className="flex flex-col items-center gap-2 font-sans">
      <span>
        “{left.name}” as it was here, <RelativeTime at={new Date(left.at).toISOString()} />:
      </span>
      <Button
        size="small"
        icon={<Download size={15} strokeWidth={1.75} aria-hidden="true" />}
        onClick={() => saveSheetFile(left.name, left.document)}
      >
        Save it as a file
      </Button>
    </span>
  );
}

/** What was on the sheet when it broke, if this page still has it; else the draft. */
async function findLeft(sheetId: string): Promise<Left | null> {
  const recalled = recallRoom(sheetId);
  if (recalled === null) return null;
  const { room, text } = recalled;
  if (text !== null) return { name: room.sheetName, document: text, at: Date.now() };
  try {
    const draft = await (await openDraftBox()).read(room.userId, sheetId);
    return draft === null ? null : { name: draft.sheetName, document: draft.document, at: draft.at };
  } catch {
    return null;
  }
}
