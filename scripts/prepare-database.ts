import { closeDatabase } from '@/db/client';
import { migrate } from '@/db/migrate';
import { layDemonstration } from '@/db/seeds/demonstration';

/**
 * Brings the database of DATABASE_URL to where the application wants it: migrations first, then the demonstration data
 * unless it was laid before. Prints one line on each; on failure the last line begins with `failed: `.
 */
async function prepare(): Promise<void> {
  try {
    const applied = await migrate();
    console.log(applied.length === 0 ? 'no migration was open' : `${applied.length} migrations applied`);
    const demonstration = await layDemonstration();
    console.log(demonstration === 'laid' ? 'demonstration data laid' : 'demonstration data already there');
  } finally {
    await closeDatabase();
  }
}

prepare().catch((error: unknown) => {
  console.error(error);
  console.error(`failed: ${error instanceof Error ? error.message.replace(/\s+/g, ' ') : String(error)}`);
  process.exitCode = 1;
});
