import 'server-only';
import { UniqueConstraintError } from 'sequelize';
import type { Role } from '@/app/_shared/roles';
import type { Viewer } from '@/app/_shared/wire';
import { inTransaction, select } from '../client';
import { newId } from '../id';
import { models } from '../models/models';
import { hashPassword, verifyPassword } from '../password';

/*
 * The only queries without a viewer: they are how one comes to be. An account is in one team; should it ever be in
 * several, the one it joined first is the one it works in.
 */

/** The viewer that a session stands for, as long as its generation counts and the account is in a team. */
export async function findViewer(userId: string, sessionVersion: number): Promise<Viewer | null> {
  const rows = await select<Viewer & { readonly role: Role }>(
    `SELECT users.id AS userId, users.name, users.email, teams.id AS teamId, teams.name AS teamName, members.role
      FROM users
      JOIN members ON members.userId = users.id AND members.removedAt IS NULL
      JOIN teams ON teams.id = members.teamId
      WHERE users.id = :userId AND users.sessionVersion = :sessionVersion
      ORDER BY members.joinedAt, members.id LIMIT 1`,
    { userId, sessionVersion },
  );
  return rows[0] ?? null;
}

export type Credentials = {
  readonly userId: string;
  readonly passwordHash: string;
  readonly sessionVersion: number;
  readonly inTeam: boolean;
};

/** What signing in needs of an account; for `sign-in` alone, and to leave the server never. */
export async function findCredentials(email: string): Promise<Credentials | null> {
  const rows = await select<Omit<Credentials, 'inTeam'> & { readonly memberships: number }>(
    `SELECT users.id AS userId, users.passwordHash, users.sessionVersion,
        (SELECT COUNT(*) FROM members WHERE members.userId = users.id AND members.removedAt IS NULL) AS memberships
      FROM users WHERE users.email = :email`,
    { email },
  );
  const row = rows[0];
  if (!row) return null;
  return {
    userId: row.userId,
    passwordHash: row.passwordHash,
    sessionVersion: row.sessionVersion,
    inTeam: row.memberships > 0,
  };
}

/** Makes an account, and a team that it owns. */
export async function createAccount(account: {
  readonly name: string;
  readonly email: string;
  readonly password: string;
  readonly team: string;
}): Promise<'created' | 'taken'> {
  const passwordHash = await hashPassword(account.password);
  const createdAt = new Date();
  const { Member, Team, User } = models();
  try {
    await inTransaction(async (transaction) => {
      const user = await User.create(
        { id: newId(), name: account.name, email: account.email, passwordHash, createdAt },
        { transaction },
      );
      const team = await Team.create({ id: newId(), name: account.team, createdAt }, { transaction });
      await Member.create(
        { id: newId(), teamId: team.id, userId: user.id, role: 'owner', joinedAt: createdAt },
        { transaction },
      );
    });
    return 'created';
  } catch (error) {
    if (error instanceof UniqueConstraintError) return 'taken';
    throw error;
  }
}

export type PasswordChange = { readonly kind: 'changed'; readonly sessionVersion: number } | { readonly kind: 'wrong' };

/** Changes the viewer's password, if the present one is given, and begins a new generation of sessions. */
export async function changePasswordOf(
  viewer: Viewer,
  passwords: { readonly current: string; readonly next: string },
): Promise<PasswordChange> {
  const { User } = models();
  const account = await findCredentials(viewer.email);
  if (!account || account.userId !== viewer.userId) return { kind: 'wrong' };
  if (!(await verifyPassword(account.passwordHash, passwords.current))) return { kind: 'wrong' };
  const sessionVersion = account.sessionVersion + 1;
  const [changed] = await User.update(
    { passwordHash: await hashPassword(passwords.next), sessionVersion },
    // Of two changes at once the second finds another generation, and its present password is no longer the present one.
    { where: { id: viewer.userId, sessionVersion: account.sessionVersion } },
  );
  return changed === 1 ? { kind: 'changed', sessionVersion } : { kind: 'wrong' };
}
