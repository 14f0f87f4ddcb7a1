import { failure, success } from '@/app/_server/errors';
import { idParams } from '@/app/_server/params';
import { noQuery, route } from '@/app/_server/route';
import { attachmentName } from '@/app/_server/attachment-name';
import { writeSheetFile } from '@/canvas/document/export-file';
import { findSheetDocument } from '@/db/queries/sheets';

/** A sheet as a file to keep: versioned JSON, which an import reads back to an equal sheet. */
export const GET = route(
  { name: 'sheet.export', permission: 'sheet.export', params: idParams, query: noQuery },
  async ({ viewer, params }) => {
    const sheet = await findSheetDocument(viewer, params.id);
    if (!sheet) return failure('notFound');
    return success(
      new Response(writeSheetFile(sheet), {
        headers: {
          'Content-Type': 'application/json; charset=utf-8',
          'Content-Disposition': attachmentName(sheet.name, 'sheet.json'),
          'Cache-Control': 'private, no-store',
        },
      }),
    );
  },
);
