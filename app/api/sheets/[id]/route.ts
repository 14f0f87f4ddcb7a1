import { failure, success } from '@/app/_server/errors';
import { idParams } from '@/app/_server/params';
import { noQuery, route } from '@/app/_server/route';
import { findSheet } from '@/db/queries/sheets';

/** A sheet as it stands, with its document as text. */
export const GET = route(
  { name: 'sheet.read', permission: 'sheet.read', params: idParams, query: noQuery },
  async ({ viewer, params }) => {
    const sheet = await findSheet(viewer, params.id);
    return sheet ? success(sheet) : failure('notFound');
  },
);
