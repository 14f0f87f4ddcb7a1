import { SequelizeStorage, Umzug } from 'umzug';
import { database, select } from './client';
import { MIGRATIONS } from './migrations/all';

/**
 * Brings the schema up to date.
 * @returns the names of the steps that were taken, none when there was nothing to do
 */
export function migrate(): Promise<readonly string[]> {
  return alone(async (umzug) => (await umzug.up()).map((step) => step.name));
}

/**
 * Takes the newest steps back, and what they hold with them.
 * @param steps how many; all when it is 'all'
 */
export function rollback(steps: number | 'all' = 1): Promise<readonly string[]> {
  return alone(async (umzug) => {
    const undone = await umzug.down(steps === 'all' ? { to: 0 } : { step: steps });
    return undone.map((step) => step.name);
  });
}

/** The steps that are still to be taken, in order. */
export async function pending(): Promise<readonly string[]> {
  return (await historian().pending()).map((step) => step.name);
}

function historian(): Umzug<object> {
  const sequelize = database();
  return new Umzug({
    migrations: MIGRATIONS.map((step) => ({
      name: step.name,
      up: () => sequelize.query(step.up),
      down: () => sequelize.query(step.down),
    })),
    context: {},
    storage: new SequelizeStorage({ sequelize, tableName: 'migrations', modelName: 'Migration' }),
    logger: undefined,
  });
}

/** Seconds that one process waits for another one's migrations. */
const PATIENCE = 60;

/**
 * Runs under the server's own lock, so that several processes that start at once take each step once. The lock belongs
 * to a connection; the transaction is there to hold on to one.
 */
function alone<T>(work: (umzug: Umzug<object>) => Promise<T>): Promise<T> {
  return database().transaction(async (transaction) => {
    // A lock's name is the whole server's, so it carries the database's.
    const lock = { lock: `${database().getDatabaseName()}-migrations`.slice(0, 64), patience: PATIENCE };
    const [got] = await select<{ readonly got: number | null }>('SELECT GET_LOCK(:lock, :patience) AS got', lock, transaction);
    if (got?.got !== 1) {
      throw new Error(`Another process has been changing the schema for ${PATIENCE} s. Wait until it is done, then try again.`);
    }
    try {
      return await work(historian());
    } finally {
      await select('SELECT RELEASE_LOCK(:lock) AS released', lock, transaction);
    }
  });
}
