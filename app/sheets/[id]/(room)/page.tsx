import type { Metadata } from 'next';
import { cookies } from 'next/headers';
import { notFound } from 'next/navigation';
import { openSheet } from '../_room/open-sheet';
import { Room } from '../_room/room';
import type { RoomRights } from '../_room/rights';
import { allowed } from '@/app/_server/permissions';
import { parseTheme, THEME_COOKIE } from '@/components/theme';

type Props = { readonly params: Promise<{ readonly id: string }> };

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { sheet } = await openSheet((await params).id);
  return { title: sheet?.name ?? 'No such sheet' };
}

export default async function SheetPage({ params }: Props) {
  const { viewer, sheet } = await openSheet((await params).id);
  if (sheet === null) notFound();
  const rights: RoomRights = {
    save: allowed(viewer, 'sheet.save'),
    rename: allowed(viewer, 'sheet.rename'),
    clone: allowed(viewer, 'sheet.clone'),
    unarchive: allowed(viewer, 'sheet.restore'),
    takeSnapshot: allowed(viewer, 'snapshot.take'),
    restoreSnapshot: allowed(viewer, 'snapshot.restore'),
    createNote: allowed(viewer, 'note.create'),
    replyNote: allowed(viewer, 'note.reply'),
    resolveNote: allowed(viewer, 'note.resolve'),
    reopenNote: allowed(viewer, 'note.reopen'),
  };
  return (
    <Room
      // Another sheet, or one that may now be changed, is another room.
      key={`${sheet.id} ${sheet.archived}`}
      sheet={sheet}
      person={{ userId: viewer.userId, name: viewer.name }}
      rights={rights}
      theme={parseTheme((await cookies()).get(THEME_COOKIE)?.value)}
    />
  );
}
