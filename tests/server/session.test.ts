import './support/configuration';
import { encode } from 'next-auth/jwt';
import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest';
import type { Role } from '@/app/_shared/roles';
import type { Viewer } from '@/app/_shared/wire';
import { authOptions } from '@/app/_server/auth';
import { env } from '@/app/_server/env';
import { LIMITS } from '@/app/_server/limits';
import { sessionCookieName } from '@/app/_server/session';
import { currentViewer, requireViewer } from '@/app/_server/viewer';
import { signUp } from '@/app/(auth)/actions';
import { changePassword } from '@/app/account/actions';
import { createSheet } from '@/app/sheets/actions';
import { changeRole, removeMember } from '@/app/team/actions';
import { findCredentials } from '@/db/queries/accounts';
import { closeDatabase, emptyDatabase, freshDatabase } from '../db/support/fresh-database';
import { makeTeam, memberIdOf, PASSWORD } from '../db/support/people';
import { as, nobody, type Browser } from './support/browser';
import { browserOf } from './support/signed-in';

vi.mock('next/headers', () => import('./support/browser'));

let team: Readonly<Record<Role, Viewer>>;
beforeAll(freshDatabase);
beforeEach(async () => {
  await emptyDatabase();
  team = await makeTeam('Ours');
});
afterAll(closeDatabase);

function withToken(token: string): Browser {
  return { cookies: new Map([[sessionCookieName(), token]]) };
}

describe('a session', () => {
  it('is the viewer that the database knows', async () => {
    as(await browserOf(team.designer));
    expect(await currentViewer()).toEqual(team.designer);
    as(nobody);
    expect(await currentViewer()).toBeNull();
  });

  it('is none when it is forged, damaged, past its time or of another form', async () => {
    const good = { sub: team.owner.userId, version: 1 };
    const tokens = [
      'nonsense',
      'a.b.c.d.e',
      await encode({ token: good, secret: 'another secret, also of thirty-two characters' }),
      await encode({ token: good, secret: env().authSecret, maxAge: -60 }),
      await encode({ token: { sub: team.owner.userId }, secret: env().authSecret }),
      await encode({ token: { sub: team.owner.userId, version: '1' }, secret: env().authSecret }),
      await encode({ token: { ...good, version: 2 }, secret: env().authSecret }),
      Buffer.from(JSON.stringify(good)).toString('base64url'),
    ];
    for (const token of tokens) {
      as(withToken(token));
      expect(await currentViewer()).toBeNull();
    }
    as(withToken(await encode({ token: good, secret: env().authSecret })));
    expect(await currentViewer()).toEqual(team.owner);
  });

  it('has another role at once when an owner gives one', async () => {
    const theirs = await browserOf(team.viewer);
    as(theirs);
    expect(await createSheet({ name: 'Mine' })).toMatchObject({ ok: false, error: { code: 'forbidden' } });
    as(await browserOf(team.owner));
    await changeRole({ memberId: await memberIdOf(team.viewer), role: 'designer' });
    as(theirs);
    expect(await createSheet({ name: 'Mine' })).toMatchObject({ ok: true });
  });

  it('ends at once when an owner removes the member', async () => {
    const theirs = await browserOf(team.designer);
    as(await browserOf(team.owner));
    expect(await removeMember({ memberId: await memberIdOf(team.designer) })).toEqual({ ok: true, value: { removed: true } });
    as(theirs);
    expect(await createSheet({ name: 'Mine' })).toMatchObject({ ok: false, error: { code: 'unauthenticated' } });
    await expect(requireViewer()).rejects.toThrow('NEXT_REDIRECT');
  });

  it('goes on in the browser that changed the password, and ends in every other', async () => {
    const [here, elsewhere] = [await browserOf(team.designer), await browserOf(team.designer)];
    as(here);
    expect(await changePassword({ current: PASSWORD, next: 'another password' })).toMatchObject({ ok: true });
    expect(await currentViewer()).toEqual(team.designer);
    as(elsewhere);
    expect(await currentViewer()).toBeNull();
    as(await browserOf(team.reviewer));
    expect(await currentViewer()).toEqual(team.reviewer);
  });

  it('is not changed by a wrong present password, which can be tried a few times only', async () => {
    const here = await browserOf(team.designer);
    as(here);
    const wrong = { current: 'not it', next: 'another password' };
    for (let i = 0; i < LIMITS.passwordByAccount.most; i += 1) {
      expect(await changePassword(wrong)).toMatchObject({
        ok: false,
        error: { code: 'invalid', fields: { current: 'That is not your present password.' } },
      });
    }
    expect(await changePassword({ ...wrong, current: PASSWORD })).toMatchObject({ ok: false, error: { code: 'tooMany' } });
    expect(await currentViewer()).toEqual(team.designer);
  });

  it('holds no name and no address in its token or in what next-auth tells the browser', async () => {
    const { callbacks } = authOptions();
    const user = { id: team.owner.userId, sessionVersion: 3, name: 'Ada', email: 'ada@team.example' };
    const token = await callbacks?.jwt?.({ token: { name: 'Ada', email: 'ada@team.example' }, user, account: null });
    expect(token).toEqual({ sub: team.owner.userId, version: 3 });
    const session = { expires: '2026-01-01T00:00:00Z', user: { name: 'Ada', email: 'ada@team.example' } };
    expect(
      await callbacks?.session?.({
        session,
        token: token ?? {},
        user: { id: '', email: '', emailVerified: null },
        newSession: null,
        trigger: 'update',
      }),
    ).toEqual({ expires: '2026-01-01T00:00:00Z' });
  });
});

describe('signing up', () => {
  const form = { name: 'Grace', email: 'Grace@Team.example ', password: 'ten letters', team: 'Hopper’s' };
  const from = (address: string): Browser => ({ cookies: new Map(), headers: { 'x-ohmstead-peer': address } });

  it('makes an account under the address in lower case', async () => {
    as(from('192.0.2.1'));
    expect(await signUp(form)).toEqual({ ok: true, value: { email: 'grace@team.example' } });
    expect(await findCredentials('grace@team.example')).toMatchObject({ inTeam: true });
  });

  it('says that an address is taken, and changes nothing of the account', async () => {
    as(from('192.0.2.1'));
    await signUp(form);
    const before = await findCredentials('grace@team.example');
    expect(await signUp({ ...form, password: 'a different one' })).toMatchObject({
      ok: false,
      error: { code: 'invalid', fields: { email: expect.stringContaining('already') } },
    });
    expect(await findCredentials('grace@team.example')).toEqual(before);
  });

  it('names each field that is not right', async () => {
    as(from('192.0.2.1'));
    const answer = await signUp({ name: '', email: 'nobody', password: 'short', team: 'x'.repeat(81) });
    expect(answer).toMatchObject({ ok: false, error: { code: 'invalid' } });
    expect(!answer.ok && Object.keys(answer.error.fields ?? {}).toSorted()).toEqual(['email', 'name', 'password', 'team']);
  });

  it('is limited for each network address, taken or not', async () => {
    as(from('192.0.2.1'));
    const most = LIMITS.signUpByAddress.most;
    for (let i = 0; i < most; i += 1) await signUp({ ...form, email: 'one@team.example' });
    expect(await signUp({ ...form, email: 'two@team.example' })).toMatchObject({ ok: false, error: { code: 'tooMany' } });
    as(from('192.0.2.2'));
    expect(await signUp({ ...form, email: 'two@team.example' })).toMatchObject({ ok: true });
  });
});
