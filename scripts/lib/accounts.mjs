// @ts-check
import { readFileSync } from 'node:fs';
import path from 'node:path';
import { root } from './paths.mjs';
import { Failure } from './say.mjs';

/**
 * @typedef {{ readonly email: string, readonly name: string, readonly role: string }} Account
 * @typedef {{ readonly password: string, readonly accounts: readonly Account[] }} Demonstration
 */

const place = 'db/seeds/accounts.json';

/**
 * The demonstration accounts, out of the same file that the demonstration data is laid from.
 *
 * @param {string} [file]
 * @returns {Demonstration}
 */
export function readAccounts(file = path.join(root, place)) {
  let content;
  try {
    content = JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    throw new Failure(`${place}, the list of demonstration accounts, is missing or damaged; restore it from version control.`);
  }
  const { password, accounts } = content ?? {};
  /** @param {unknown} text */
  const filled = (text) => typeof text === 'string' && text !== '';
  const whole =
    filled(password) &&
    Array.isArray(accounts) &&
    accounts.length > 0 &&
    accounts.every((account) => filled(account?.email) && filled(account.name) && filled(account.role));
  if (!whole) {
    throw new Failure(`${place} has to hold a password and accounts with email, name and role; restore it from version control.`);
  }
  return { password, accounts };
}

/**
 * @param {Demonstration} demonstration
 * @returns {readonly string[]} the lines to print
 */
export function accountLines({ password, accounts }) {
  const widest = Math.max(...accounts.map(({ email }) => email.length));
  const widestRole = Math.max(...accounts.map(({ role }) => role.length));
  return [
    `Demonstration accounts, all with the password ${password}`,
    ...accounts.map(({ email, name, role }) => `  ${role.padEnd(widestRole)}  ${email.padEnd(widest)}  ${name}`),
  ];
}
