import { ConnectionAcquireTimeoutError, ConnectionError, QueryTypes, Sequelize, type Transaction } from 'sequelize';
import { connectionSettings } from './connection-settings';
import { mariadbModule } from './mariadb-module';

/** Kept on the global object: development reloads this module, and each bundle of a build has its own copy of it. */
const kept = globalThis as { __ohmsteadDatabase?: Sequelize };

/**
 * The one connection pool of this process, made at first use: the build imports this file and has no database.
 * @throws Error in one sentence when DATABASE_URL is missing or wrong
 */
export function database(): Sequelize {
  kept.__ohmsteadDatabase ??= connect();
  return kept.__ohmsteadDatabase;
}

/** Closes the pool, so that a script can end. The next use opens another. */
export async function closeDatabase(): Promise<void> {
  const open = kept.__ohmsteadDatabase;
  delete kept.__ohmsteadDatabase;
  await open?.close();
}

function connect(): Sequelize {
  const settings = connectionSettings(process.env.DATABASE_URL);
  return new Sequelize(settings.database, settings.user, settings.password, {
    host: settings.host,
    port: settings.port,
    dialect: 'mariadb',
    dialectModule: mariadbModule,
    logging: false,
    timezone: '+00:00',
    define: { timestamps: false, freezeTableName: true, charset: 'utf8mb4', collate: 'utf8mb4_unicode_ci' },
    pool: { max: 10, min: 0, acquire: 8_000, idle: 30_000 },
    dialectOptions: {
      charset: 'utf8mb4',
      connectTimeout: 3_000,
      // A server that has stopped answering is one that cannot be reached; nothing here takes so long.
      socketTimeout: 10_000,
      // An update counts the rows it found: one that changes nothing must not look like one that found nothing.
      foundRows: true,
      sessionVariables: {
        sql_mode: 'STRICT_TRANS_TABLES,ERROR_FOR_DIVISION_BY_ZERO,NO_ZERO_DATE,NO_ZERO_IN_DATE,NO_ENGINE_SUBSTITUTION',
      },
    },
  });
}

/** Of the driver: the server went away, or the socket did, under a connection that the pool still held. */
const LOST = new Set([
  'ER_SOCKET_UNEXPECTED_CLOSE',
  'ER_CONNECTION_ALREADY_CLOSED',
  'ER_CMD_CONNECTION_CLOSED',
  'ER_SOCKET_BAD_PORT',
  'ER_SOCKET_TIMEOUT',
  'ER_CONNECTION_TIMEOUT',
  'ER_SERVER_SHUTDOWN',
  'ER_CONNECTION_KILLED',
  'ECONNRESET',
  'ECONNREFUSED',
  'EPIPE',
  'ETIMEDOUT',
  'ENOTFOUND',
  'EHOSTUNREACH',
]);

function codesOf(error: unknown): readonly string[] {
  const codes: string[] = [];
  for (let at = error, depth = 0; at instanceof Error && depth < 4; depth += 1) {
    if ('code' in at && typeof at.code === 'string') codes.push(at.code);
    at = 'parent' in at ? at.parent : at.cause;
  }
  return codes;
}

function isLost(error: unknown): boolean {
  return codesOf(error).some((code) => LOST.has(code));
}

/** Whether an exception means that the database cannot be reached, rather than that something is wrong. */
export function isUnavailable(error: unknown): boolean {
  return error instanceof ConnectionError || error instanceof ConnectionAcquireTimeoutError || isLost(error);
}

/**
 * Runs what may be run twice (a reading, or a statement that comes to the same), once more if the connection turns
 * out to be dead. After a restart of the database the pool still holds connections to the old one, each of which
 * fails once; so it is tried as often as there may be such.
 */
export async function retrying<T>(work: () => Promise<T>): Promise<T> {
  const most = 10;
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await work();
    } catch (error) {
      const dead = codesOf(error).includes('ER_SOCKET_UNEXPECTED_CLOSE');
      if (!dead || attempt > most) throw error;
    }
  }
}

/**
 * Runs `work` in a transaction, again from the start when nothing of it can have happened: when it could not begin
 * because the connection was dead, or when the database rolled it back to break a deadlock. So `work` must have no
 * other effects.
 */
export async function inTransaction<T>(work: (transaction: Transaction) => Promise<T>): Promise<T> {
  for (let deadlocks = 0, dead = 0; ; ) {
    let begun = false;
    try {
      return await database().transaction((transaction) => {
        begun = true;
        return work(transaction);
      });
    } catch (error) {
      const codes = codesOf(error);
      if (codes.includes('ER_LOCK_DEADLOCK') && deadlocks < 5) deadlocks += 1;
      else if (!begun && codes.includes('ER_SOCKET_UNEXPECTED_CLOSE') && dead < 10) dead += 1;
      else throw error;
    }
  }
}

/** The rows of a reading. `replacements` are escaped by the ORM; nothing else may come from outside. */
export function select<Row extends object>(
  sql: string,
  replacements: Readonly<Record<string, unknown>>,
  transaction?: Transaction,
): Promise<Row[]> {
  const run = (): Promise<Row[]> =>
    database().query<Row>(sql, { type: QueryTypes.SELECT, replacements: { ...replacements }, transaction });
  // Within a transaction a dead connection has taken the transaction with it.
  return transaction ? run() : retrying(run);
}
