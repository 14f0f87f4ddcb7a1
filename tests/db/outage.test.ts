import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import type { Role } from '@/app/_shared/roles';
import type { Viewer } from '@/app/_shared/wire';
import { inTransaction, isUnavailable, select } from '@/db/client';
import { connectionSettings } from '@/db/connection-settings';
import { databaseAnswers } from '@/db/queries/health';
import { createNote } from '@/db/queries/notes';
import { createSheet, saveSheet } from '@/db/queries/sheet-changes';
import { findSheet, listSheets } from '@/db/queries/sheets';
import { documentAbout } from './support/documents';
import { closeDatabase, freshDatabase } from './support/fresh-database';
import { makeTeam } from './support/people';
import { Relay } from './support/relay';

const everything = { search: '', sort: 'changed', archived: false } as const;
const original = process.env.DATABASE_URL;

let relay: Relay;
let team: Readonly<Record<Role, Viewer>>;

beforeAll(async () => {
  await freshDatabase();
  team = await makeTeam('Ours');
  await closeDatabase();
  const { host, port } = connectionSettings(original);
  relay = new Relay(host, port);
  await relay.start();
  const url = new URL(original ?? '');
  url.hostname = '127.0.0.1';
  url.port = String(relay.port);
  process.env.DATABASE_URL = url.href;
});
afterAll(async () => {
  await closeDatabase();
  await relay.kill();
  process.env.DATABASE_URL = original;
});

/** Opens as many pooled connections as it takes for several to be dead afterwards. */
async function fillPool(): Promise<void> {
  await Promise.all(Array.from({ length: 6 }, () => select('SELECT SLEEP(0.05) AS slept', {})));
}

/** The pool may still be failing attempts that it began before; it must come round by itself. */
async function answersAgain(): Promise<void> {
  await vi.waitFor(async () => expect(await databaseAnswers()).toBe(true), { timeout: 5_000, interval: 20 });
}

describe('a database that goes away', () => {
  it('is said to be unavailable while it is away, by every query', async () => {
    const id = await createSheet(team.designer, { name: 'Kept', document: documentAbout('x') });
    await fillPool();
    await relay.kill();
    const attempts = await Promise.allSettled([
      listSheets(team.viewer, everything),
      findSheet(team.viewer, id),
      saveSheet(team.designer, { id, revision: 1, document: documentAbout('away') }),
      createSheet(team.designer, { name: 'New', document: documentAbout('y') }),
    ]);
    for (const attempt of attempts) {
      expect(attempt.status === 'rejected' && isUnavailable(attempt.reason)).toBe(true);
    }
    expect(await databaseAnswers()).toBe(false);
    await relay.start();
    await answersAgain();
    expect(await saveSheet(team.designer, { id, revision: 1, document: documentAbout('back') })).toMatchObject({
      kind: 'saved',
      revision: 2,
    });
  });

  it('costs nothing when it was away between two questions: readings, saves and transactions go on', async () => {
    const id = await createSheet(team.designer, { name: 'Between', document: documentAbout('0') });
    for (let round = 1; round <= 3; round += 1) {
      await fillPool();
      await relay.kill();
      await relay.start();
      const [listed, saved, noted, made] = await Promise.all([
        listSheets(team.viewer, everything),
        saveSheet(team.designer, { id, revision: round, document: documentAbout(`${round}`) }),
        createNote(team.reviewer, { sheetId: id, anchor: { kind: 'place', at: { x: 0, y: 0 } }, class: 'query', text: 'x' }),
        createSheet(team.designer, { name: `Made ${round}`, document: documentAbout('y') }),
      ]);
      expect(listed.sheets.length).toBeGreaterThan(0);
      expect(saved).toMatchObject({ kind: 'saved', revision: round + 1 });
      expect(noted).toMatchObject({ number: round });
      expect(made).toMatch(/^.{20}$/);
    }
  });

  it('undoes a transaction that it was killed in', async () => {
    const before = (await listSheets(team.viewer, everything)).sheets.length;
    const outcome = inTransaction(async (transaction) => {
      await select('SELECT 1 AS one', {}, transaction);
      await relay.kill();
      await select('SELECT 1 AS one', {}, transaction);
    });
    await expect(outcome).rejects.toSatisfy(isUnavailable);
    await relay.start();
    await answersAgain();
    expect((await listSheets(team.viewer, everything)).sheets.length).toBe(before);
  });

  it('that hangs is noticed by the health question within its time', async () => {
    await fillPool();
    relay.freeze();
    const began = performance.now();
    expect(await databaseAnswers()).toBe(false);
    expect(performance.now() - began).toBeLessThan(6_000);
    await relay.kill();
    await relay.start();
    await answersAgain();
  });
});
