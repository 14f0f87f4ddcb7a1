import 'server-only';
import { BaseError } from 'sequelize';
import { select } from '../client';

/** Whether the database answers a question within three seconds. */
export async function databaseAnswers(): Promise<boolean> {
  let timer: NodeJS.Timeout | undefined;
  const late = new Promise<boolean>((resolve) => {
    timer = setTimeout(() => resolve(false), 3_000);
  });
  const asked = select<{ readonly one: number }>('SELECT 1 AS one', {}).then(
    () => true,
    (error: unknown) => {
      if (error instanceof BaseError) return false;
      throw error;
    },
  );
  try {
    return await Promise.race([asked, late]);
  } finally {
    clearTimeout(timer);
  }
}
