import { execFile } from 'node:child_process';
import { promisify } from 'node:util';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { database, select } from '@/db/client';
import { forgetAttempts, giveBackAttempt, takeAttempt } from '@/db/queries/attempts';
import { closeDatabase, freshDatabase } from './support/fresh-database';

const limit = { most: 3, windowSeconds: 900 };

beforeAll(freshDatabase);
afterAll(closeDatabase);

/** Moves a subject's window as if so many seconds had passed. */
async function age(subject: string, seconds: number): Promise<void> {
  await database().query('UPDATE attempts SET endsAt = endsAt - INTERVAL :seconds SECOND WHERE subject = :subject', {
    replacements: { subject, seconds },
  });
}

async function allowedOf(subject: string, times: number): Promise<number> {
  let count = 0;
  for (let i = 0; i < times; i += 1) if ((await takeAttempt(subject, limit)).allowed) count += 1;
  return count;
}

describe('attempts', () => {
  it('are let through up to the limit, and then say when to come again', async () => {
    expect(await allowedOf('a', 3)).toBe(3);
    const refused = await takeAttempt('a', limit);
    if (refused.allowed) throw new Error('let through');
    const seconds = (refused.again.getTime() - Date.now()) / 1000;
    expect(seconds).toBeGreaterThan(890);
    expect(seconds).toBeLessThanOrEqual(901);
  });

  it('let no more through when they all come at once', async () => {
    const attempts = await Promise.all(Array.from({ length: 40 }, () => takeAttempt('at once', limit)));
    expect(attempts.filter((attempt) => attempt.allowed)).toHaveLength(3);
  });

  it('begin anew when the window is over, which refused ones do not draw out', async () => {
    expect(await allowedOf('b', 10)).toBe(3);
    await age('b', 890);
    expect(await allowedOf('b', 1)).toBe(0);
    await age('b', 11);
    expect(await allowedOf('b', 10)).toBe(3);
  });

  it('hold in another process: a restart forgives nothing', async () => {
    expect(await allowedOf('c', 3)).toBe(3);
    const script = `
      import { takeAttempt } from '@/db/queries/attempts';
      import { closeDatabase } from '@/db/client';
      takeAttempt('c', { most: 3, windowSeconds: 900 }).then((a) => console.log(a.allowed)).finally(closeDatabase);`;
    const { stdout } = await promisify(execFile)(process.execPath, [
      '--conditions=react-server',
      '--import',
      'tsx',
      '--input-type=module',
      '-e',
      script,
    ]);
    expect(stdout.trim()).toBe('false');
  }, 120_000);

  it('are forgotten, or given back one by one', async () => {
    expect(await allowedOf('d', 5)).toBe(3);
    await forgetAttempts('d');
    expect(await allowedOf('d', 3)).toBe(3);
    await giveBackAttempt('d');
    expect(await allowedOf('d', 3)).toBe(1);
  });

  it('leave no more rows behind than there are windows', async () => {
    for (let i = 0; i < 20; i += 1) await takeAttempt(`old ${i}`, limit);
    await database().query("UPDATE attempts SET endsAt = UTC_TIMESTAMP(3) - INTERVAL 1 DAY WHERE subject LIKE 'old %'");
    for (let i = 0; i < 4; i += 1) await takeAttempt(`new ${i}`, limit);
    const rows = await select("SELECT subject FROM attempts WHERE subject LIKE 'old %'", {});
    expect(rows).toHaveLength(0);
  });
});
