import { success } from '@/app/_server/errors';
import { noParams, noQuery, route } from '@/app/_server/route';
import { listMembers } from '@/db/queries/team';

/** The members of the viewer's team. */
export const GET = route(
  { name: 'team.read', permission: 'team.read', params: noParams, query: noQuery },
  async ({ viewer }) => success(await listMembers(viewer)),
);
