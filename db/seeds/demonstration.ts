import { readdir, readFile } from 'node:fs/promises';
import { UniqueConstraintError, type Transaction } from 'sequelize';
import type { Role } from '@/app/_shared/roles';
import { parseSheetFile } from '@/canvas/document/export-file';
import type { SheetDocument } from '@/canvas/document/types';
import { inTransaction, select } from '../client';
import { newId } from '../id';
import { models } from '../models/models';
import type { Sheet as SheetRow } from '../models/sheet';
import { hashPassword } from '../password';
import { toStored } from '../stored-document';
import { accountsSchema, descriptionSchema, type Description } from './description';

const TEAM = 'Saltmarsh Acoustics';
const HERE = new URL('./', import.meta.url);

type Account = { readonly id: string; readonly email: string; readonly name: string; readonly role: Role };
type Drawn = { readonly key: string; readonly name: string; readonly document: SheetDocument };
type Demonstration = {
  readonly password: string;
  readonly accounts: readonly Account[];
  readonly sheets: readonly Drawn[];
  readonly description: Description;
};

/**
 * Lays the demonstration team with its accounts, sheets, snapshots and notes: all of it, or none.
 * @param from the folder that holds `accounts.json`, `sheets/` and, if there is more to lay, `demonstration.json`
 * @returns 'already there' when the team's accounts exist, however much they have changed since
 * @throws Error naming the file and what is wrong in it
 */
export async function layDemonstration(from: URL = HERE): Promise<'laid' | 'already there'> {
  const demonstration = await readDemonstration(from);
  const emails = demonstration.accounts.map((account) => account.email);
  const there = await select<{ readonly id: string }>('SELECT id FROM users WHERE email IN (:emails)', { emails });
  if (there.length > 0) return 'already there';
  const passwordHash = await hashPassword(demonstration.password);
  try {
    await inTransaction((transaction) => lay(demonstration, passwordHash, transaction));
    return 'laid';
  } catch (error) {
    // Another process laid it between the look and the writing.
    if (error instanceof UniqueConstraintError) return 'already there';
    throw error;
  }
}

async function readDemonstration(from: URL): Promise<Demonstration> {
  const accounts = accountsSchema.parse(JSON.parse(await readFile(new URL('accounts.json', from), 'utf8')));
  const folder = new URL('sheets/', from);
  const files = (await namesIn(folder)).filter((name) => name.endsWith('.json')).sort();
  const sheets = await Promise.all(
    files.map(async (file): Promise<Drawn> => {
      const read = parseSheetFile(await readFile(new URL(file, folder), 'utf8'));
      if (!read.ok) throw new Error(`The demonstration sheet ${file} cannot be read: ${read.message}`);
      return { key: file.slice(0, -'.json'.length), name: read.name, document: read.document };
    }),
  );
  const described = (await namesIn(from)).includes('demonstration.json')
    ? await readFile(new URL('demonstration.json', from), 'utf8')
    : '{}';
  return {
    password: accounts.password,
    accounts: accounts.accounts.map((account) => ({ ...account, id: newId() })),
    sheets,
    description: descriptionSchema.parse(JSON.parse(described)),
  };
}

async function namesIn(folder: URL): Promise<readonly string[]> {
  try {
    return await readdir(folder);
  } catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'ENOENT') return [];
    throw error;
  }
}

async function lay(demonstration: Demonstration, passwordHash: string, transaction: Transaction): Promise<void> {
  const { Member, Note, Reply, Sheet, Snapshot, Team, User } = models();
  const { accounts, description, sheets } = demonstration;
  const now = Date.now();
  const createdAt = new Date(now);

  const team = await Team.create({ id: newId(), name: TEAM, createdAt }, { transaction });
  for (const { id, email, name, role } of accounts) {
    await User.create({ id, email, name, passwordHash, createdAt }, { transaction });
    await Member.create({ id: newId(), teamId: team.id, userId: id, role, joinedAt: createdAt }, { transaction });
  }

  const accountOf = (email: string): string => {
    const account = accounts.find((candidate) => candidate.email === email);
    if (!account) throw new Error(`demonstration.json names ${email}, which is not in accounts.json.`);
    return account.id;
  };
  const drawer = accounts.find((account) => account.role === 'designer') ?? accounts[0];
  if (!drawer) throw new Error('accounts.json holds no account.');

  const laid = new Map<string, SheetRow>();
  for (const [place, drawn] of sheets.entries()) {
    // The first in the alphabet is the one changed last, and so the first in the list.
    const at = new Date(now - place * 60_000);
    const by = Object.hasOwn(description.drawnBy, drawn.key)
      ? accountOf(description.drawnBy[drawn.key] ?? '')
      : drawer.id;
    const sheet = await Sheet.create(
      {
        id: newId(),
        teamId: team.id,
        name: drawn.name,
        ...toStored(drawn.document),
        createdAt: at,
        createdBy: by,
        changedAt: at,
        changedBy: by,
      },
      { transaction },
    );
    laid.set(drawn.key, sheet);
  }
  const sheetOf = (key: string): SheetRow => {
    const sheet = laid.get(key);
    if (!sheet) throw new Error(`demonstration.json names the sheet ${key}, which is not in sheets/.`);
    return sheet;
  };

  for (const { sheet: key, name, by } of description.snapshots) {
    const sheet = sheetOf(key);
    sheet.lastSnapshotNumber += 1;
    await sheet.save({ transaction });
    await Snapshot.create(
      {
        id: newId(),
        sheetId: sheet.id,
        number: sheet.lastSnapshotNumber,
        name,
        document: sheet.document,
        documentHash: sheet.documentHash,
        revision: sheet.revision,
        takenAt: createdAt,
        takenBy: accountOf(by),
      },
      { transaction },
    );
  }

  for (const note of description.notes) {
    const sheet = sheetOf(note.sheet);
    sheet.lastNoteNumber += 1;
    sheet.notesVersion += 1;
    await sheet.save({ transaction });
    const noteId = newId();
    await Note.create(
      {
        id: noteId,
        sheetId: sheet.id,
        number: sheet.lastNoteNumber,
        anchor: JSON.stringify(note.anchor),
        class: note.class,
        text: note.text,
        writtenAt: createdAt,
        writtenBy: accountOf(note.by),
        resolvedAt: note.resolvedBy === undefined ? null : createdAt,
        resolvedBy: note.resolvedBy === undefined ? null : accountOf(note.resolvedBy),
      },
      { transaction },
    );
    for (const [place, reply] of note.replies.entries()) {
      await Reply.create(
        // A millisecond apart: answers stand in the order of their times.
        {
          id: newId(),
          noteId,
          text: reply.text,
          writtenAt: new Date(now + place + 1),
          writtenBy: accountOf(reply.by),
        },
        { transaction },
      );
    }
  }
}
