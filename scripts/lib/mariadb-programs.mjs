// @ts-check
import { accessSync, constants, existsSync } from 'node:fs';
import path from 'node:path';
import { Failure } from './say.mjs';

/**
 * Only the server program and its SQL files are needed: Debian's mariadb-server-core. The package mariadb-server would
 * add a service and start an instance of the system's own, which is never used here.
 */
export const mariadbPackage = 'mariadb-server-core';

const sharedFolder = '/usr/share/mysql';

/**
 * The statements that make the system tables, in order, each under its names: the later is that of MariaDB 11 on.
 */
const systemTables = [
  ['mysql_system_tables.sql', 'mariadb_system_tables.sql'],
  ['mysql_performance_tables.sql', 'mariadb_performance_tables.sql'],
  ['mysql_system_tables_data.sql', 'mariadb_system_tables_data.sql'],
  ['maria_add_gis_sp_bootstrap.sql'],
];

/**
 * Where a program is, looked for as a shell would and in the folders of the system's servers, which are not in every
 * account's PATH.
 *
 * @param {string} name
 * @returns {string | null}
 */
export function findProgram(name) {
  const folders = [...(process.env.PATH ?? '').split(path.delimiter), '/usr/sbin', '/usr/bin', '/usr/local/sbin'];
  for (const folder of folders) {
    if (folder === '') continue;
    const file = path.join(folder, name);
    try {
      accessSync(file, constants.X_OK);
      return file;
    } catch {
      // Not in this one.
    }
  }
  return null;
}

/** @returns {string} path of the server program */
export function mariadbServer() {
  const found = findProgram('mariadbd');
  if (found === null) {
    throw new Failure(`MariaDB's server is not installed; install it with: apt-get install ${mariadbPackage}`);
  }
  return found;
}

/** @returns {readonly string[]} paths of the SQL files that make a new data directory's system tables */
export function systemTableFiles() {
  return systemTables.map((names) => {
    const found = names.map((name) => path.join(sharedFolder, name)).find((file) => existsSync(file));
    if (found === undefined) {
      throw new Failure(
        `MariaDB is installed without ${path.join(sharedFolder, names[0] ?? '')}; install the package ${mariadbPackage} again.`,
      );
    }
    return found;
  });
}
