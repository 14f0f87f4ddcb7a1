import 'server-only';
import { QueryTypes } from 'sequelize';
import { database, retrying, select } from '../client';

export type Attempt = { readonly allowed: true } | { readonly allowed: false; readonly again: Date };

type Row = { readonly taken: number; readonly secondsLeft: number };

/**
 * Counts an attempt, and says whether it may be made. One statement counts and answers, on the database's clock, so
 * any number of them at once, from any number of processes, pass no more than `most`. The window begins with the first
 * attempt, and attempts that are refused do not draw it out.
 */
export async function takeAttempt(
  subject: string,
  limit: { readonly most: number; readonly windowSeconds: number },
): Promise<Attempt> {
  const rows = await select<Row>(
    // The assignments are made in this order, and `taken` must still see the old end.
    `INSERT INTO attempts (subject, taken, endsAt)
      VALUES (:subject, 1, UTC_TIMESTAMP(3) + INTERVAL :windowSeconds SECOND)
      ON DUPLICATE KEY UPDATE
        taken = IF(endsAt <= UTC_TIMESTAMP(3), 1, LEAST(taken + 1, 1000000)),
        endsAt = IF(endsAt <= UTC_TIMESTAMP(3), UTC_TIMESTAMP(3) + INTERVAL :windowSeconds SECOND, endsAt)
      RETURNING taken, TIMESTAMPDIFF(MICROSECOND, UTC_TIMESTAMP(3), endsAt) / 1000000 AS secondsLeft`,
    { subject, windowSeconds: limit.windowSeconds },
  );
  const row = rows[0];
  if (!row) throw new Error('The database counted an attempt and did not say so.');
  if (row.taken === 1) await forgetOld();
  if (row.taken <= limit.most) return { allowed: true };
  return { allowed: false, again: new Date(Date.now() + Math.max(0, Number(row.secondsLeft)) * 1000) };
}

/** Ends the window: whoever tried has shown that they know. */
export async function forgetAttempts(subject: string): Promise<void> {
  await change('DELETE FROM attempts WHERE subject = :subject', { subject });
}

/** Takes one attempt back that turned out to be no guess. */
export async function giveBackAttempt(subject: string): Promise<void> {
  await change('UPDATE attempts SET taken = taken - 1 WHERE subject = :subject AND taken > 0', { subject });
}

/** A few at a time, whenever a window begins: so the table cannot grow faster than it is cleared. */
async function forgetOld(): Promise<void> {
  await change('DELETE FROM attempts WHERE endsAt < UTC_TIMESTAMP(3) - INTERVAL 1 HOUR ORDER BY endsAt LIMIT 5', {});
}

async function change(sql: string, replacements: Record<string, unknown>): Promise<void> {
  await retrying(() => database().query(sql, { type: QueryTypes.RAW, replacements }));
}
