import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Role } from '@/app/_shared/roles';
import type { ListSheetsInput, SaveOutcome, Viewer } from '@/app/_shared/wire';
import { parseSheetDocument, serializeSheetDocument } from '@/canvas/document/schema';
import { newId } from '@/db/id';
import { models } from '@/db/models/models';
import { archiveSheet, cloneSheet, createSheet, renameSheet, restoreSheet, saveSheet } from '@/db/queries/sheet-changes';
import { takeSnapshot } from '@/db/queries/snapshots';
import { findSheet, findSheetDocument, listSheets, MOST_SHEETS } from '@/db/queries/sheets';
import { addMember, makeTeam } from './support/people';
import { documentAbout } from './support/documents';
import { closeDatabase, freshDatabase } from './support/fresh-database';

const everything: ListSheetsInput = { search: '', sort: 'changed', archived: false };

let team: Readonly<Record<Role, Viewer>>;
let others: Readonly<Record<Role, Viewer>>;

beforeAll(async () => {
  await freshDatabase();
  team = await makeTeam('Ours');
  others = await makeTeam('Theirs');
});
afterAll(closeDatabase);

async function newSheet(name = 'Low-pass', purpose = 'first'): Promise<string> {
  return createSheet(team.designer, { name, document: documentAbout(purpose) });
}

function saved(outcome: SaveOutcome | null): Extract<SaveOutcome, { kind: 'saved' }> {
  if (outcome?.kind !== 'saved') throw new Error(`not saved but ${outcome?.kind ?? 'not found'}`);
  return outcome;
}

async function stands(id: string): Promise<{ readonly revision: number; readonly purpose: string }> {
  const sheet = await findSheet(team.viewer, id);
  const read = sheet && parseSheetDocument(sheet.document);
  if (!sheet || !read?.ok) throw new Error('the sheet cannot be read');
  return { revision: sheet.revision, purpose: read.document.purpose };
}

describe('saving', () => {
  it('counts revisions up and keeps what was saved', async () => {
    const id = await newSheet();
    expect(await stands(id)).toEqual({ revision: 1, purpose: 'first' });
    const outcome = saved(await saveSheet(team.owner, { id, revision: 1, document: documentAbout('second') }));
    expect(outcome.revision).toBe(2);
    const sheet = await findSheet(team.viewer, id);
    expect(sheet).toMatchObject({ revision: 2, changedBy: team.owner.name, changedAt: outcome.savedAt });
    expect(await stands(id)).toEqual({ revision: 2, purpose: 'second' });
  });

  it('lets one of many saves at once win, and tells each other what stands there now', async () => {
    const id = await newSheet();
    const outcomes = await Promise.all(
      Array.from({ length: 8 }, (_, i) =>
        saveSheet(i % 2 === 0 ? team.designer : team.owner, { id, revision: 1, document: documentAbout(`hand ${i}`) }),
      ),
    );
    const winners = outcomes.flatMap((outcome, i) => (outcome?.kind === 'saved' ? [i] : []));
    expect(winners).toHaveLength(1);
    const now = await stands(id);
    expect(now).toEqual({ revision: 2, purpose: `hand ${winners[0]}` });
    for (const outcome of outcomes) {
      if (outcome?.kind !== 'conflict') continue;
      expect(outcome.revision).toBe(2);
      expect(outcome.document).toBe(serializeSheetDocument(documentAbout(now.purpose)));
      expect(outcome.changedBy).toBe(winners[0] !== undefined && winners[0] % 2 === 0 ? team.designer.name : team.owner.name);
    }
    expect(outcomes.filter((outcome) => outcome?.kind === 'conflict')).toHaveLength(7);
  });

  it('answers a save that is sent again as the first time, even after others', async () => {
    const id = await newSheet();
    const save = { id, revision: 1, document: documentAbout('sent twice') };
    const first = await saveSheet(team.designer, save);
    expect(await saveSheet(team.designer, save)).toEqual(first);
    expect((await stands(id)).revision).toBe(2);
    saved(await saveSheet(team.owner, { id, revision: 2, document: documentAbout('moved on') }));
    expect(await saveSheet(team.designer, save)).toMatchObject({ kind: 'conflict', revision: 3 });
  });

  it('makes no revision of a document that changes nothing', async () => {
    const id = await newSheet();
    expect(saved(await saveSheet(team.owner, { id, revision: 1, document: documentAbout('first') })).revision).toBe(1);
    expect(await findSheet(team.viewer, id)).toMatchObject({ revision: 1, changedBy: team.designer.name });
  });

  it('sees no conflict where both sides are equal', async () => {
    const id = await newSheet();
    saved(await saveSheet(team.owner, { id, revision: 1, document: documentAbout('the same') }));
    saved(await saveSheet(team.owner, { id, revision: 2, document: documentAbout('another') }));
    saved(await saveSheet(team.owner, { id, revision: 3, document: documentAbout('the same') }));
    expect(await saveSheet(team.designer, { id, revision: 1, document: documentAbout('the same') })).toMatchObject({
      kind: 'saved',
      revision: 4,
    });
  });

  it('refuses a revision that is yet to come', async () => {
    const id = await newSheet();
    expect(await saveSheet(team.owner, { id, revision: 7, document: documentAbout('early') })).toMatchObject({
      kind: 'conflict',
      revision: 1,
    });
  });

  it('finds nothing of another team, whatever the revision', async () => {
    const id = await newSheet();
    expect(await saveSheet(others.owner, { id, revision: 1, document: documentAbout('theirs') })).toBeNull();
    expect(await saveSheet(others.owner, { id, revision: 1, document: documentAbout('first') })).toBeNull();
    expect(await saveSheet(team.owner, { id: newId(), revision: 1, document: documentAbout('nowhere') })).toBeNull();
    expect(await stands(id)).toEqual({ revision: 1, purpose: 'first' });
  });

  it('takes a save of an archived sheet: being filed away costs nobody their work', async () => {
    const id = await newSheet();
    await archiveSheet(team.owner, id);
    expect(saved(await saveSheet(team.designer, { id, revision: 1, document: documentAbout('late') })).revision).toBe(2);
  });
});

describe('hostile text', () => {
  const texts = {
    'a byte of zero': 'a\u0000b',
    'four-byte characters': '🐟⚡️𝔉',
    'combining characters': 'e\u0301\u0327\u0302',
    'right to left': '\u202Eabc\u202C',
    'an attempt at SQL': `'; DROP TABLE sheets; -- \\' " \u0000 \x1a`,
    'a key of every object': '__proto__',
    'placeholders of the query language': ':teamId ? $1',
  };
  it.each(Object.entries(texts))('keeps %s as it is, in the name and in the document', async (_, text) => {
    const id = await newSheet(text, text);
    expect(await findSheet(team.viewer, id)).toMatchObject({ name: text });
    expect(await stands(id)).toEqual({ revision: 1, purpose: text });
    const found = await listSheets(team.viewer, { ...everything, search: text });
    expect(found.sheets.map((sheet) => sheet.id)).toContain(id);
    expect(found.sheets.find((sheet) => sheet.id === id)).toMatchObject({ name: text, purpose: text });
  });

  it('tells names apart that differ in case only by their ids', async () => {
    const id = await newSheet();
    const swapped = id.replace(/[A-Za-z]/g, (c) => (c === c.toLowerCase() ? c.toUpperCase() : c.toLowerCase()));
    expect(swapped).not.toBe(id);
    expect(await findSheet(team.viewer, swapped)).toBeNull();
  });
});

describe('the list', () => {
  let listed: Readonly<Record<Role, Viewer>>;
  beforeAll(async () => {
    listed = await makeTeam('Listed');
    for (const [name, purpose] of [
      ['Mains filter', 'keeps 50 Hz'],
      ['crossover', '100% of the band'],
      ['Anti-alias', 'snake_case_name'],
      ['Back\\slash', 'none'],
    ] as const) {
      await createSheet(listed.designer, { name, document: documentAbout(purpose) });
    }
  });

  async function names(wanted: Partial<ListSheetsInput>): Promise<readonly string[]> {
    return (await listSheets(listed.viewer, { ...everything, ...wanted })).sheets.map((sheet) => sheet.name);
  }

  it('finds in names and purposes, in any case', async () => {
    expect(await names({ search: 'MAINS' })).toEqual(['Mains filter']);
    expect(await names({ search: '50 hz' })).toEqual(['Mains filter']);
    expect(await names({ search: 'nothing like it' })).toEqual([]);
  });

  it('takes the wildcards of LIKE as characters', async () => {
    expect(await names({ search: '%' })).toEqual(['crossover']);
    expect(await names({ search: '_' })).toEqual(['Anti-alias']);
    expect(await names({ search: '\\' })).toEqual(['Back\\slash']);
    expect(await names({ search: 'M_ins' })).toEqual([]);
  });

  it('sorts by name, by making and by change', async () => {
    expect(await names({ sort: 'name' })).toEqual(['Anti-alias', 'Back\\slash', 'crossover', 'Mains filter']);
    expect(await names({ sort: 'created' })).toEqual(['Back\\slash', 'Anti-alias', 'crossover', 'Mains filter']);
    const id = (await listSheets(listed.viewer, everything)).sheets.find((sheet) => sheet.name === 'crossover')?.id ?? '';
    await saveSheet(listed.owner, { id, revision: 1, document: documentAbout('100% of the band, again') });
    expect((await names({ sort: 'changed' }))[0]).toBe('crossover');
  });

  it('keeps the archive apart, and gives back what was archived', async () => {
    const id = (await listSheets(listed.viewer, { ...everything, search: 'Mains' })).sheets[0]?.id ?? '';
    expect(await archiveSheet(listed.designer, id)).toBe(true);
    expect(await archiveSheet(listed.designer, id)).toBe(true);
    expect(await names({ search: 'Mains' })).toEqual([]);
    expect(await names({ search: 'Mains', archived: true })).toEqual(['Mains filter']);
    expect(await restoreSheet(listed.designer, id)).toBe(true);
    expect(await names({ search: 'Mains' })).toEqual(['Mains filter']);
    expect(await names({ archived: true })).toEqual([]);
  });

  it('shows nothing of another team', async () => {
    expect((await listSheets(others.owner, everything)).sheets).toEqual([]);
    const id = (await listSheets(listed.viewer, everything)).sheets[0]?.id ?? '';
    expect(await findSheet(others.owner, id)).toBeNull();
    expect(await findSheetDocument(others.owner, id)).toBeNull();
    expect(await renameSheet(others.owner, id, 'Taken')).toBe(false);
    expect(await archiveSheet(others.owner, id)).toBe(false);
    expect(await cloneSheet(others.owner, { sheetId: id })).toBeNull();
  });

  it('says when there is more than it shows', async () => {
    const many = await makeTeam('Many');
    const { Sheet } = models();
    const stored = await Sheet.findOne({ where: { teamId: listed.owner.teamId }, raw: true, rejectOnEmpty: true });
    const copies = (from: number, to: number): object[] =>
      Array.from({ length: to - from }, (_, i) => ({ ...stored, id: newId(), teamId: many.owner.teamId, name: `${from + i}` }));
    await Sheet.bulkCreate(copies(0, MOST_SHEETS).map((row) => ({ ...stored, ...row })));
    expect(await listSheets(many.viewer, everything)).toMatchObject({ more: false, sheets: { length: MOST_SHEETS } });
    await Sheet.bulkCreate(copies(MOST_SHEETS, MOST_SHEETS + 1).map((row) => ({ ...stored, ...row })));
    expect(await listSheets(many.viewer, everything)).toMatchObject({ more: true, sheets: { length: MOST_SHEETS } });
  });
});

describe('renaming and cloning', () => {
  it('renames without a new revision, and to the same name too', async () => {
    const id = await newSheet('Before');
    expect(await renameSheet(team.designer, id, 'After')).toBe(true);
    expect(await renameSheet(team.designer, id, 'After')).toBe(true);
    expect(await findSheet(team.viewer, id)).toMatchObject({ name: 'After', revision: 1 });
  });

  it('remembers where a clone came from, even when that is renamed', async () => {
    const id = await newSheet('Filter', 'original');
    await saveSheet(team.designer, { id, revision: 1, document: documentAbout('changed') });
    const clone = await cloneSheet(team.owner, { sheetId: id });
    expect(clone?.name).toBe('Filter (clone)');
    await renameSheet(team.designer, id, 'Renamed');
    const sheet = await findSheet(team.viewer, clone?.id ?? '');
    expect(sheet).toMatchObject({
      name: 'Filter (clone)',
      revision: 1,
      changedBy: team.owner.name,
      origin: { sheetId: id, sheetName: 'Filter', snapshotName: null, revision: 2 },
    });
    expect(await stands(clone?.id ?? '')).toEqual({ revision: 1, purpose: 'changed' });
    const listed = await listSheets(team.viewer, { ...everything, search: 'Filter (clone)' });
    expect(listed.sheets[0]?.origin).toEqual(sheet?.origin);
  });

  it('clones a snapshot of that sheet and of no other', async () => {
    const id = await newSheet('With snapshot', 'frozen');
    const taken = await takeSnapshot(team.designer, { id, revision: 1, name: 'A' });
    if (taken.kind !== 'taken') throw new Error(taken.kind);
    await saveSheet(team.designer, { id, revision: 1, document: documentAbout('later') });
    const clone = await cloneSheet(team.designer, { sheetId: id, snapshotId: taken.snapshot.id, name: 'Given' });
    expect(clone?.name).toBe('Given');
    expect(await stands(clone?.id ?? '')).toEqual({ revision: 1, purpose: 'frozen' });
    expect((await findSheet(team.viewer, clone?.id ?? ''))?.origin).toEqual({
      sheetId: id,
      sheetName: 'With snapshot',
      snapshotName: 'A',
      revision: 1,
    });
    expect(await cloneSheet(team.designer, { sheetId: await newSheet(), snapshotId: taken.snapshot.id })).toBeNull();
  });

  it('clones what this machine holds after a conflict', async () => {
    const id = await newSheet();
    const clone = await cloneSheet(team.designer, { sheetId: id, document: documentAbout('mine') });
    expect(await stands(clone?.id ?? '')).toEqual({ revision: 1, purpose: 'mine' });
    expect(await stands(id)).toEqual({ revision: 1, purpose: 'first' });
  });

  it('keeps the name of a clone within its bound and its characters whole', async () => {
    const clone = await cloneSheet(team.designer, { sheetId: await newSheet('🐟'.repeat(60)) });
    expect(clone?.name).toBe(`${'🐟'.repeat(56)} (clone)`);
    expect(clone?.name.length).toBeLessThanOrEqual(120);
  });
});

it('keeps showing who changed a sheet after they have left', async () => {
  const passing = await addMember(team.owner.teamId, 'designer');
  const id = await createSheet(passing, { name: 'Left behind', document: documentAbout('x') });
  await models().Member.update({ removedAt: new Date() }, { where: { userId: passing.userId } });
  expect(await findSheet(team.viewer, id)).toMatchObject({ changedBy: passing.name });
});
