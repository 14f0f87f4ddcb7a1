import './support/configuration';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { ROLES, type Role } from '@/app/_shared/roles';
import type { Viewer } from '@/app/_shared/wire';
import { allowed, PERMISSIONS, type Permission } from '@/app/_server/permissions';
import { statusOf } from '@/app/_server/errors';
import { writeSheetFile } from '@/canvas/document/export-file';
import { serializeSheetDocument } from '@/canvas/document/schema';
import { newId } from '@/db/id';
import { createNote, resolveNote } from '@/db/queries/notes';
import { createSheet } from '@/db/queries/sheet-changes';
import { takeSnapshot } from '@/db/queries/snapshots';
import { documentAbout } from '../db/support/documents';
import { closeDatabase, freshDatabase } from '../db/support/fresh-database';
import { addMember, makeTeam, memberIdOf, PASSWORD } from '../db/support/people';
import { as, nobody } from './support/browser';
import { doorsOf, isActionFile, isRouteFile, sourceFiles, type Door } from './support/doors';
import { browserOf } from './support/signed-in';

vi.mock('next/headers', () => import('./support/browser'));

/** What an asking came to: the code of the failure, or 'ok'; for a handler the status as well. */
type Answer = { readonly code: string; readonly status?: number };
/** How a door is asked about a thing of the team: the input of an action, or the id in a handler's path. */
type Asking = {
  /** Whether the door is about one thing that has an owner, so that another team's is not to be found. */
  readonly owned: boolean;
  readonly input: (team: Readonly<Record<Role, Viewer>>) => Promise<unknown>;
};

const place = { kind: 'place', at: { x: 0, y: 0 } } as const;

async function sheet(team: Readonly<Record<Role, Viewer>>): Promise<string> {
  return createSheet(team.owner, { name: 'Asked about', document: documentAbout('x') });
}
async function snapshot(team: Readonly<Record<Role, Viewer>>): Promise<string> {
  const taken = await takeSnapshot(team.owner, { id: await sheet(team), revision: 1, name: 'S' });
  if (taken.kind !== 'taken') throw new Error(taken.kind);
  return taken.snapshot.id;
}
async function note(team: Readonly<Record<Role, Viewer>>, resolved = false): Promise<string> {
  const thread = await createNote(team.owner, { sheetId: await sheet(team), anchor: place, class: 'query', text: 'x' });
  if (!thread) throw new Error('not found');
  if (resolved) await resolveNote(team.owner, thread.id);
  return thread.id;
}
async function member(team: Readonly<Record<Role, Viewer>>): Promise<string> {
  return memberIdOf(await addMember(team.owner.teamId, 'designer'));
}

const ASKINGS: Readonly<Record<string, Asking>> = {
  'account.changePassword': { owned: false, input: async () => ({ current: PASSWORD, next: 'another password' }) },
  'sheet.create': { owned: false, input: async () => ({ name: 'New' }) },
  'sheet.import': {
    owned: false,
    input: async () => ({ text: writeSheetFile({ name: 'In', document: documentAbout('x') }) }),
  },
  'sheet.rename': { owned: true, input: async (team) => ({ id: await sheet(team), name: 'Other' }) },
  'sheet.archive': { owned: true, input: async (team) => ({ id: await sheet(team) }) },
  'sheet.restore': { owned: true, input: async (team) => ({ id: await sheet(team) }) },
  'sheet.clone': { owned: true, input: async (team) => ({ id: await sheet(team) }) },
  'sheet.save': {
    owned: true,
    input: async (team) => ({
      id: await sheet(team),
      revision: 1,
      document: serializeSheetDocument(documentAbout('changed')),
    }),
  },
  'snapshot.take': { owned: true, input: async (team) => ({ id: await sheet(team), revision: 1, name: 'A' }) },
  'snapshot.restore': { owned: true, input: async (team) => ({ snapshotId: await snapshot(team), revision: 1 }) },
  'note.create': {
    owned: true,
    input: async (team) => ({ sheetId: await sheet(team), anchor: place, class: 'major', text: 'x' }),
  },
  'note.reply': { owned: true, input: async (team) => ({ noteId: await note(team), text: 'x' }) },
  'note.resolve': { owned: true, input: async (team) => ({ noteId: await note(team) }) },
  'note.reopen': { owned: true, input: async (team) => ({ noteId: await note(team, true) }) },
  'team.changeRole': { owned: true, input: async (team) => ({ memberId: await member(team), role: 'viewer' }) },
  'team.removeMember': { owned: true, input: async (team) => ({ memberId: await member(team) }) },
  // Handlers: what stands in the path.
  'sheet.list': { owned: false, input: async () => '' },
  'team.read': { owned: false, input: async () => '' },
  'sheet.read': { owned: true, input: sheet },
  'sheet.export': { owned: true, input: sheet },
  'snapshot.list': { owned: true, input: sheet },
  'note.list': { owned: true, input: sheet },
  'snapshot.read': { owned: true, input: snapshot },
};

async function ask(door: Door, input: unknown): Promise<Answer> {
  if (typeof door.value !== 'function') throw new Error(`${door.name} is no function`);
  if (door.declaration?.kind === 'action') return { code: codeOf(await door.value(input)) };
  const request = new Request('http://localhost:3000/api');
  const response: unknown = await door.value(request, { params: Promise.resolve(input === '' ? {} : { id: input }) });
  if (!(response instanceof Response)) throw new Error('no response');
  if (response.headers.has('content-disposition')) return { code: 'ok', status: response.status };
  return { code: codeOf(await response.json()), status: response.status };
}

function codeOf(result: unknown): string {
  if (typeof result !== 'object' || result === null || !('ok' in result)) throw new Error('no result');
  if (result.ok === true) return 'ok';
  if (!('error' in result) || typeof result.error !== 'object' || result.error === null) throw new Error('no error');
  return 'code' in result.error ? String(result.error.code) : 'none';
}

function expected(door: Door, code: 'ok' | 'unauthenticated' | 'forbidden' | 'notFound'): Answer {
  if (door.declaration?.kind === 'action') return { code };
  return { code, status: code === 'ok' ? 200 : statusOf(code) };
}

const sources = await sourceFiles();
const doors = (await Promise.all(sources.filter((file) => isActionFile(file) || isRouteFile(file)).map(doorsOf)))
  .flat()
  .filter((door) => door.declaration && door.declaration.permission !== 'public')
  .map((door) => ({ ...door, called: door.declaration?.name ?? '' }));

let ours: Readonly<Record<Role, Viewer>>;
let theirs: Readonly<Record<Role, Viewer>>;

beforeAll(async () => {
  await freshDatabase();
  ours = await makeTeam('Ours');
  theirs = await makeTeam('Theirs');
});
afterAll(closeDatabase);

describe.each(doors)('$called', (door) => {
  const asking = ASKINGS[door.called];
  const permission = door.declaration?.permission;
  if (!asking || permission === undefined || permission === 'public') {
    it('is known to this test', () => expect.fail(`${door.called} of ${door.file} is asked by no test`));
    return;
  }

  it('lets nobody in without a session', async () => {
    as(nobody);
    expect(await ask(door, await asking.input(ours))).toEqual(expected(door, 'unauthenticated'));
  });

  it.each(ROLES)('answers a %s as the table says', async (role) => {
    const viewer = await addMember(ours.owner.teamId, role);
    as(await browserOf(viewer));
    const code = allowed(viewer, permission) ? 'ok' : 'forbidden';
    expect(await ask(door, await asking.input(ours))).toEqual(expected(door, code));
  });

  it.each(ROLES)('answers a %s of another team as if nothing were there', async (role) => {
    const stranger = await addMember(theirs.owner.teamId, role);
    as(await browserOf(stranger));
    const own = allowed(stranger, permission) ? 'ok' : 'forbidden';
    expect(await ask(door, await asking.input(ours))).toEqual(expected(door, asking.owned ? 'notFound' : own));
  });

  if (asking.owned) {
    it('does not find what never was', async () => {
      as(await browserOf(ours.owner));
      const input = await asking.input(ours);
      const made =
        typeof input === 'object' && input !== null
          ? Object.fromEntries(Object.entries(input).map(([key, value]) => [key, /id$/i.test(key) ? newId() : value]))
          : newId();
      expect(await ask(door, made)).toEqual(expected(door, 'notFound'));
    });
  }

  it('takes nothing that is not of its form', async () => {
    as(await browserOf(ours.owner));
    if (door.declaration?.kind === 'action') {
      for (const input of [undefined, null, 7, 'x', [], {}, { id: { $ne: '' } }, { __proto__: { id: 'x' } }]) {
        expect(await ask(door, input)).toEqual({ code: 'invalid' });
      }
    } else if (asking.owned) {
      for (const id of ['..', '%', "' OR 1=1 --", 'x'.repeat(5000), '\u0000'.repeat(20)]) {
        expect(await ask(door, id)).toEqual(expected(door, 'notFound'));
      }
    }
  });
});

describe('the table', () => {
  const roles = (permission: Permission): string => ROLES.filter((role) => allowed({ role }, permission)).join(' ');

  it('says what each role is for', () => {
    expect(Object.fromEntries(Object.keys(PERMISSIONS).map((name) => [name, roles(name as Permission)]))).toEqual({
      'sheet.list': 'owner designer reviewer viewer',
      'sheet.read': 'owner designer reviewer viewer',
      'sheet.export': 'owner designer reviewer viewer',
      'sheet.create': 'owner designer',
      'sheet.import': 'owner designer',
      'sheet.save': 'owner designer',
      'sheet.rename': 'owner designer',
      'sheet.archive': 'owner designer',
      'sheet.restore': 'owner designer',
      'sheet.clone': 'owner designer',
      'snapshot.read': 'owner designer reviewer viewer',
      'snapshot.take': 'owner designer',
      'snapshot.restore': 'owner designer',
      'note.read': 'owner designer reviewer viewer',
      'note.create': 'owner designer reviewer',
      'note.reply': 'owner designer reviewer',
      'note.resolve': 'owner reviewer',
      'note.reopen': 'owner reviewer',
      'team.read': 'owner designer reviewer viewer',
      'team.changeRole': 'owner',
      'team.removeMember': 'owner',
      'account.changePassword': 'owner designer reviewer viewer',
    });
  });

  it('describes each of its permissions', () => {
    for (const { description } of Object.values(PERMISSIONS)) expect(description).toMatch(/^[A-Z].{10,}/);
  });
});
