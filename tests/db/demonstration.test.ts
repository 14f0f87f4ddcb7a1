import { mkdir, mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { pathToFileURL } from 'node:url';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { Viewer } from '@/app/_shared/wire';
import { writeSheetFile } from '@/canvas/document/export-file';
import { models } from '@/db/models/models';
import { findCredentials, findViewer } from '@/db/queries/accounts';
import { listNotes } from '@/db/queries/notes';
import { listSheets } from '@/db/queries/sheets';
import { listSnapshots } from '@/db/queries/snapshots';
import { accountsSchema } from '@/db/seeds/description';
import accounts from '@/db/seeds/accounts.json';
import { layDemonstration } from '@/db/seeds/demonstration';
import { verifyPassword } from '@/db/password';
import { documentAbout } from './support/documents';
import { closeDatabase, emptyDatabase, freshDatabase } from './support/fresh-database';

const folders: string[] = [];
beforeAll(freshDatabase);
beforeEach(emptyDatabase);
afterAll(async () => {
  await closeDatabase();
  await Promise.all(folders.map((folder) => rm(folder, { recursive: true })));
});

const owner = 'o@saltmarsh.example';
const designer = 'd@saltmarsh.example';
const reviewer = 'r@saltmarsh.example';

async function folderWith(files: Readonly<Record<string, string>>): Promise<URL> {
  const folder = await mkdtemp(path.join(tmpdir(), 'demonstration-'));
  folders.push(folder);
  await mkdir(path.join(folder, 'sheets'));
  const team = [
    { email: owner, name: 'O', role: 'owner' },
    { email: designer, name: 'D', role: 'designer' },
    { email: reviewer, name: 'R', role: 'reviewer' },
  ];
  const all = { 'accounts.json': JSON.stringify({ password: 'ten letters', accounts: team }), ...files };
  for (const [name, text] of Object.entries(all)) await writeFile(path.join(folder, name), text);
  return pathToFileURL(`${folder}/`);
}

const two = {
  'sheets/b.json': writeSheetFile({ name: 'Second', document: documentAbout('b') }),
  'sheets/a.json': writeSheetFile({ name: 'First', document: documentAbout('a') }),
  'sheets/notes.txt': 'no sheet',
};

async function viewerOf(email: string): Promise<Viewer> {
  const viewer = await findViewer((await findCredentials(email))?.userId ?? '', 1);
  if (!viewer) throw new Error(`${email} is not there`);
  return viewer;
}

describe('the demonstration', () => {
  it('as it is shipped lays every account with the printed password, once', async () => {
    expect(await layDemonstration()).toBe('laid');
    expect(await layDemonstration()).toBe('already there');
    for (const account of accountsSchema.parse(accounts).accounts) {
      expect(await viewerOf(account.email)).toMatchObject({ role: account.role, teamName: 'Saltmarsh Acoustics' });
      const { passwordHash = '' } = (await findCredentials(account.email)) ?? {};
      expect(await verifyPassword(passwordHash, accounts.password)).toBe(true);
    }
    expect(new Set(accounts.accounts.map((account) => account.role)).size).toBe(4);
    const viewer = await viewerOf(accounts.accounts[0]?.email ?? '');
    const { sheets } = await listSheets(viewer, { search: '', sort: 'name', archived: false });
    expect(sheets.map((sheet) => sheet.name)).toEqual([
      '40 kHz transducer match',
      'Hydrophone anti-alias low-pass',
      'Hydrophone preamplifier',
      'Mains inlet filter',
      'Pump-motor power-factor bank',
      'Two-way monitor crossover',
    ]);
    for (const sheet of sheets) expect(sheet.purpose.length).toBeGreaterThan(80);
    expect(sheets.filter((sheet) => sheet.snapshotCount > 0 && sheet.openNoteCount > 0)).toHaveLength(1);
  });

  it('lays sheets in the order of their files, snapshots and note threads', async () => {
    const description = {
      drawnBy: { b: owner },
      snapshots: [{ sheet: 'a', name: 'Issued', by: designer }],
      notes: [
        {
          sheet: 'a',
          anchor: { kind: 'place', at: { x: 1, y: 2 } },
          class: 'major',
          text: 'Why?',
          by: reviewer,
          replies: [
            { by: designer, text: 'Because.' },
            { by: reviewer, text: 'I see.' },
          ],
        },
        { sheet: 'a', anchor: { kind: 'place', at: { x: 0, y: 0 } }, class: 'query', text: 'Done?', by: owner, resolvedBy: reviewer },
      ],
    };
    const from = await folderWith({ ...two, 'demonstration.json': JSON.stringify(description) });
    expect(await layDemonstration(from)).toBe('laid');
    const viewer = await viewerOf(reviewer);
    const { sheets } = await listSheets(viewer, { search: '', sort: 'changed', archived: false });
    expect(sheets).toMatchObject([
      { name: 'First', purpose: 'a', changedBy: 'D', snapshotCount: 1, openNoteCount: 1 },
      { name: 'Second', purpose: 'b', changedBy: 'O', snapshotCount: 0, openNoteCount: 0 },
    ]);
    expect(await listSnapshots(viewer, sheets[0]?.id ?? '')).toMatchObject([{ number: 1, name: 'Issued', revision: 1 }]);
    expect(await listNotes(viewer, sheets[0]?.id ?? '')).toMatchObject([
      { number: 1, class: 'major', author: 'R', resolved: null, replies: [{ text: 'Because.' }, { text: 'I see.' }] },
      { number: 2, author: 'O', resolved: { by: 'R' }, replies: [] },
    ]);
  });

  it('is laid once when two processes lay it at once', async () => {
    const from = await folderWith(two);
    const outcomes = await Promise.all([layDemonstration(from), layDemonstration(from), layDemonstration(from)]);
    expect(outcomes.filter((outcome) => outcome === 'laid')).toHaveLength(1);
    expect(await models().Sheet.count()).toBe(2);
  });

  it.each([
    ['a sheet that is none', { 'sheets/a.json': '{}' }, 'a.json'],
    ['a note on no sheet', { 'demonstration.json': JSON.stringify({ snapshots: [{ sheet: 'z', name: 'x', by: owner }] }) }, 'z'],
    [
      'somebody who is not there',
      { ...two, 'demonstration.json': JSON.stringify({ snapshots: [{ sheet: 'a', name: 'x', by: 'x@saltmarsh.example' }] }) },
      'x@saltmarsh.example',
    ],
  ])('says which file is wrong and lays nothing: %s', async (_, files, named) => {
    await expect(layDemonstration(await folderWith(files))).rejects.toThrow(named);
    expect(await models().User.count()).toBe(0);
    expect(await models().Sheet.count()).toBe(0);
  });
});
