import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { execFile } from 'node:child_process';
import { promisify } from 'node:util';
import { closeDatabase, database, select } from '@/db/client';
import { migrate, pending, rollback } from '@/db/migrate';
import { MIGRATIONS } from '@/db/migrations/all';
import { freshDatabase } from './support/fresh-database';

const names = MIGRATIONS.map((step) => step.name);

async function tables(): Promise<readonly string[]> {
  const rows = await select<{ readonly name: string }>(
    'SELECT table_name AS name FROM information_schema.tables WHERE table_schema = :schema ORDER BY table_name',
    { schema: database().getDatabaseName() },
  );
  return rows.map((row) => row.name);
}

describe('the schema’s history', () => {
  beforeAll(freshDatabase);
  afterAll(closeDatabase);

  it('goes up, down and up again to the same tables', async () => {
    const up = await tables();
    expect(up).toEqual(
      ['attempts', 'members', 'migrations', 'notes', 'replies', 'sheets', 'snapshots', 'teams', 'users'].sort(),
    );
    expect(await rollback('all')).toEqual(names.toReversed());
    expect(await tables()).toEqual(['migrations']);
    expect(await pending()).toEqual(names);
    expect(await migrate()).toEqual(names);
    expect(await tables()).toEqual(up);
    expect(await pending()).toEqual([]);
    expect(await migrate()).toEqual([]);
  });

  it('takes one step back at a time', async () => {
    expect(await rollback()).toEqual([names.at(-1)]);
    expect(await pending()).toEqual([names.at(-1)]);
    await migrate();
  });

  it('takes each step once when several processes start at once', async () => {
    await rollback('all');
    const script = `
      import { migrate } from '@/db/migrate';
      import { closeDatabase } from '@/db/client';
      migrate().then((names) => console.log(JSON.stringify(names))).finally(closeDatabase);`;
    const run = promisify(execFile);
    const outputs = await Promise.all(
      [1, 2, 3].map(() =>
        run(process.execPath, ['--conditions=react-server', '--import', 'tsx', '--input-type=module', '-e', script], {
          cwd: process.cwd(),
        }),
      ),
    );
    const applied = outputs.flatMap(({ stdout }): unknown => JSON.parse(stdout));
    expect(applied).toEqual(names);
    expect(await pending()).toEqual([]);
    // Three processes that each compile the sources: most of a minute on a small machine that is busy.
  }, 120_000);

  it('gives each step a name that sorts in its order, once', () => {
    expect(names.toSorted()).toEqual(names);
    expect(new Set(names).size).toBe(names.length);
  });
});
