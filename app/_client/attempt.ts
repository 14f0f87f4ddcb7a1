import type { Result } from '@/app/_shared/result';
import { NO_ANSWER } from './fetch-result';

/** Calls a server action; an answer that never comes is an expected failure too, and so a value. */
export async function attempt<T>(act: () => Promise<Result<T>>): Promise<Result<T>> {
  try {
    return await act();
  } catch {
    return { ok: false, error: NO_ANSWER };
  }
}
