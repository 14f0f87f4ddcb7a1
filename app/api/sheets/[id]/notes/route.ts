import { failure, success } from '@/app/_server/errors';
import { idParams } from '@/app/_server/params';
import { noQuery, route } from '@/app/_server/route';
import { findNotesVersion, listNotes } from '@/db/queries/notes';

/**
 * All note threads of a sheet. Asked every two seconds by every open sheet, so it carries an entity tag, and an
 * unchanged one is answered by 304 after a look at one number.
 */
export const GET = route(
  { name: 'note.list', permission: 'note.read', params: idParams, query: noQuery },
  async ({ viewer, params, request }) => {
    const version = await findNotesVersion(viewer, params.id);
    if (version === null) return failure('notFound');
    const headers = { ETag: tag(version), 'Cache-Control': 'private, no-cache' };
    if (matches(request.headers.get('if-none-match'), headers.ETag)) {
      return success(new Response(null, { status: 304, headers }));
    }
    // The version was read before the threads: at worst the next question gets the same threads once more.
    const list = await listNotes(viewer, params.id);
    return list ? success(Response.json(success(list), { headers })) : failure('notFound');
  },
);

function tag(version: number): string {
  return `W/"notes-${version}"`;
}

function matches(asked: string | null, current: string): boolean {
  return (asked ?? '').slice(0, 1000).split(',').some((entry) => entry.trim() === current);
}
