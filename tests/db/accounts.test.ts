import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { models } from '@/db/models/models';
import { changePasswordOf, createAccount, findCredentials, findViewer } from '@/db/queries/accounts';
import { listMembers } from '@/db/queries/team';
import { hashOfNobody, hashPassword, verifyPassword } from '@/db/password';
import { closeDatabase, freshDatabase } from './support/fresh-database';

const account = { name: 'Ada', email: 'ada@team.example', password: 'correct horse', team: 'Ada’s' };

beforeAll(freshDatabase);
afterAll(closeDatabase);

describe('an account', () => {
  it('comes with a team that it owns', async () => {
    expect(await createAccount(account)).toBe('created');
    const credentials = await findCredentials(account.email);
    const viewer = await findViewer(credentials?.userId ?? '', 1);
    expect(viewer).toMatchObject({ name: 'Ada', email: account.email, teamName: 'Ada’s', role: 'owner' });
    expect(Object.keys(viewer ?? {}).toSorted()).toEqual(['email', 'name', 'role', 'teamId', 'teamName', 'userId']);
    if (viewer) expect(await listMembers(viewer)).toMatchObject([{ self: true, role: 'owner' }]);
  });

  it('is made once of many at once, and leaves no team behind otherwise', async () => {
    const twin = { ...account, email: 'twin@team.example', team: 'Twins' };
    const outcomes = await Promise.all(Array.from({ length: 6 }, () => createAccount(twin)));
    expect(outcomes.filter((outcome) => outcome === 'created')).toHaveLength(1);
    expect(outcomes.filter((outcome) => outcome === 'taken')).toHaveLength(5);
    expect(await models().Team.count({ where: { name: 'Twins' } })).toBe(1);
  });

  it('tells addresses apart that look alike to the text collation', async () => {
    expect(await createAccount({ ...account, email: 'jose@team.example' })).toBe('created');
    expect(await createAccount({ ...account, email: 'josé@team.example' })).toBe('created');
    expect((await findCredentials('jose@team.example'))?.userId).not.toBe(
      (await findCredentials('josé@team.example'))?.userId,
    );
  });

  it('does not let its hash out with a reading that does not ask for it', async () => {
    const user = await models().User.findOne({ where: { email: account.email }, rejectOnEmpty: true });
    expect(user.get()).not.toHaveProperty('passwordHash');
  });

  it('changes its password once the present one is given, and revokes its sessions with that', async () => {
    const { userId = '' } = (await findCredentials(account.email)) ?? {};
    const viewer = await findViewer(userId, 1);
    if (!viewer) throw new Error('not found');
    expect(await changePasswordOf(viewer, { current: 'wrong', next: 'another horse' })).toEqual({ kind: 'wrong' });
    expect(await findViewer(userId, 1)).not.toBeNull();
    expect(await changePasswordOf(viewer, { current: account.password, next: 'another horse' })).toEqual({
      kind: 'changed',
      sessionVersion: 2,
    });
    expect(await findViewer(userId, 1)).toBeNull();
    expect(await findViewer(userId, 2)).toMatchObject({ userId });
    const { passwordHash = '' } = (await findCredentials(account.email)) ?? {};
    expect(await verifyPassword(passwordHash, 'another horse')).toBe(true);
    expect(await verifyPassword(passwordHash, account.password)).toBe(false);
  });

  it('takes one of two changes of its password at once', async () => {
    await createAccount({ ...account, email: 'two@team.example' });
    const { userId = '' } = (await findCredentials('two@team.example')) ?? {};
    const viewer = await findViewer(userId, 1);
    if (!viewer) throw new Error('not found');
    const outcomes = await Promise.all(
      ['first of two', 'second of two'].map((next) => changePasswordOf(viewer, { current: account.password, next })),
    );
    expect(outcomes.map((outcome) => outcome.kind).toSorted()).toEqual(['changed', 'wrong']);
  });
});

describe('a password', () => {
  it('is hashed by argon2id with its parameters in the hash, differently each time', async () => {
    const hashes = await Promise.all([hashPassword('same'), hashPassword('same')]);
    for (const hash of hashes) expect(hash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
    expect(hashes[0]).not.toBe(hashes[1]);
  });

  it('is held against a hash of nobody’s with the same parameters where there is no account', async () => {
    const hash = await hashOfNobody();
    expect(hash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
    expect(await hashOfNobody()).toBe(hash);
    expect(await verifyPassword(hash, '')).toBe(false);
  });

  it('is not right for a hash that cannot be read', async () => {
    expect(await verifyPassword('', 'x')).toBe(false);
    expect(await verifyPassword('$argon2id$nonsense', 'x')).toBe(false);
  });
});
