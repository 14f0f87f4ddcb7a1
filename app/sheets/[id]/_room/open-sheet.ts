import 'server-only';
import { cache } from 'react';
import { requireViewer } from '@/app/_server/viewer';
import { idSchema, type SheetRecord, type Viewer } from '@/app/_shared/wire';
import { findSheet } from '@/db/queries/sheets';

export type OpenSheet = { readonly viewer: Viewer; readonly sheet: SheetRecord | null };

/** The sheet of an address as the viewer may see it; null when there is none for them. Asked once a request. */
export const openSheet: (id: string) => Promise<OpenSheet> = cache(async (id) => {
  const viewer = await requireViewer();
  return { viewer, sheet: idSchema.safeParse(id).success ? await findSheet(viewer, id) : null };
});
