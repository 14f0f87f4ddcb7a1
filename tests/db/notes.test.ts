import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Role } from '@/app/_shared/roles';
import type { NoteThread, Viewer } from '@/app/_shared/wire';
import type { NoteAnchor } from '@/canvas/document/notes';
import * as notes from '@/db/queries/notes';
import { createSheet } from '@/db/queries/sheet-changes';
import { listSheets } from '@/db/queries/sheets';
import { makeTeam } from './support/people';
import { documentAbout } from './support/documents';
import { closeDatabase, freshDatabase } from './support/fresh-database';

let team: Readonly<Record<Role, Viewer>>;
let others: Readonly<Record<Role, Viewer>>;

const anchor: NoteAnchor = { kind: 'part', part: 'p1', at: { x: 20, y: -40 } };

beforeAll(async () => {
  await freshDatabase();
  team = await makeTeam('Ours');
  others = await makeTeam('Theirs');
});
afterAll(closeDatabase);

function newSheet(): Promise<string> {
  return createSheet(team.designer, { name: 'Filter', document: documentAbout('x') });
}

async function pin(sheetId: string, text = 'Is this rated for it?'): Promise<NoteThread> {
  const thread = await notes.createNote(team.reviewer, { sheetId, anchor, class: 'query', text });
  if (!thread) throw new Error('not found');
  return thread;
}

describe('notes', () => {
  it.each<NoteAnchor>([
    anchor,
    { kind: 'node', part: 'p"\\\u0000🐟', pin: 'a', at: { x: 0.5, y: 0 } },
    { kind: 'place', at: { x: -100_000, y: 100_000 } },
  ])('keep what they are pinned to: $kind', async (pinned) => {
    const sheetId = await newSheet();
    const thread = await notes.createNote(team.reviewer, { sheetId, anchor: pinned, class: 'major', text: 'x' });
    expect(thread?.anchor).toEqual(pinned);
    expect((await notes.listNotes(team.viewer, sheetId))[0]?.anchor).toEqual(pinned);
  });

  it('have room for the longest anchor and text that the schema lets in', async () => {
    const sheetId = await newSheet();
    const longest: NoteAnchor = {
      kind: 'node',
      part: '\u0001'.repeat(40),
      pin: '\u0001'.repeat(20),
      at: { x: -99_999.123456789012, y: -99_999.123456789012 },
    };
    const text = '🐟'.repeat(2000);
    const thread = await notes.createNote(team.reviewer, { sheetId, anchor: longest, class: 'minor', text });
    expect(thread).toMatchObject({ anchor: longest, text });
  });

  it('are numbered on each sheet without a gap or a double, however many at once', async () => {
    const [one, two] = [await newSheet(), await newSheet()];
    const threads = await Promise.all(Array.from({ length: 24 }, (_, i) => pin(i % 2 === 0 ? one : two)));
    for (const sheetId of [one, two]) {
      const listed = await notes.listNotes(team.viewer, sheetId);
      expect(listed.map((thread) => thread.number)).toEqual(Array.from({ length: 12 }, (_, i) => i + 1));
    }
    expect(new Set(threads.map((thread) => thread.id)).size).toBe(24);
  });

  it('are answered, closed and opened again, and say by whom', async () => {
    const sheetId = await newSheet();
    const { id: noteId } = await pin(sheetId);
    for (const text of ['Yes, 2 W.', 'Derated to 1 W.']) {
      expect(await notes.replyNote(team.designer, { noteId, text })).toMatchObject({ kind: 'changed' });
    }
    const closed = await notes.resolveNote(team.reviewer, noteId);
    expect(closed).toMatchObject({
      resolved: { by: team.reviewer.name },
      replies: [
        { author: team.designer.name, text: 'Yes, 2 W.' },
        { author: team.designer.name, text: 'Derated to 1 W.' },
      ],
    });
    expect(await notes.resolveNote(team.owner, noteId)).toEqual(closed);
    expect(await notes.listNotes(team.viewer, sheetId)).toEqual([closed]);
    expect((await notes.reopenNote(team.owner, noteId))?.resolved).toBeNull();
  });

  it('are counted in the list while they are open', async () => {
    const sheetId = await newSheet();
    const { id: noteId } = await pin(sheetId);
    await pin(sheetId);
    const count = async (): Promise<number | undefined> =>
      (await listSheets(team.viewer, { search: '', sort: 'changed', archived: false })).sheets.find(
        (sheet) => sheet.id === sheetId,
      )?.openNoteCount;
    expect(await count()).toBe(2);
    await notes.resolveNote(team.reviewer, noteId);
    expect(await count()).toBe(1);
  });

  it('move the version at every change, and at no look', async () => {
    const sheetId = await newSheet();
    const seen: (number | null)[] = [await notes.findNotesVersion(team.viewer, sheetId)];
    const { id: noteId } = await pin(sheetId);
    const steps = [
      () => notes.replyNote(team.designer, { noteId, text: 'x' }),
      () => notes.resolveNote(team.reviewer, noteId),
      () => notes.reopenNote(team.reviewer, noteId),
    ];
    seen.push(await notes.findNotesVersion(team.viewer, sheetId));
    for (const step of steps) {
      await step();
      await notes.listNotes(team.viewer, sheetId);
      seen.push(await notes.findNotesVersion(team.viewer, sheetId));
    }
    expect(seen).toEqual([0, 1, 2, 3, 4]);
  });

  it('hold a bounded number of answers', async () => {
    const { id: noteId } = await pin(await newSheet());
    const outcomes = await Promise.all(
      Array.from({ length: 210 }, (_, i) => notes.replyNote(team.designer, { noteId, text: `${i}` })),
    );
    expect(outcomes.filter((outcome) => outcome.kind === 'changed')).toHaveLength(200);
    expect(outcomes.filter((outcome) => outcome.kind === 'full')).toHaveLength(10);
  });

  it('are not found by another team', async () => {
    const sheetId = await newSheet();
    const { id: noteId } = await pin(sheetId);
    expect(await notes.findNotesVersion(others.owner, sheetId)).toBeNull();
    expect(await notes.listNotes(others.owner, sheetId)).toEqual([]);
    expect(await notes.createNote(others.reviewer, { sheetId, anchor, class: 'query', text: 'x' })).toBeNull();
    expect(await notes.replyNote(others.designer, { noteId, text: 'x' })).toEqual({ kind: 'notFound' });
    expect(await notes.resolveNote(others.reviewer, noteId)).toBeNull();
    expect(await notes.reopenNote(others.reviewer, noteId)).toBeNull();
    expect(await notes.listNotes(team.viewer, sheetId)).toMatchObject([{ number: 1, resolved: null, replies: [] }]);
  });
});
