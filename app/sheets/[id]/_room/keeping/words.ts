import type { KeepingState } from '@/components/state-pill';
import { isSaved, type Keeping, type Trouble } from './machine';

/** What the masthead shows of the keeping: a mark, the words, and shorter ones for a phone. */
export type KeepingWords = { readonly state: KeepingState; readonly text: string; readonly short: string };

export function keepingWords(keeping: Keeping, archived: boolean): KeepingWords {
  const revision = `revision ${keeping.revision}`;
  if (keeping.conflict !== null) return { state: 'conflict', text: 'Conflict', short: 'Conflict' };
  // Until this machine's storage has been asked, nobody knows whether the server has everything.
  if (keeping.hand === 'opening') return { state: 'saving', text: 'Opening…', short: 'Opening…' };
  if (keeping.hand === 'nobody' || keeping.hand === 'elsewhere') {
    return { state: 'saved', text: `${archived ? 'In the archive' : 'Read only'} · ${revision}`, short: 'Read only' };
  }
  if (isSaved(keeping)) return { state: 'saved', text: `Saved · ${revision}`, short: 'Saved' };
  if (keeping.trouble !== null || keeping.slow) {
    return keeping.storage === 'fails'
      ? { state: 'unavailable', text: 'Not kept anywhere yet', short: 'Not kept' }
      : { state: 'local', text: 'Kept on this machine only', short: 'Kept here' };
  }
  return { state: 'saving', text: 'Saving…', short: 'Saving…' };
}

/** Why what was typed is not on the server, and what to do; null for what passes by itself. */
export function troubleText(trouble: Trouble): string {
  switch (trouble.kind) {
    case 'unreachable':
      return 'The server cannot be reached, or cannot reach its database. What you type is kept on this machine and is sent as soon as it answers.';
    case 'signedOut':
      return 'You are not signed in any more. Sign in again in another tab; what you typed is kept on this machine and is then saved from here.';
    case 'refused':
      return 'Your role in this team does not allow changing this sheet any more. What you typed is kept on this machine; save it as a file, or ask an owner of the team.';
    case 'gone':
      return 'This sheet is not on the server any more, or not your team’s. What you typed is kept on this machine; save it as a file.';
    case 'outdated':
      return 'The server runs a newer version. Load this page again: what you typed is kept on this machine and is saved then.';
    case 'rejected':
      return `The server cannot save the sheet as it is: ${trouble.message}`;
  }
}

export const NO_STORAGE =
  'This browser does not let the sheet be kept on this machine (a private window, or no space left). Until it is saved, keep the page open.';
