import type { Result } from '@/app/_shared/result';
import type { SaveOutcome } from '@/app/_shared/wire';
import { parseSheetDocument, serializeSheetDocument } from '@/canvas/document/schema';
import type { SheetDocument } from '@/canvas/document/types';
import type { DraftBox } from './drafts';
import { fingerprint } from './fingerprint';
import type { Lease, LeaseEvents } from './lease';
import { beginKeeping, isAtRest, isSaved, OVERDUE_MS, step, type Keeping, type KeepingEvent, type Theirs } from './machine';
import { decideOpening } from './opening';
import { troubleOf } from './trouble';

/** Something that this machine holds of the sheet and that cannot go on it; to be had as a file, or dropped. */
export type Leftover = {
  readonly reason: 'unreadable' | 'notAllowed';
  readonly document: string;
  /** When it was typed, in milliseconds since 1970. */
  readonly at: number;
};

export type KeeperView = { readonly keeping: Keeping; readonly leftover: Leftover | null };

export type Settled = { readonly ok: true; readonly revision: number } | { readonly ok: false };

/** What a keeper works with: everything outside it, so that a test can be the outside. */
export type KeeperPorts = {
  readonly userId: string;
  readonly sheetId: string;
  /** Whether this person may change the sheet at all. */
  readonly mayWrite: boolean;
  /** What the page came with. */
  readonly standing: Theirs;
  sheetName(): string;
  openDrafts(): Promise<DraftBox>;
  /** May reject, when the answer does not come. */
  save(input: { readonly id: string; readonly revision: number; readonly document: string }): Promise<Result<SaveOutcome>>;
  /** What stands on the server now; null when it cannot be asked. */
  fetchStanding(): Promise<Theirs | null>;
  lease(events: LeaseEvents): Lease;
  /** Whether an error says that the server does not know this build's actions. */
  isOutdated(error: unknown): boolean;
  document(): SheetDocument;
  /** Puts a document on the sheet in place of the one there. */
  show(document: SheetDocument): void;
  /** Whether the hand rests: not in the middle of a drag, where a change of the sheet would be undone by its end. */
  isQuiet(): boolean;
  now(): number;
};

/** Writes to this machine follow each other at least so far apart. */
const KEEP_EVERY_MS = 150;
const KEEP_AGAIN_MS = 2_000;
/** A storage that does not open within this does not hold up the drawing. */
const STORAGE_PATIENCE_MS = 2_000;
/** After this the sheet opens as the page has it; the server judges every save by its revision anyway. */
const FETCH_PATIENCE_MS = 5_000;
const SETTLE_PATIENCE_MS = 10_000;
const MOST_MARKS = 64;

/** The newest revision seen of each sheet in this tab: a page from the browser's history may be older. */
const newestSeen = new Map<string, number>();

/**
 * Keeps one open sheet: every change first on this machine, then on the server, one save at a time, each from the
 * revision it was made from. Restartable: after `stop` comes what was begun to its end.
 */
export class Keeper {
  private view: KeeperView;
  private readonly listeners = new Set<() => void>();
  private readonly ports: KeeperPorts;
  private standing: Theirs;
  private box: DraftBox | null = null;
  private lease: Lease | null = null;
  private phase: 'idle' | 'running' | 'ending' = 'idle';
  private run = 0;
  private attempt = 0;
  private unanswered: readonly { readonly mark: string; readonly change: number }[] = [];
  private shown: SheetDocument;
  /** A key reached the sheet before it was known who writes. */
  private touched = false;
  private lastText: { readonly document: SheetDocument; readonly text: string } | null = null;
  private keepBeganMs = -Infinity;
  private sendTimer: ReturnType<typeof setTimeout> | undefined;
  private keepTimer: ReturnType<typeof setTimeout> | undefined;
  private overdueTimer: ReturnType<typeof setTimeout> | undefined;
  private endTimer: ReturnType<typeof setTimeout> | undefined;

  constructor(ports: KeeperPorts) {
    this.ports = ports;
    this.standing = ports.standing;
    this.shown = ports.document();
    this.view = {
      keeping: beginKeeping(ports.standing.revision, ports.mayWrite ? 'opening' : 'nobody'),
      leftover: null,
    };
  }

  readonly getView = (): KeeperView => this.view;

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => {
      this.listeners.delete(listener);
    };
  };

  start(): void {
    clearTimeout(this.endTimer);
    const before = this.phase;
    this.phase = 'running';
    if (before === 'ending' || !this.ports.mayWrite) {
      if (!this.ports.mayWrite) void this.findLeftover();
      return;
    }
    const run = (this.run += 1);
    this.lease = this.ports.lease({
      granted: (waited) => void this.begin(waited, run),
      waiting: () => this.step({ type: 'hand', hand: 'elsewhere', atMs: this.ports.now() }),
      wanted: async () => {
        this.flush();
        await this.settle();
      },
      lost: () => this.yield(),
    });
  }

  /** Brings what is typed to this machine and, if it answers soon, to the server; then lets the sheet go. */
  stop(): void {
    if (this.phase !== 'running') return;
    this.phase = 'ending';
    this.flush();
    this.hurry();
    this.endTimer = setTimeout(() => this.end(), SETTLE_PATIENCE_MS);
    this.endIfDone();
  }

  /** The document on the sheet has changed by the hand of a person. */
  changed(document: SheetDocument): void {
    if (document === this.shown) return;
    this.shown = document;
    if (this.keeping.hand === 'opening') this.touched = true;
    if (this.keeping.hand !== 'here') return;
    this.step({ type: 'typed', atMs: this.ports.now() });
    this.keepSoon();
  }

  /** Sends now what is unsaved: the network is back, the person is back, or someone waits. */
  hurry(): void {
    this.step({ type: 'hurry', atMs: this.ports.now() });
  }

  /** Writes to this machine now; for a page that may have no later moment. */
  flush(): void {
    if (this.keeping.hand === 'here' && this.keeping.kept < this.keeping.typed) void this.keep();
  }

  /** Whether leaving now would lose something that is neither on the server nor on this machine. */
  wouldLose(): boolean {
    const { kept, typed, storage } = this.keeping;
    if (isSaved(this.keeping) || kept === typed) return false;
    return storage === 'fails' || this.ports.now() - this.keepBeganMs > 1_000;
  }

  /** Saves what is unsaved and says at which revision the sheet now stands; or not, when it cannot be saved now. */
  settle(): Promise<Settled> {
    this.hurry();
    const { failures } = this.keeping;
    return new Promise((resolve) => {
      const finish = (settled: Settled) => {
        clearTimeout(timer);
        unsubscribe();
        resolve(settled);
      };
      const look = () => {
        const { keeping } = this;
        if (isAtRest(keeping)) finish({ ok: true, revision: keeping.revision });
        else if (keeping.conflict !== null || keeping.hand !== 'here' || keeping.failures > failures) finish({ ok: false });
      };
      const timer = setTimeout(() => finish({ ok: false }), SETTLE_PATIENCE_MS);
      const unsubscribe = this.subscribe(look);
      look();
    });
  }

  /** After a conflict: what is on the sheet is saved over what stands on the server. */
  keepMine(): void {
    this.unanswered = [];
    this.step({ type: 'keepMine', atMs: this.ports.now() });
    void this.keep();
  }

  /** After a conflict: what stands on the server takes the place of what is on the sheet, which is dropped here. */
  keepTheirs(): boolean {
    const { conflict } = this.keeping;
    if (conflict === null) return false;
    return this.adoptText(conflict);
  }

  /** What the server has, as seen just now. Shows it, when it is newer and nothing here stands against it. */
  seen(record: Theirs): boolean {
    if (record.revision >= this.standing.revision) this.standing = record;
    this.remember(record.revision);
    const { keeping } = this;
    if (keeping.conflict !== null && record.revision > keeping.conflict.revision) {
      this.step({ type: 'conflicted', theirs: record });
      return false;
    }
    if (record.revision <= keeping.revision || keeping.hand === 'opening' || !isAtRest(keeping)) return false;
    if (keeping.hand === 'here' && !this.ports.isQuiet()) return false;
    return this.adoptText(record);
  }

  /** Makes a change of the sheet that the server has already made itself, as its `revision`. */
  changedByServer(revision: number, document: SheetDocument, show: () => void): void {
    this.shown = document;
    show();
    this.step({ type: 'adopted', revision });
    this.remember(revision);
    this.drop();
  }

  /** Asks another tab of this browser to let this one write. */
  takeHand(): void {
    this.lease?.take();
  }

  dropLeftover(): void {
    const { leftover } = this.view;
    if (leftover === null) return;
    this.set({ ...this.view, leftover: null });
    const place = leftover.reason === 'unreadable' ? aside(this.ports.sheetId) : this.ports.sheetId;
    this.box?.remove(this.ports.userId, place).catch(() => undefined);
  }

  /** The document on the sheet, as text: as it is sent, or where it is not a valid sheet, as it is. */
  text(): string {
    const document = this.ports.document();
    if (this.lastText?.document === document) return this.lastText.text;
    let text: string;
    try {
      text = serializeSheetDocument(document);
    } catch {
      // More parts than a sheet may have, say. It is kept all the same, and the server says what is wrong with it.
      text = JSON.stringify(document);
    }
    this.lastText = { document, text };
    return text;
  }

  private get keeping(): Keeping {
    return this.view.keeping;
  }

  private set(view: KeeperView): void {
    if (view === this.view) return;
    this.view = view;
    for (const listener of [...this.listeners]) listener();
  }

  private step(event: KeepingEvent): void {
    const keeping = step(this.keeping, event);
    if (keeping === this.keeping) return;
    const due = keeping.sendAtMs !== this.keeping.sendAtMs;
    this.set({ ...this.view, keeping });
    if (due) this.arrange();
    this.endIfDone();
  }

  private arrange(): void {
    clearTimeout(this.sendTimer);
    const { sendAtMs } = this.keeping;
    if (sendAtMs === null || this.phase === 'idle') return;
    this.sendTimer = setTimeout(() => void this.send(), Math.max(0, sendAtMs - this.ports.now()));
  }

  private async openBox(): Promise<DraftBox | null> {
    const box = await soon(this.ports.openDrafts(), STORAGE_PATIENCE_MS);
    if (box === null) this.step({ type: 'keepFailed' });
    this.box = box;
    return box;
  }

  private async findLeftover(): Promise<void> {
    const { userId, sheetId } = this.ports;
    const box = await soon(this.ports.openDrafts(), STORAGE_PATIENCE_MS);
    const draft = box === null ? null : await soon(box.read(userId, sheetId), STORAGE_PATIENCE_MS);
    if (draft === null) return;
    this.box = box;
    if (draft.document === this.standing.document) {
      box?.remove(userId, sheetId).catch(() => undefined);
      return;
    }
    this.set({ ...this.view, leftover: { reason: 'notAllowed', document: draft.document, at: draft.at } });
  }

  /** This tab writes from now on: looks what the server has and what this machine holds, and goes on from there. */
  private async begin(waited: boolean, run: number): Promise<void> {
    const { userId, sheetId } = this.ports;
    if (this.keeping.hand === 'elsewhere') this.step({ type: 'hand', hand: 'opening', atMs: this.ports.now() });
    const box = await this.openBox();
    const stale = waited || (newestSeen.get(sheetId) ?? 0) > this.standing.revision;
    const fresh = stale ? await soon(this.ports.fetchStanding(), FETCH_PATIENCE_MS) : null;
    if (fresh !== null && fresh.revision >= this.standing.revision) this.standing = fresh;
    const draft = box === null ? null : await soon(box.read(userId, sheetId), STORAGE_PATIENCE_MS);
    const set = box === null ? null : await soon(box.read(userId, aside(sheetId)), STORAGE_PATIENCE_MS);
    if (run !== this.run || this.phase === 'idle') return;
    if (set !== null) this.set({ ...this.view, leftover: { reason: 'unreadable', document: set.document, at: set.at } });

    const atMs = this.ports.now();
    const opening = decideOpening(draft, this.standing);
    switch (opening.kind) {
      case 'asStanding':
        if (draft !== null) this.drop();
        if (this.standing.revision !== this.keeping.revision) this.adoptText(this.standing);
        break;
      case 'takeUp':
      case 'conflict':
        this.unanswered = (draft?.unanswered ?? []).map((mark) => ({ mark, change: -1 }));
        this.display(opening.document);
        this.step(
          opening.kind === 'takeUp'
            ? { type: 'tookUp', revision: opening.revision, theirs: null, atMs }
            : { type: 'tookUp', revision: draft?.madeFrom ?? 0, theirs: this.standing, atMs },
        );
        break;
      case 'unreadable':
        if (draft !== null) {
          // Its place is needed for what is typed from now on.
          box?.write({ ...draft, sheetId: aside(sheetId) }).catch(() => undefined);
          this.set({ ...this.view, leftover: { reason: 'unreadable', document: draft.document, at: draft.at } });
        }
        break;
    }
    this.remember(this.standing.revision);
    this.step({ type: 'hand', hand: 'here', atMs });
    if (this.touched) {
      this.touched = false;
      this.step({ type: 'typed', atMs });
      this.keepSoon();
    }
  }

  private yield(): void {
    this.attempt += 1;
    this.unanswered = [];
    clearTimeout(this.keepTimer);
    clearTimeout(this.overdueTimer);
    this.step({ type: 'hand', hand: 'elsewhere', atMs: this.ports.now() });
  }

  private display(document: SheetDocument): void {
    this.shown = document;
    this.touched = false;
    this.ports.show(document);
  }

  private adoptText(record: Theirs): boolean {
    const read = parseSheetDocument(record.document);
    if (!read.ok) return false;
    this.display(read.document);
    this.step({ type: 'adopted', revision: record.revision });
    this.remember(record.revision);
    this.drop();
    return true;
  }

  private remember(revision: number): void {
    newestSeen.set(this.ports.sheetId, Math.max(revision, newestSeen.get(this.ports.sheetId) ?? 0));
  }

  /** Nothing is unsaved: the draft has done its work. Only whoever writes may clear it. */
  private drop(): void {
    this.unanswered = [];
    clearTimeout(this.keepTimer);
    if (this.keeping.hand === 'here' || this.keeping.hand === 'opening') {
      this.box?.remove(this.ports.userId, this.ports.sheetId).catch(() => undefined);
    }
  }

  private keepSoon(): void {
    clearTimeout(this.keepTimer);
    const wait = this.keepBeganMs + KEEP_EVERY_MS - this.ports.now();
    // Never within the edit itself: setting the sheet as text would hold up the readings. A page that ends flushes.
    this.keepTimer = setTimeout(() => void this.keep(), Math.max(0, wait));
  }

  private async keep(): Promise<void> {
    clearTimeout(this.keepTimer);
    const change = this.keeping.typed;
    this.keepBeganMs = this.ports.now();
    if (this.box === null) {
      this.step({ type: 'keepFailed' });
      return;
    }
    try {
      await this.box.write({
        userId: this.ports.userId,
        sheetId: this.ports.sheetId,
        sheetName: this.ports.sheetName(),
        document: this.text(),
        madeFrom: this.keeping.revision,
        unanswered: this.unanswered.map(({ mark }) => mark),
        at: Date.now(),
      });
      this.step({ type: 'kept', change });
    } catch {
      this.step({ type: 'keepFailed' });
      if (this.keeping.hand === 'here') this.keepTimer = setTimeout(() => void this.keep(), KEEP_AGAIN_MS);
    }
  }

  private async send(): Promise<void> {
    const { hand, sending, conflict } = this.keeping;
    if (hand !== 'here' || sending !== null || conflict !== null || isSaved(this.keeping)) return;
    const attempt = (this.attempt += 1);
    const { revision, typed } = this.keeping;
    const document = this.text();
    const mark = fingerprint(document);
    this.unanswered = [...this.unanswered.filter((one) => one.mark !== mark), { mark, change: typed }].slice(-MOST_MARKS);
    this.step({ type: 'sent' });
    this.overdueTimer = setTimeout(() => this.step({ type: 'overdue' }), OVERDUE_MS);
    // Should this page die before the answer, the draft must know what may already be on the server.
    await soon(this.keep(), STORAGE_PATIENCE_MS);
    let answer: Result<SaveOutcome> | { readonly ok: 'lost'; readonly error: unknown };
    try {
      answer = await this.ports.save({ id: this.ports.sheetId, revision, document });
    } catch (error) {
      answer = { ok: 'lost', error };
    }
    if (attempt !== this.attempt) return;
    clearTimeout(this.overdueTimer);
    this.answered(answer);
  }

  private answered(answer: Result<SaveOutcome> | { readonly ok: 'lost'; readonly error: unknown } | undefined): void {
    const atMs = this.ports.now();
    if (answer === undefined || answer.ok !== true) {
      this.step({ type: 'failed', trouble: troubleOf(answer, this.ports.isOutdated), atMs });
      return;
    }
    const outcome = answer.value;
    this.remember(outcome.revision);
    if (outcome.kind === 'conflict') {
      const mark = fingerprint(outcome.document);
      const own = this.unanswered.find((one) => one.mark === mark);
      if (own === undefined) {
        this.standing = outcome;
        this.step({ type: 'conflicted', theirs: outcome });
        return;
      }
      this.unanswered = [];
      this.step({ type: 'foundSaved', change: own.change, revision: outcome.revision, atMs });
    } else {
      this.unanswered = [];
      this.step({ type: 'saved', revision: outcome.revision, atMs });
    }
    if (isSaved(this.keeping)) this.drop();
  }

  private endIfDone(): void {
    if (this.phase !== 'ending') return;
    const { keeping } = this;
    const over = isAtRest(keeping) || keeping.hand !== 'here' || keeping.conflict !== null || keeping.trouble !== null;
    if (over && keeping.sending === null) this.end();
  }

  private end(): void {
    if (this.phase !== 'ending') return;
    this.phase = 'idle';
    this.attempt += 1;
    for (const timer of [this.sendTimer, this.keepTimer, this.overdueTimer, this.endTimer]) clearTimeout(timer);
    const lease = this.lease;
    this.lease = null;
    if (this.ports.mayWrite) this.step({ type: 'hand', hand: 'opening', atMs: this.ports.now() });
    lease?.end();
  }
}

/** Where a draft goes that cannot be read as a sheet, out of the way of the next one. */
function aside(sheetId: string): string {
  return `${sheetId}/unreadable`;
}

/** The value, or null when it does not come within the time or does not come at all. */
async function soon<T>(promise: Promise<T>, patienceMs: number): Promise<T | null> {
  let timer: ReturnType<typeof setTimeout> | undefined;
  const late = new Promise<null>((resolve) => {
    timer = setTimeout(() => resolve(null), patienceMs);
  });
  try {
    return await Promise.race([promise, late]);
  } catch {
    return null;
  } finally {
    clearTimeout(timer);
  }
}
