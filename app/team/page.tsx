import type { Metadata } from 'next';
import { RoleGuide } from './role-guide';
import { TeamView } from './team-view';
import { HousePage } from '@/app/_frame/house-page';
import { PageHeading } from '@/app/_frame/page-heading';
import { allowed } from '@/app/_server/permissions';
import { requireViewer } from '@/app/_server/viewer';
import { listMembers } from '@/db/queries/team';

export const metadata: Metadata = { title: 'Team' };

export default async function TeamPage() {
  const viewer = await requireViewer();
  return (
    <HousePage viewer={viewer} room="team" width="text">
      <PageHeading title={viewer.teamName} />
      <TeamView
        first={await listMembers(viewer)}
        may={{ changeRole: allowed(viewer, 'team.changeRole'), removeMember: allowed(viewer, 'team.removeMember') }}
      />
      <RoleGuide own={viewer.role} />
    </HousePage>
  );
}
