import type { Metadata } from 'next';
import { cookies } from 'next/headers';
import { notFound } from 'next/navigation';
import { cache } from 'react';
import { SnapshotRoom } from '../../_room/snapshots/snapshot-room';
import { allowed } from '@/app/_server/permissions';
import { requireViewer } from '@/app/_server/viewer';
import { idSchema } from '@/app/_shared/wire';
import { parseTheme, THEME_COOKIE } from '@/components/theme';
import { findSheet } from '@/db/queries/sheets';
import { findSnapshot } from '@/db/queries/snapshots';

type Props = { readonly params: Promise<{ readonly id: string; readonly snapshotId: string }> };

/** Asked once a request, by the title and by the page. A snapshot is found under its own sheet only. */
const openSnapshot = cache(async (sheetId: string, snapshotId: string) => {
  const viewer = await requireViewer();
  const known = idSchema.safeParse(sheetId).success && idSchema.safeParse(snapshotId).success;
  const snapshot = known ? await findSnapshot(viewer, snapshotId) : null;
  return { viewer, snapshot: snapshot?.sheetId === sheetId ? snapshot : null };
});

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { id, snapshotId } = await params;
  const { snapshot } = await openSnapshot(id, snapshotId);
  return { title: snapshot === null ? 'No such snapshot' : `${snapshot.name} · ${snapshot.sheetName}` };
}

export default async function SnapshotPage({ params }: Props) {
  const { id, snapshotId } = await params;
  const { viewer, snapshot } = await openSnapshot(id, snapshotId);
  const sheet = snapshot === null ? null : await findSheet(viewer, id);
  if (snapshot === null || sheet === null) notFound();
  return (
    <SnapshotRoom
      key={snapshot.id}
      snapshot={snapshot}
      teamName={viewer.teamName}
      mayRestore={allowed(viewer, 'snapshot.restore') && !sheet.archived}
      mayClone={allowed(viewer, 'sheet.clone')}
      theme={parseTheme((await cookies()).get(THEME_COOKIE)?.value)}
    />
  );
}
