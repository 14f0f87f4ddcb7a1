import { randomBytes } from 'node:crypto';
import { hash, verify, type Options } from '@node-rs/argon2';

/**
 * argon2id with 19 MiB, two passes, one lane: the first choice of the OWASP password storage cheat sheet (found), and
 * what RFC 9106 section 4 has as memory-constrained at less memory. About 15 ms on a small machine. A hash carries its
 * parameters, so they can be raised and old hashes still be checked.
 */
const PARAMETERS: Options = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

export function hashPassword(password: string): Promise<string> {
  return hash(password, PARAMETERS);
}

/** Whether the password is the one; a hash that cannot be read is nobody's. */
export async function verifyPassword(passwordHash: string, password: string): Promise<boolean> {
  try {
    return await verify(passwordHash, password);
  } catch {
    return false;
  }
}

let nobody: Promise<string> | undefined;

/** A hash of a password that nobody knows, of the same parameters: to spend the same time where there is no account. */
export function hashOfNobody(): Promise<string> {
  nobody ??= hashPassword(randomBytes(24).toString('base64url'));
  return nobody;
}
