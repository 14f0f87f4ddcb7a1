import { failure, success } from '@/app/_server/errors';
import { idParams } from '@/app/_server/params';
import { noQuery, route } from '@/app/_server/route';
import { listSnapshots } from '@/db/queries/snapshots';

/** A sheet's snapshots, the newest first, without their documents. */
export const GET = route(
  { name: 'snapshot.list', permission: 'snapshot.read', params: idParams, query: noQuery },
  async ({ viewer, params }) => {
    const list = await listSnapshots(viewer, params.id);
    return list ? success(list) : failure('notFound');
  },
);
