import 'server-only';
import type { Role } from '@/app/_shared/roles';
import type { MemberItem, Viewer } from '@/app/_shared/wire';
import { inTransaction, select } from '../client';
import { models } from '../models/models';

/** A team of this product is a workgroup; more than this is not shown. */
const MOST_MEMBERS = 500;

/** The viewer's team, owners first. */
export async function listMembers(viewer: Viewer): Promise<readonly MemberItem[]> {
  const rows = await select<Omit<MemberItem, 'self' | 'joinedAt'> & { readonly userId: string; readonly joinedAt: Date }>(
    `SELECT members.id, users.name, users.email, members.role, members.joinedAt, users.id AS userId
      FROM members JOIN users ON users.id = members.userId
      WHERE members.teamId = :teamId AND members.removedAt IS NULL
      ORDER BY members.role, users.name, members.id LIMIT ${MOST_MEMBERS}`,
    { teamId: viewer.teamId },
  );
  return rows.map(({ userId, joinedAt, ...row }) => ({
    ...row,
    joinedAt: joinedAt.toISOString(),
    self: userId === viewer.userId,
  }));
}

export type MemberChange = { readonly kind: 'changed' | 'lastOwner' | 'notFound' };

export function changeMemberRole(
  viewer: Viewer,
  change: { readonly memberId: string; readonly role: Role },
): Promise<MemberChange> {
  return changeMember(viewer, change.memberId, { role: change.role }, change.role === 'owner');
}

/** Takes a member out of the team. The row stays, marked, so that it can be undone by hand. */
export function removeMember(viewer: Viewer, memberId: string): Promise<MemberChange> {
  return changeMember(viewer, memberId, { removedAt: new Date(), removedBy: viewer.userId }, false);
}

function changeMember(
  viewer: Viewer,
  memberId: string,
  values: { readonly role?: Role; readonly removedAt?: Date; readonly removedBy?: string },
  staysOwner: boolean,
): Promise<MemberChange> {
  return inTransaction(async (transaction) => {
    // Locks the team's owners, so that two who demote each other at once come one after the other.
    const owners = await select<{ readonly id: string }>(
      `SELECT id FROM members WHERE teamId = :teamId AND role = 'owner' AND removedAt IS NULL FOR UPDATE`,
      { teamId: viewer.teamId },
      transaction,
    );
    const last = owners.length === 1 && owners[0]?.id === memberId;
    if (last && !staysOwner) return { kind: 'lastOwner' };
    const [changed] = await models().Member.update(
      { ...values },
      { where: { id: memberId, teamId: viewer.teamId, removedAt: null }, transaction },
    );
    return { kind: changed === 1 ? 'changed' : 'notFound' };
  });
}
