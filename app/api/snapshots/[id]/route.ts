import { failure, success } from '@/app/_server/errors';
import { idParams } from '@/app/_server/params';
import { noQuery, route } from '@/app/_server/route';
import { findSnapshot } from '@/db/queries/snapshots';

/** A snapshot with its document, as it was frozen. */
export const GET = route(
  { name: 'snapshot.read', permission: 'snapshot.read', params: idParams, query: noQuery },
  async ({ viewer, params }) => {
    const snapshot = await findSnapshot(viewer, params.id);
    return snapshot ? success(snapshot) : failure('notFound');
  },
);
