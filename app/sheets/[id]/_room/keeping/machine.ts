/*
 * Where the keeping of one open sheet stands, as a value. Documents do not appear here: each change of the document is
 * a number, counted from 0 as it was opened, and the machine only knows which of these numbers this machine's storage
 * has, which the server has, and which is on its way. Times are milliseconds, on any one clock.
 */

/** What stands on the server in place of what this tab was made from. */
export type Theirs = {
  readonly revision: number;
  readonly document: string;
  /** ISO 8601, in UTC. */
  readonly changedAt: string;
  readonly changedBy: string;
};

/** Why what was typed is not on the server. */
export type Trouble =
  /** The network, the server or its database. Tried again until it goes through. */
  | { readonly kind: 'unreachable' }
  | { readonly kind: 'signedOut' }
  /** The role has changed. */
  | { readonly kind: 'refused' }
  | { readonly kind: 'gone' }
  /** The server runs a newer build, which does not know this page's actions any more. */
  | { readonly kind: 'outdated' }
  /** The server read the document and said no, in words; sending the same again would change nothing. */
  | { readonly kind: 'rejected'; readonly message: string };

/** Who writes: this tab, another tab of this browser, or nobody here. */
export type Hand = 'opening' | 'here' | 'elsewhere' | 'nobody';

export type Keeping = {
  readonly hand: Hand;
  /** The newest change of the document. */
  readonly typed: number;
  /** The newest change that this machine's storage has. */
  readonly kept: number;
  /** The newest change that the server has. */
  readonly saved: number;
  /** The server's revision that `saved` is. */
  readonly revision: number;
  readonly sending: number | null;
  /** The answer is overdue. It may still come, and until then nothing else is sent. */
  readonly slow: boolean;
  readonly trouble: Trouble | null;
  readonly failures: number;
  /** When to send next; null when there is nothing to send, or no use in it. */
  readonly sendAtMs: number | null;
  /** Since when the oldest change that is not on its way has waited; the debounce may not put it off for ever. */
  readonly waitingSinceMs: number | null;
  readonly storage: 'works' | 'fails';
  readonly conflict: Theirs | null;
};

export type KeepingEvent =
  | { readonly type: 'typed'; readonly atMs: number }
  | { readonly type: 'kept'; readonly change: number }
  | { readonly type: 'keepFailed' }
  | { readonly type: 'sent' }
  | { readonly type: 'overdue' }
  | { readonly type: 'saved'; readonly revision: number; readonly atMs: number }
  /** The server already has an earlier sending of this tab, whose answer was lost on the way. */
  | { readonly type: 'foundSaved'; readonly change: number; readonly revision: number; readonly atMs: number }
  | { readonly type: 'conflicted'; readonly theirs: Theirs }
  | { readonly type: 'failed'; readonly trouble: Trouble; readonly atMs: number }
  /** The network is back, the person is back, or someone waits for the save. */
  | { readonly type: 'hurry'; readonly atMs: number }
  | { readonly type: 'keepMine'; readonly atMs: number }
  /** The document now shown is the server's, at this revision. */
  | { readonly type: 'adopted'; readonly revision: number }
  /** A draft of an earlier time was put back on the sheet. */
  | { readonly type: 'tookUp'; readonly revision: number; readonly theirs: Theirs | null; readonly atMs: number }
  | { readonly type: 'hand'; readonly hand: Hand; readonly atMs: number };

/** After the last change; a hand that pauses is a moment to save. */
export const DEBOUNCE_MS = 200;
/** After the first change, however busy the hand is. */
export const AT_MOST_MS = 3_000;
/** An answer that takes longer is not worth calling “saving”. */
export const OVERDUE_MS = 8_000;
const FIRST_RETRY_MS = 1_000;
const LAST_RETRY_MS = 30_000;

export function beginKeeping(revision: number, hand: Hand): Keeping {
  return {
    hand,
    typed: 0,
    kept: 0,
    saved: 0,
    revision,
    sending: null,
    slow: false,
    trouble: null,
    failures: 0,
    sendAtMs: null,
    waitingSinceMs: null,
    storage: 'works',
    conflict: null,
  };
}

/** Whether the server has everything that was typed. */
export function isSaved(keeping: Keeping): boolean {
  return keeping.typed === keeping.saved;
}

/** Whether nothing is typed, on its way or undecided: another document may take this one's place. */
export function isAtRest(keeping: Keeping): boolean {
  return isSaved(keeping) && keeping.sending === null && keeping.conflict === null;
}

/** How long to wait before trying again after this many failures in a row: doubling from one second to thirty. */
export function retryDelayMs(failures: number): number {
  return Math.min(LAST_RETRY_MS, FIRST_RETRY_MS * 2 ** Math.max(0, failures - 1));
}

/** Whether trying again without being asked can help. */
function isPassing(trouble: Trouble): boolean {
  switch (trouble.kind) {
    case 'unreachable':
    case 'signedOut':
    case 'refused':
      return true;
    case 'gone':
    case 'outdated':
    case 'rejected':
      return false;
  }
}

export function step(before: Keeping, event: KeepingEvent): Keeping {
  switch (event.type) {
    case 'typed':
      return schedule({ ...before, typed: before.typed + 1 }, event.atMs);

    case 'kept':
      return event.change > before.kept || before.storage === 'fails'
        ? { ...before, kept: Math.max(before.kept, event.change), storage: 'works' }
        : before;

    case 'keepFailed':
      return before.storage === 'fails' ? before : { ...before, storage: 'fails' };

    case 'sent':
      return { ...before, sending: before.typed, sendAtMs: null, waitingSinceMs: null };

    case 'overdue':
      return before.sending === null ? before : { ...before, slow: true };

    case 'saved':
      return landed(before, before.sending ?? before.saved, event.revision, event.atMs);

    case 'foundSaved':
      return landed(before, event.change, event.revision, event.atMs);

    case 'conflicted':
      return { ...before, ...ANSWERED, conflict: event.theirs, sendAtMs: null };

    case 'failed': {
      const failures = before.failures + 1;
      return {
        ...before,
        sending: null,
        slow: false,
        trouble: event.trouble,
        failures,
        sendAtMs: isPassing(event.trouble) ? event.atMs + retryDelayMs(failures) : null,
        waitingSinceMs: null,
      };
    }

    case 'hurry':
      return maySend(before) && !isSaved(before) ? { ...before, sendAtMs: event.atMs } : before;

    case 'keepMine': {
      if (before.conflict === null) return before;
      // Saving over what stands there is saving from its revision.
      return schedule({ ...before, conflict: null, revision: before.conflict.revision }, event.atMs, 0);
    }

    case 'adopted':
      return {
        ...before,
        ...ANSWERED,
        ...allSaved(before.typed + 1),
        revision: event.revision,
        sendAtMs: null,
        waitingSinceMs: null,
        conflict: null,
      };

    case 'tookUp': {
      const typed = before.typed + 1;
      const taken = { ...before, typed, kept: typed, revision: event.revision, conflict: event.theirs };
      return schedule(taken, event.atMs, 0);
    }

    case 'hand': {
      const held: Keeping = { ...before, hand: event.hand };
      if (event.hand === 'here') return isSaved(held) ? held : schedule(held, event.atMs, 0);
      // What was typed here is in the draft, and the tab that writes now takes it up from there.
      return { ...beginKeeping(before.revision, event.hand), ...allSaved(before.typed), storage: before.storage };
    }
  }
}

const ANSWERED = { sending: null, slow: false, trouble: null, failures: 0 } as const;

function allSaved(change: number): Pick<Keeping, 'typed' | 'kept' | 'saved'> {
  return { typed: change, kept: change, saved: change };
}

function maySend(keeping: Keeping): boolean {
  return keeping.hand === 'here' && keeping.sending === null && keeping.conflict === null;
}

/** Puts the next sending at the end of the debounce, unless a failure's own delay or a conflict governs it. */
function schedule(keeping: Keeping, atMs: number, debounceMs = DEBOUNCE_MS): Keeping {
  const waitingSinceMs = keeping.waitingSinceMs ?? atMs;
  const waiting = { ...keeping, waitingSinceMs };
  if (!maySend(waiting)) return { ...waiting, sendAtMs: null };
  const due = Math.min(atMs + debounceMs, waitingSinceMs + AT_MOST_MS);
  const { trouble } = waiting;
  if (trouble === null || trouble.kind === 'rejected') return { ...waiting, sendAtMs: due };
  return waiting;
}

function landed(before: Keeping, change: number, revision: number, atMs: number): Keeping {
  const after: Keeping = {
    ...before,
    ...ANSWERED,
    saved: Math.max(before.saved, change),
    revision,
    sendAtMs: null,
  };
  if (isSaved(after)) return { ...after, waitingSinceMs: null };
  return schedule(after, atMs);
}
