import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { Role } from '@/app/_shared/roles';
import type { Viewer } from '@/app/_shared/wire';
import { findViewer } from '@/db/queries/accounts';
import { changeMemberRole, listMembers, removeMember } from '@/db/queries/team';
import { addMember, makeTeam, memberIdOf } from './support/people';
import { closeDatabase, emptyDatabase, freshDatabase } from './support/fresh-database';

let team: Readonly<Record<Role, Viewer>>;
let others: Readonly<Record<Role, Viewer>>;

beforeAll(freshDatabase);
beforeEach(async () => {
  await emptyDatabase();
  team = await makeTeam('Ours');
  others = await makeTeam('Theirs');
});
afterAll(closeDatabase);

describe('the team', () => {
  it('is listed with its own members only, and says which one looks', async () => {
    const members = await listMembers(team.reviewer);
    expect(members.map((member) => member.role)).toEqual(['owner', 'designer', 'reviewer', 'viewer']);
    expect(members.filter((member) => member.self).map((member) => member.name)).toEqual([team.reviewer.name]);
    expect(Object.keys(members[0] ?? {}).toSorted()).toEqual(['email', 'id', 'joinedAt', 'name', 'role', 'self']);
  });

  it('gives another role, which counts at once', async () => {
    const memberId = await memberIdOf(team.viewer);
    expect(await changeMemberRole(team.owner, { memberId, role: 'designer' })).toEqual({ kind: 'changed' });
    expect(await findViewer(team.viewer.userId, 1)).toMatchObject({ role: 'designer' });
    expect(await changeMemberRole(team.owner, { memberId, role: 'designer' })).toEqual({ kind: 'changed' });
  });

  it('ends a removed member’s sessions, and does not find them again', async () => {
    const memberId = await memberIdOf(team.designer);
    expect(await removeMember(team.owner, memberId)).toEqual({ kind: 'changed' });
    expect(await findViewer(team.designer.userId, 1)).toBeNull();
    expect(await removeMember(team.owner, memberId)).toEqual({ kind: 'notFound' });
    expect(await changeMemberRole(team.owner, { memberId, role: 'viewer' })).toEqual({ kind: 'notFound' });
    expect(await listMembers(team.owner)).toHaveLength(3);
  });

  it('keeps its last owner', async () => {
    const memberId = await memberIdOf(team.owner);
    expect(await changeMemberRole(team.owner, { memberId, role: 'viewer' })).toEqual({ kind: 'lastOwner' });
    expect(await removeMember(team.owner, memberId)).toEqual({ kind: 'lastOwner' });
    expect(await changeMemberRole(team.owner, { memberId, role: 'owner' })).toEqual({ kind: 'changed' });
    const second = await addMember(team.owner.teamId, 'owner');
    expect(await changeMemberRole(second, { memberId, role: 'designer' })).toEqual({ kind: 'changed' });
  });

  it('keeps one owner of two who demote each other at once', async () => {
    for (let round = 0; round < 5; round += 1) {
      const pair = await makeTeam(`Pair ${round}`);
      const second = await addMember(pair.owner.teamId, 'owner');
      const [a, b] = [await memberIdOf(pair.owner), await memberIdOf(second)];
      const outcomes = await Promise.all([
        changeMemberRole(pair.owner, { memberId: b, role: 'viewer' }),
        removeMember(second, a),
      ]);
      expect(outcomes.map((outcome) => outcome.kind).toSorted()).toEqual(['changed', 'lastOwner']);
      expect((await listMembers(pair.designer)).filter((member) => member.role === 'owner')).toHaveLength(1);
    }
  });

  it('does not find a member of another team', async () => {
    const memberId = await memberIdOf(team.designer);
    expect(await changeMemberRole(others.owner, { memberId, role: 'viewer' })).toEqual({ kind: 'notFound' });
    expect(await removeMember(others.owner, memberId)).toEqual({ kind: 'notFound' });
    expect(await findViewer(team.designer.userId, 1)).toMatchObject({ role: 'designer' });
  });
});
