import { randomBytes } from 'node:crypto';

/** A new identifier: 120 random bits as 20 characters that may stand in an address. It tells nothing and is guessed by nobody. */
export function newId(): string {
  return randomBytes(15).toString('base64url');
}
