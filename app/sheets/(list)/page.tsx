import type { Metadata } from 'next';
import { FIRST_QUERY, type ListPermissions } from './list-query';
import { SheetListView } from './sheet-list-view';
import { HousePage } from '@/app/_frame/house-page';
import { allowed } from '@/app/_server/permissions';
import { requireViewer } from '@/app/_server/viewer';
import { listSheets } from '@/db/queries/sheets';

export const metadata: Metadata = { title: 'Sheets' };

export default async function SheetsPage() {
  const viewer = await requireViewer();
  const may: ListPermissions = {
    create: allowed(viewer, 'sheet.create'),
    import: allowed(viewer, 'sheet.import'),
    rename: allowed(viewer, 'sheet.rename'),
    clone: allowed(viewer, 'sheet.clone'),
    archive: allowed(viewer, 'sheet.archive'),
    restore: allowed(viewer, 'sheet.restore'),
    export: allowed(viewer, 'sheet.export'),
  };
  return (
    <HousePage viewer={viewer} room="sheets">
      <SheetListView first={await listSheets(viewer, FIRST_QUERY)} may={may} />
    </HousePage>
  );
}
