import './support/configuration';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import type { Role } from '@/app/_shared/roles';
import type { Viewer } from '@/app/_shared/wire';
import { GET as health } from '@/app/api/health/route';
import { GET as list } from '@/app/api/sheets/route';
import { GET as read } from '@/app/api/sheets/[id]/route';
import { GET as exported } from '@/app/api/sheets/[id]/export/route';
import { GET as notes } from '@/app/api/sheets/[id]/notes/route';
import { GET as snapshots } from '@/app/api/sheets/[id]/snapshots/route';
import { GET as snapshot } from '@/app/api/snapshots/[id]/route';
import { GET as members } from '@/app/api/team/route';
import { POST as signInDoor } from '@/app/api/auth/[...nextauth]/route';
import { createNote, replyNote, resolveNote, saveSheet, takeSnapshot } from '@/app/sheets/[id]/actions';
import { archiveSheet, cloneSheet, createSheet, importSheet } from '@/app/sheets/actions';
import { emptySheetDocument, parseSheetDocument, serializeSheetDocument } from '@/canvas/document/schema';
import { MAX_DOCUMENT_CHARACTERS } from '@/canvas/document/limits';
import { NextRequest } from 'next/server';
import { documentAbout } from '../db/support/documents';
import { closeDatabase, freshDatabase } from '../db/support/fresh-database';
import { makeTeam } from '../db/support/people';
import { as, nobody } from './support/browser';
import { browserOf } from './support/signed-in';

vi.mock('next/headers', () => import('./support/browser'));

let team: Readonly<Record<Role, Viewer>>;

beforeAll(async () => {
  await freshDatabase();
  team = await makeTeam('Ours');
  as(await browserOf(team.owner));
});
afterAll(closeDatabase);

type Handler = (request: Request, context: { readonly params: Promise<unknown> }) => Promise<Response>;

function get(handler: Handler, id = '', search = '', headers: Readonly<Record<string, string>> = {}): Promise<Response> {
  const request = new Request(`http://localhost:3000/api${search}`, { headers });
  return handler(request, { params: Promise.resolve(id === '' ? {} : { id }) });
}

async function newSheet(name = 'Filter'): Promise<string> {
  const made = await createSheet({ name });
  if (!made.ok) throw new Error(made.error.message);
  return made.value.id;
}

describe('the health question', () => {
  it('is answered to anyone', async () => {
    const response = await health(new Request('http://localhost:3000/api/health'), { params: Promise.resolve({}) });
    expect(response.status).toBe(200);
    expect(await response.json()).toEqual({ status: 'ok', database: 'answers' });
    expect(response.headers.get('cache-control')).toBe('no-store');
  });
});

describe('a handler', () => {
  it('lets nothing in between keep an answer', async () => {
    const id = await newSheet();
    for (const response of [await get(list), await get(read, id), await get(members), await get(exported, id)]) {
      expect(response.status).toBe(200);
      expect(response.headers.get('cache-control')).toMatch(/^private, no-store$/);
    }
  });

  it('answers what the page needs, and no column more', async () => {
    const id = await newSheet('Whole');
    const taken = await takeSnapshot({ id, revision: 1, name: 'A' });
    const note = await createNote({ sheetId: id, anchor: { kind: 'place', at: { x: 0, y: 0 } }, class: 'major', text: 'x' });
    if (!taken.ok || !note.ok) throw new Error('not made');
    await replyNote({ noteId: note.value.id, text: 'y' });
    await resolveNote({ noteId: note.value.id });
    const keys = async (response: Response, ...path: readonly (string | number)[]): Promise<string> => {
      let at: unknown = await response.json();
      for (const step of ['value', ...path]) at = typeof at === 'object' && at ? Reflect.get(at, step) : undefined;
      return Object.keys(at ?? {}).toSorted().join(' ');
    };
    expect(await keys(await get(read, id))).toBe(
      'archived changedAt changedBy document id name origin revision teamName',
    );
    expect(await keys(await get(list), 'sheets', 0)).toBe(
      'archived changedAt changedBy createdAt id name openNoteCount origin partCount purpose revision snapshotCount',
    );
    expect(await keys(await get(snapshots, id), 0)).toBe('id name number revision sheetId takenAt takenBy');
    expect(await keys(await get(snapshot, taken.value.id))).toBe(
      'document id name number revision sheetId sheetName takenAt takenBy',
    );
    expect(await keys(await get(notes, id), 0)).toBe('anchor author class id number replies resolved text writtenAt');
    expect(await keys(await get(notes, id), 0, 'replies', 0)).toBe('author id text writtenAt');
    expect(await keys(await get(members), 0)).toBe('email id joinedAt name role self');
  });
});

describe('the list of sheets', () => {
  it('searches, sorts and looks into the archive by the address', async () => {
    const id = await newSheet('Zebra match');
    await newSheet('Aardvark match');
    const names = async (search: string): Promise<readonly string[]> => {
      const body = await (await get(list, '', search)).json();
      return body.value.sheets.map((sheet: { readonly name: string }) => sheet.name);
    };
    expect(await names('?search=match&sort=name')).toEqual(['Aardvark match', 'Zebra match']);
    await archiveSheet({ id });
    expect(await names('?search=match&sort=name')).toEqual(['Aardvark match']);
    expect(await names('?search=match&archived=true')).toEqual(['Zebra match']);
  });

  it.each([
    '?sort=changedAt;DROP TABLE sheets',
    '?sort=constructor',
    '?archived=maybe',
    `?search=${'x'.repeat(121)}`,
  ])('refuses %s', async (search) => {
    const response = await get(list, '', search);
    expect(response.status).toBe(400);
    expect(await response.json()).toMatchObject({ ok: false, error: { code: 'invalid' } });
  });
});

describe('the notes of an open sheet', () => {
  it('are sent again only when they have changed', async () => {
    const id = await newSheet();
    const first = await get(notes, id);
    const tag = first.headers.get('etag') ?? '';
    expect(tag).toMatch(/^W\/"/);
    const same = await get(notes, id, '', { 'if-none-match': tag });
    expect(same.status).toBe(304);
    expect(await same.text()).toBe('');
    expect(same.headers.get('etag')).toBe(tag);
    expect((await get(notes, id, '', { 'if-none-match': `"other", ${tag}` })).status).toBe(304);
    const made = await createNote({ sheetId: id, anchor: { kind: 'place', at: { x: 0, y: 0 } }, class: 'query', text: 'x' });
    if (!made.ok) throw new Error(made.error.message);
    const changed = await get(notes, id, '', { 'if-none-match': tag });
    expect(changed.status).toBe(200);
    expect(changed.headers.get('etag')).not.toBe(tag);
    expect(await changed.json()).toEqual({ ok: true, value: [made.value] });
  });

  it('are not found for 304 either by someone who may not see them', async () => {
    const id = await newSheet();
    const tag = (await get(notes, id)).headers.get('etag') ?? '';
    as(await browserOf((await makeTeam('Theirs')).owner));
    expect((await get(notes, id, '', { 'if-none-match': tag })).status).toBe(404);
    as(nobody);
    expect((await get(notes, id, '', { 'if-none-match': tag })).status).toBe(401);
    as(await browserOf(team.owner));
  });
});

describe('a sheet file', () => {
  it('exports, and imports again to an equal sheet', async () => {
    const id = await newSheet('Ω and “quotes”');
    const document = {
      ...documentAbout('50 Ω ∠ −30° 🐟'),
      parts: [
        { id: 'r1', kind: 'resistor', at: { x: 0, y: 0 }, turn: 90, mirrored: false, designator: 'R1', values: { resistance: '4k7' } },
      ],
    };
    const read1 = parseSheetDocument(JSON.stringify(document));
    if (!read1.ok) throw new Error(read1.message);
    await saveSheet({ id, revision: 1, document: serializeSheetDocument(read1.document) });
    const response = await get(exported, id);
    expect(response.headers.get('content-type')).toBe('application/json; charset=utf-8');
    expect(response.headers.get('content-disposition')).toBe(
      `attachment; filename="and quotes.sheet.json"; filename*=UTF-8''%CE%A9%20and%20%E2%80%9Cquotes%E2%80%9D.sheet.json`,
    );
    const imported = await importSheet({ text: await response.text() });
    if (!imported.ok) throw new Error(imported.error.message);
    const [one, other] = await Promise.all(
      [id, imported.value.id].map(async (sheet) => (await (await get(read, sheet)).json()).value),
    );
    expect(other.document).toBe(one.document);
    expect(other.name).toBe('Ω and “quotes”');
    expect(other.document).toContain('4k7');
  });

  const envelope = (document: unknown): string =>
    JSON.stringify({ format: 'ohmstead-sheet', fileVersion: 1, name: 'x', document });
  it.each([
    ['nothing', ''],
    ['no JSON', 'hello'],
    ['a file that was cut short', envelope(emptySheetDocument()).slice(0, -5)],
    ['a foreign file', '{"version":1}'],
    ['a file of a newer version', envelope({ ...emptySheetDocument(), version: 99 })],
    ['a part of no kind', envelope({ ...emptySheetDocument(), parts: [{ id: 'a', kind: 'constructor' }] })],
    ['a deep file', '['.repeat(100_000)],
    ['numbers that are none', envelope({ ...emptySheetDocument(), band: { fromHz: null, toHz: 1e999 } })],
  ])('is refused in words, and nothing is made: %s', async (_, text) => {
    const count = async (): Promise<number> => (await (await get(list)).json()).value.sheets.length;
    const before = await count();
    const answer = await importSheet({ text });
    expect(answer).toMatchObject({ ok: false, error: { code: 'invalid' } });
    expect(!answer.ok && answer.error.message).toMatch(/^[A-Z].*[.)]$/);
    expect(!answer.ok && answer.error.reference).toBeFalsy();
    expect(await count()).toBe(before);
  });

  it('is refused when it is too large, before it is read', async () => {
    expect(await importSheet({ text: 'x'.repeat(MAX_DOCUMENT_CHARACTERS + 1) })).toMatchObject({
      ok: false,
      error: { code: 'invalid', message: expect.stringContaining('2 million characters') },
    });
  });

  it('brings no keys of its own into the house', async () => {
    const hostile = envelope(emptySheetDocument()).replace('"parts":[]', '"parts":[],"__proto__":{"polluted":1},"extra":2');
    const answer = await importSheet({ text: hostile });
    if (!answer.ok) throw new Error(answer.error.message);
    const { value } = await (await get(read, answer.value.id)).json();
    expect(value.document).not.toContain('polluted');
    expect(value.document).not.toContain('extra');
    expect(Reflect.get({}, 'polluted')).toBeUndefined();
  });
});

describe('an action', () => {
  it('refuses a name of 100,000 characters with the schema’s own sentence', async () => {
    expect(await createSheet({ name: 'x'.repeat(100_000) })).toEqual({
      ok: false,
      error: {
        code: 'invalid',
        message: 'A sheet name has at most 120 characters.',
        fields: { name: 'A sheet name has at most 120 characters.' },
      },
    });
  });

  it('refuses a document that is none, and changes nothing', async () => {
    const id = await newSheet();
    for (const document of ['', 'null', '{"version":1}', '[]', '{"version":2}']) {
      expect(await saveSheet({ id, revision: 1, document })).toMatchObject({ ok: false, error: { code: 'invalid' } });
      expect(await cloneSheet({ id, document })).toMatchObject({ ok: false, error: { code: 'invalid' } });
    }
    expect((await (await get(read, id)).json()).value).toMatchObject({ revision: 1 });
  });

  it('says to look again when a snapshot is asked of a sheet that has moved on', async () => {
    const id = await newSheet();
    await saveSheet({ id, revision: 1, document: serializeSheetDocument(documentAbout('on')) });
    expect(await takeSnapshot({ id, revision: 1, name: 'late' })).toMatchObject({ ok: false, error: { code: 'conflict' } });
  });
});

describe('the sign-in door', () => {
  const context = { params: Promise.resolve({ nextauth: ['callback', 'credentials'] }) };
  it.each([
    ['a body without a length', {}],
    ['a body larger than any form', { 'content-length': '20000' }],
    ['a length that is none', { 'content-length': 'x' }],
  ])('refuses %s', async (_, headers) => {
    const request = new NextRequest('http://localhost:3000/api/auth/callback/credentials', { method: 'POST', headers });
    const response = await signInDoor(request, context);
    expect(response.status).toBe(413);
  });
});
