import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { beatLease, lockLease, type LeaseEvents } from '@/app/sheets/[id]/_room/keeping/lease';

/** A browser's lock manager, as far as one exclusive lock goes: a queue, `signal` and `steal`. */
class FakeLocks {
  private held: { readonly reject: (error: unknown) => void } | null = null;
  private queue: (() => void)[] = [];

  request(_name: string, options: LockOptions, hold: () => Promise<void> | undefined): Promise<void> {
    return new Promise((resolve, reject) => {
      const grant = () => {
        const mine = { reject };
        this.held = mine;
        const done = () => {
          if (this.held !== mine) return;
          this.held = null;
          resolve();
          this.queue.shift()?.();
        };
        const kept = hold();
        if (kept === undefined) done();
        else void kept.then(done);
      };
      if (options.steal === true) {
        this.held?.reject(new DOMException('stolen', 'AbortError'));
        grant();
        return;
      }
      options.signal?.addEventListener('abort', () => {
        this.queue = this.queue.filter((one) => one !== grant);
        reject(new DOMException('withdrawn', 'AbortError'));
      });
      if (this.held === null) grant();
      else this.queue.push(grant);
    });
  }
}

class FakeChannel {
  static readonly all = new Set<FakeChannel>();
  onmessage: (() => void) | null = null;
  constructor(readonly name: string) {
    FakeChannel.all.add(this);
  }
  postMessage(): void {
    for (const other of FakeChannel.all) if (other !== this && other.name === this.name) queueMicrotask(() => other.onmessage?.());
  }
  close(): void {
    FakeChannel.all.delete(this);
  }
}

function recorder(answers = true) {
  const said: string[] = [];
  const events: LeaseEvents = {
    granted: (waited) => said.push(waited ? 'granted after another' : 'granted'),
    waiting: () => said.push('waiting'),
    wanted: () => {
      said.push('wanted');
      return answers ? Promise.resolve() : new Promise(() => {});
    },
    lost: () => said.push('lost'),
  };
  return { said, events };
}

const pass = (ms: number) => vi.advanceTimersByTimeAsync(ms);

beforeEach(() => {
  vi.useFakeTimers();
  FakeChannel.all.clear();
  vi.stubGlobal('BroadcastChannel', FakeChannel);
  vi.stubGlobal('navigator', { locks: new FakeLocks() });
});

afterEach(() => {
  vi.useRealTimers();
  vi.unstubAllGlobals();
});

describe('the lease by locks', () => {
  it('is had at once by the only tab, and is silent about a wait shorter than a reload', async () => {
    const first = recorder();
    const lease = lockLease('s', first.events);
    await pass(1_100);
    expect(first.said).toEqual(['granted']);
    lease.end();
    const second = recorder();
    lockLease('s', second.events);
    await pass(1_100);
    expect(second.said).toEqual(['granted']);
  });

  it('makes the second tab wait, and gives it the lease when the first is closed', async () => {
    const first = recorder();
    const second = recorder();
    const lease = lockLease('s', first.events);
    lockLease('s', second.events);
    await pass(1_100);
    expect(second.said).toEqual(['waiting']);
    lease.end();
    await pass(1);
    expect(second.said).toEqual(['waiting', 'granted after another']);
  });

  it('is given over when asked for, after the holder has come to rest, and comes back in turn', async () => {
    const first = recorder();
    const second = recorder();
    lockLease('s', first.events);
    const lease = lockLease('s', second.events);
    await pass(1_100);
    lease.take();
    await pass(1);
    expect(first.said).toEqual(['granted', 'wanted', 'lost']);
    expect(second.said).toEqual(['waiting', 'granted after another']);
    await pass(10_000);
    expect(second.said).toEqual(['waiting', 'granted after another']);
    lease.end();
    await pass(1);
    expect(first.said.at(-1)).toBe('granted after another');
  });

  it('is given over after a while by a holder that does not come to rest', async () => {
    const first = recorder(false);
    const second = recorder();
    lockLease('s', first.events);
    const lease = lockLease('s', second.events);
    await pass(1_100);
    lease.take();
    await pass(4_100);
    expect(second.said.at(-1)).toBe('granted after another');
  });

  it('is taken from a holder that hears nothing, which is told when it wakes', async () => {
    const first = recorder();
    const second = recorder();
    lockLease('s', first.events);
    for (const channel of FakeChannel.all) channel.onmessage = null;
    const lease = lockLease('s', second.events);
    await pass(1_100);
    lease.take();
    await pass(5_100);
    expect(second.said.at(-1)).toBe('granted after another');
    expect(first.said.at(-1)).toBe('lost');
  });

  it('lets the sheet open without, where the browser has locks and refuses them', async () => {
    vi.stubGlobal('navigator', { locks: { request: () => Promise.reject(new DOMException('no', 'SecurityError')) } });
    const only = recorder();
    lockLease('s', only.events);
    await pass(1);
    expect(only.said).toEqual(['granted after another']);
  });
});

class FakeStorage implements Storage {
  private readonly items = new Map<string, string>();
  get length(): number {
    return this.items.size;
  }
  clear(): void {
    this.items.clear();
  }
  getItem(key: string): string | null {
    return this.items.get(key) ?? null;
  }
  key(): string | null {
    return null;
  }
  removeItem(key: string): void {
    this.items.delete(key);
  }
  setItem(key: string, value: string): void {
    this.items.set(key, value);
  }
}

describe('the lease by beats, where there are no locks', () => {
  beforeEach(() => {
    vi.stubGlobal('window', new EventTarget());
  });

  it('is one tab’s at a time, is given over when asked for, and falls to the next when the holder is gone', async () => {
    const storage = new FakeStorage();
    const first = recorder();
    const second = recorder();
    const held = beatLease('s', first.events, storage);
    const waiting = beatLease('s', second.events, storage);
    await pass(2_000);
    expect(first.said).toEqual(['granted']);
    expect(second.said).toEqual(['waiting']);
    waiting.take();
    await pass(3_000);
    expect(first.said).toEqual(['granted', 'wanted', 'lost']);
    expect(second.said).toEqual(['waiting', 'granted after another']);
    waiting.end();
    await pass(2_000);
    expect(first.said.at(-1)).toBe('granted after another');
    held.end();
    expect(storage.length).toBe(0);
  });

  it('is free again when its holder has died without a word', async () => {
    const storage = new FakeStorage();
    storage.setItem('lease:s', JSON.stringify({ tab: 'dead', at: Date.now() }));
    const next = recorder();
    beatLease('s', next.events, storage);
    await pass(3_000);
    expect(next.said).toEqual(['waiting']);
    await pass(4_000);
    expect(next.said).toEqual(['waiting', 'granted after another']);
  });
});
