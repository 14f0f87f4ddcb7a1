import * as mariadb from 'mariadb';
import type { Connection, ConnectionConfig } from 'mariadb';

/**
 * The driver as the ORM expects it. Sequelize 6 deletes `meta` from a result, which the driver has defined as not
 * configurable since 3.1, and so fails on every untyped query (sequelize#15701): a result is handed on as a copy whose
 * `meta` may be deleted.
 */
export const mariadbModule = {
  ...mariadb,
  async createConnection(config: ConnectionConfig): Promise<Connection> {
    const connection = await mariadb.createConnection(config);
    const query = connection.query.bind(connection);
    const replaced: (sql: string, values?: unknown) => Promise<unknown> = async (sql, values) => {
      const result: unknown = await query(sql, values);
      if (!Array.isArray(result) || !('meta' in result)) return result;
      const copy: unknown[] = result.slice();
      Object.defineProperty(copy, 'meta', { value: result.meta, configurable: true, writable: true });
      return copy;
    };
    return Object.assign(connection, { query: replaced });
  },
};
