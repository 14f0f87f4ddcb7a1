/*
 * Which tab of this browser writes a sheet. One at a time: drafts have one place a sheet, and two tabs of one person
 * would otherwise make conflicts of that person with themselves. The others look on, and can ask for it.
 */

export type LeaseEvents = {
  /** This tab writes from now on. `waited` says that another tab may have written before. */
  granted(waited: boolean): void;
  /** It is held elsewhere; said once, after a moment, so that a reload does not flash it. */
  waiting(): void;
  /** Another tab asks: bring everything to rest, then it is given over. */
  wanted(): Promise<void>;
  /** It is gone: given over, or taken because this tab did not answer. */
  lost(): void;
};

export type Lease = {
  /** Asks the tab that holds it to give it over; takes it when no answer comes. */
  take(): void;
  /** Gives it up for good. */
  end(): void;
};

/** A reload hands over within this; longer means that another tab really holds it. */
const QUIET_MS = 1_000;
/** For bringing a save to its end. A tab that the browser has frozen will never answer. */
const ANSWER_MS = 4_000;

/** Holds by the browser's own locks, which end with the tab that holds them however it ends. */
export function lockLease(name: string, events: LeaseEvents): Lease {
  const channel = new BroadcastChannel(name);
  let ended = false;
  let release: (() => void) | null = null;
  let queued: AbortController | null = null;
  let requests = 0;
  const timers = new Set<ReturnType<typeof setTimeout>>();

  const later = (ms: number, act: () => void) => {
    const timer = setTimeout(() => {
      timers.delete(timer);
      if (!ended) act();
    }, ms);
    timers.add(timer);
  };

  const request = (steal: boolean) => {
    queued?.abort();
    const mine = new AbortController();
    queued = mine;
    requests += 1;
    // After the first, some other tab has written in between.
    let waited = requests > 1;
    let held = false;
    const hold = () => {
      if (ended || mine.signal.aborted) return undefined;
      held = true;
      if (queued === mine) queued = null;
      return new Promise<void>((resolve) => {
        release = resolve;
        events.granted(waited);
      });
    };
    // The platform takes either of the two, not both.
    const options: LockOptions = steal ? { steal: true } : { signal: mine.signal };
    navigator.locks.request(name, options, hold).catch((error: unknown) => {
      if (ended) return;
      if (!held) {
        // Withdrawn by ourselves, or the browser has locks and refuses them here: then the sheet opens without.
        if (!(error instanceof DOMException && error.name === 'AbortError')) events.granted(true);
        return;
      }
      // Another tab took the lock by force.
      release = null;
      events.lost();
      request(false);
    });
    if (!steal) {
      later(QUIET_MS, () => {
        waited = true;
        if (!held && !mine.signal.aborted) events.waiting();
      });
    }
  };

  channel.onmessage = () => {
    const give = release;
    if (give === null) return;
    const answer = new Promise<void>((resolve) => later(ANSWER_MS, resolve));
    void Promise.race([events.wanted(), answer]).then(() => {
      if (ended || release !== give) return;
      release = null;
      give();
      events.lost();
      request(false);
    });
  };

  request(false);
  return {
    take() {
      channel.postMessage('wanted');
      later(ANSWER_MS + 1_000, () => {
        if (release === null) request(true);
      });
    },
    end() {
      ended = true;
      for (const timer of timers) clearTimeout(timer);
      queued?.abort();
      release?.();
      channel.close();
    },
  };
}

const BEAT_MS = 1_000;
/** Browsers slow the timers of hidden tabs to one a minute; such a tab has brought its draft to rest before. */
const STALE_MS = 5_000;

/**
 * Holds by a beat in local storage, for pages that the browser does not trust with locks (plain http to a host of the
 * local network). Weaker: two tabs that open in the same instant may both believe they hold it for one beat.
 */
export function beatLease(name: string, events: LeaseEvents, storage: Storage): Lease {
  const self = Math.random().toString(36).slice(2);
  const key = `lease:${name}`;
  let state: 'waiting' | 'holding' | 'giving' = 'waiting';
  let began = Date.now();
  let said = false;
  let waited = false;

  const read = (): { readonly tab: string; readonly at: number; readonly wanted?: string } | null => {
    try {
      const value: unknown = JSON.parse(storage.getItem(key) ?? 'null');
      return isBeat(value) ? value : null;
    } catch {
      return null;
    }
  };
  const write = (beat: { readonly tab: string; readonly at: number; readonly wanted?: string }) => {
    try {
      storage.setItem(key, JSON.stringify(beat));
    } catch {
      // Without storage there is no lease and no draft either; the revision check of the server stands alone.
    }
  };

  const beat = () => {
    const now = Date.now();
    const held = read();
    const byOther = held !== null && held.tab !== self && now - held.at < STALE_MS;
    if (state === 'waiting') {
      if (byOther) {
        waited = true;
        if (!said && now - began > QUIET_MS) {
          said = true;
          events.waiting();
        }
        return;
      }
      state = 'holding';
      write({ tab: self, at: now });
      events.granted(waited);
      return;
    }
    if (byOther) {
      lose();
      return;
    }
    if (state === 'holding' && held?.wanted !== undefined && held.wanted !== self) {
      state = 'giving';
      const { wanted } = held;
      void events.wanted().then(() => {
        write({ tab: wanted, at: Date.now() });
        lose();
      });
    }
    write({ ...held, tab: self, at: now });
  };
  const lose = () => {
    if (state === 'waiting') return;
    state = 'waiting';
    began = Date.now();
    said = true;
    waited = true;
    events.lost();
  };

  const release = () => {
    if (state !== 'waiting' && read()?.tab === self) storage.removeItem(key);
    state = 'waiting';
  };

  const timer = setInterval(beat, BEAT_MS);
  // A page that is left for good would otherwise hold on until its beat is stale.
  window.addEventListener('pagehide', release);
  beat();
  return {
    take() {
      const held = read();
      if (held !== null) write({ ...held, wanted: self });
    },
    end() {
      clearInterval(timer);
      window.removeEventListener('pagehide', release);
      release();
    },
  };
}

function isBeat(value: unknown): value is { readonly tab: string; readonly at: number; readonly wanted?: string } {
  return typeof value === 'object' && value !== null && 'tab' in value && 'at' in value && typeof value.at === 'number';
}

/** The lease of a sheet for one person, by the best means that this page is allowed. */
export function leaseOf(userId: string, sheetId: string, events: LeaseEvents): Lease {
  const name = `ohmstead-sheet-${userId}-${sheetId}`;
  if ('locks' in navigator && typeof BroadcastChannel === 'function') return lockLease(name, events);
  return beatLease(name, events, window.localStorage);
}
