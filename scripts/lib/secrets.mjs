// @ts-check
import { randomBytes } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { shown } from './paths.mjs';
import { Failure } from './say.mjs';

/** @typedef {import('./paths.mjs').Layout} Layout */
/** @typedef {{ readonly databasePassword: string, readonly authSecret: string }} Secrets */

/** 32 bytes as 43 letters, digits, - and _ : nothing that a URL or an SQL string would have to escape. */
const newSecret = () => randomBytes(32).toString('base64url');

/**
 * The secrets of a state folder, made at its first use and readable by this account alone.
 *
 * @param {Layout} layout
 * @returns {Secrets}
 */
export function secretsOf(layout) {
  mkdirSync(layout.dir, { recursive: true, mode: 0o700 });
  if (existsSync(layout.secrets)) return read(layout.secrets);
  const secrets = { databasePassword: newSecret(), authSecret: newSecret() };
  const unfinished = `${layout.secrets}.${process.pid}`;
  writeFileSync(unfinished, `${JSON.stringify(secrets, null, 2)}\n`, { mode: 0o600 });
  renameSync(unfinished, layout.secrets);
  return secrets;
}

/**
 * @param {string} file
 * @returns {Secrets}
 */
function read(file) {
  const secret = /^[\w-]{32,}$/;
  try {
    const { databasePassword, authSecret } = JSON.parse(readFileSync(file, 'utf8'));
    if (secret.test(databasePassword) && secret.test(authSecret)) return { databasePassword, authSecret };
  } catch (error) {
    if (/** @type {NodeJS.ErrnoException} */ (error).code === 'EACCES') throw error;
  }
  throw new Failure(`${shown(file)} is damaged; delete it and run this again (everyone then has to sign in once more).`);
}
