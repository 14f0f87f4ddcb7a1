import type { Result } from '@/app/_shared/result';
import type { Trouble } from './machine';

type Unsaved = Extract<Result<unknown>, { readonly ok: false }> | { readonly ok: 'lost'; readonly error: unknown } | undefined;

/** What an answer that is no save means for the keeping. An answer of no form at all is one that did not come. */
export function troubleOf(answer: Unsaved, isOutdated: (error: unknown) => boolean): Trouble {
  if (answer === undefined) return { kind: 'unreachable' };
  if (answer.ok === 'lost') return isOutdated(answer.error) ? { kind: 'outdated' } : { kind: 'unreachable' };
  const { code, message } = answer.error;
  switch (code) {
    case 'unauthenticated':
      return { kind: 'signedOut' };
    case 'forbidden':
      return { kind: 'refused' };
    case 'notFound':
      return { kind: 'gone' };
    case 'invalid':
    case 'tooLarge':
      return { kind: 'rejected', message };
    case 'conflict':
    case 'tooMany':
    case 'unavailable':
    case 'unexpected':
      return { kind: 'unreachable' };
  }
}
