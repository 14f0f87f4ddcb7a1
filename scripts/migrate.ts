import { closeDatabase } from '@/db/client';
import { migrate, pending, rollback } from '@/db/migrate';
import { databaseName, runningUrl } from './lib/database.mjs';
import { forgetPrepared } from './lib/prepare.mjs';
import { layoutOf } from './lib/paths.mjs';
import { Failure, say, sayFailure } from './lib/say.mjs';
import { readSettings } from './lib/settings.mjs';

/** `npm run migrate -- up | down | status`: on the database of DATABASE_URL, or the private one of a running Ohmstead. */
async function main(verb: string | undefined): Promise<void> {
  const settings = readSettings();
  const layout = layoutOf(settings.stateDir);
  const url = settings.databaseUrl ?? runningUrl(layout);
  if (url === null) {
    throw new Failure('No database runs here; start Ohmstead in another terminal (npm start), or set DATABASE_URL.');
  }
  process.env.DATABASE_URL = url;
  switch (verb) {
    case 'up':
      report('applied', await migrate());
      return;
    case 'down':
      // The next start has to migrate again, whatever its stamp says.
      if (settings.databaseUrl === null) forgetPrepared(layout, databaseName);
      report('taken back', await rollback());
      return;
    case 'status':
      report('open', await pending());
      return;
    default:
      throw new Failure('Say what to do: npm run migrate -- up, npm run migrate -- down (one step back), or npm run migrate -- status.');
  }
}

function report(done: string, names: readonly string[]): void {
  say(names.length === 0 ? `No migration ${done}.` : names.map((name) => `${done}: ${name}`).join('\n'));
}

main(process.argv[2])
  .catch((error: unknown) => {
    sayFailure(error);
    process.exitCode = 1;
  })
  .finally(closeDatabase);
