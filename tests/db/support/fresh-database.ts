import { closeDatabase, database } from '@/db/client';
import { migrate, rollback } from '@/db/migrate';

/** Empties the database of DATABASE_URL and brings its schema up anew. Only one whose name ends in `_test`. */
export async function freshDatabase(): Promise<void> {
  const name = database().getDatabaseName();
  if (!name.endsWith('_test')) throw new Error(`${name} is not a test database: its name would end in _test.`);
  await rollback('all');
  await migrate();
}

/** Empties every table of a schema that `freshDatabase` brought up; quicker than bringing it up again. */
export async function emptyDatabase(): Promise<void> {
  // The children before the parents.
  for (const table of ['replies', 'notes', 'snapshots', 'sheets', 'members', 'users', 'teams', 'attempts']) {
    await database().query(`DELETE FROM ${table}`);
  }
}

export { closeDatabase };
