import { ROLES, type Role } from '@/app/_shared/roles';
import type { Viewer } from '@/app/_shared/wire';
import { newId } from '@/db/id';
import { models } from '@/db/models/models';
import { findViewer } from '@/db/queries/accounts';
import { hashPassword } from '@/db/password';

export const PASSWORD = 'a password of tests';

let hashed: Promise<string> | undefined;
let counter = 0;

/** A team with one member of each role, as viewers. */
export async function makeTeam(name: string): Promise<Readonly<Record<Role, Viewer>>> {
  const { Team } = models();
  const team = await Team.create({ id: newId(), name, createdAt: new Date() });
  const [owner, designer, reviewer, viewer] = await Promise.all(ROLES.map((role) => addMember(team.id, role)));
  if (!owner || !designer || !reviewer || !viewer) throw new Error('a role is missing');
  return { owner, designer, reviewer, viewer };
}

/** Another member of a team, with an account of its own whose password is `PASSWORD`. */
export async function addMember(teamId: string, role: Role): Promise<Viewer> {
  const { Member, User } = models();
  counter += 1;
  hashed ??= hashPassword(PASSWORD);
  const userId = newId();
  await User.create({
    id: userId,
    name: `${role} ${counter}`,
    email: `${role}-${counter}-${userId.toLowerCase()}@team.example`,
    passwordHash: await hashed,
    createdAt: new Date(),
  });
  await Member.create({ id: newId(), teamId, userId, role, joinedAt: new Date() });
  const viewer = await findViewer(userId, 1);
  if (!viewer) throw new Error('the member just made is not found');
  return viewer;
}

export async function memberIdOf(viewer: Viewer): Promise<string> {
  const member = await models().Member.findOne({ where: { userId: viewer.userId, teamId: viewer.teamId } });
  if (!member) throw new Error('no such member');
  return member.id;
}
