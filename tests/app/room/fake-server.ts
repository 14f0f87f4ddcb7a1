import type { Result } from '@/app/_shared/result';
import type { SaveOutcome } from '@/app/_shared/wire';
import { emptySheetDocument, parseSheetDocument, serializeSheetDocument } from '@/canvas/document/schema';
import type { SheetDocument } from '@/canvas/document/types';
import type { Draft, DraftBox } from '@/app/sheets/[id]/_room/keeping/drafts';
import { Keeper, type KeeperPorts } from '@/app/sheets/[id]/_room/keeping/keeper';
import type { LeaseEvents } from '@/app/sheets/[id]/_room/keeping/lease';
import type { Theirs } from '@/app/sheets/[id]/_room/keeping/machine';

/** What happens to a save on its way. */
export type Fate =
  | 'arrives'
  /** Never reaches the server. */
  | 'lostOnTheWay'
  /** The server saves it, and the answer never comes back. */
  | 'answerLost'
  /** The server cannot reach its database. */
  | 'noDatabase'
  | 'signedOut'
  | 'refused'
  | 'gone'
  | 'outdated'
  /** The answer comes when `release` is called. */
  | 'late';

export class Outdated extends Error {}

/** A server with one sheet, which behaves as the real one promises to, and a way to it that does as it is told. */
export class FakeServer {
  revision = 1;
  document: string;
  changedBy = 'Mara Kell';
  fate: Fate = 'arrives';
  /** Every document that ever stood on the server. */
  readonly stood: string[] = [];
  readonly asked: { readonly revision: number; readonly document: string }[] = [];
  atOnce = 0;
  mostAtOnce = 0;
  private late: (() => void)[] = [];

  constructor(document: SheetDocument) {
    this.document = serializeSheetDocument(document);
    this.stood.push(this.document);
  }

  get standing(): Theirs {
    return {
      revision: this.revision,
      document: this.document,
      changedAt: '2025-03-03T11:42:00.000Z',
      changedBy: this.changedBy,
    };
  }

  /** Someone else saves from another browser. */
  othersSave(document: SheetDocument, changedBy = 'Tarik Rahimi'): void {
    this.document = serializeSheetDocument(document);
    this.stood.push(this.document);
    this.revision += 1;
    this.changedBy = changedBy;
  }

  release(): void {
    for (const answer of this.late.splice(0)) answer();
  }

  readonly save: KeeperPorts['save'] = async (input) => {
    this.asked.push({ revision: input.revision, document: input.document });
    this.atOnce += 1;
    this.mostAtOnce = Math.max(this.mostAtOnce, this.atOnce);
    try {
      return await this.answer(input);
    } finally {
      this.atOnce -= 1;
    }
  };

  private async answer(input: { readonly revision: number; readonly document: string }): Promise<Result<SaveOutcome>> {
    switch (this.fate) {
      case 'arrives':
        return this.store(input);
      case 'lostOnTheWay':
        throw new TypeError('Failed to fetch');
      case 'answerLost':
        this.store(input);
        throw new TypeError('Failed to fetch');
      case 'noDatabase':
        return { ok: false, error: { code: 'unavailable', message: 'no database' } };
      case 'signedOut':
        return { ok: false, error: { code: 'unauthenticated', message: 'signed out' } };
      case 'refused':
        return { ok: false, error: { code: 'forbidden', message: 'refused' } };
      case 'gone':
        return { ok: false, error: { code: 'notFound', message: 'gone' } };
      case 'outdated':
        throw new Outdated();
      case 'late':
        await new Promise<void>((resolve) => this.late.push(resolve));
        return this.store(input);
    }
  }

  private store(input: { readonly revision: number; readonly document: string }): Result<SaveOutcome> {
    const read = parseSheetDocument(input.document);
    if (!read.ok) return { ok: false, error: { code: 'invalid', message: read.message } };
    const text = serializeSheetDocument(read.document);
    const savedAt = '2025-03-03T11:43:00.000Z';
    if (text === this.document) return { ok: true, value: { kind: 'saved', revision: this.revision, savedAt } };
    if (input.revision !== this.revision) return { ok: true, value: { kind: 'conflict', ...this.standing } };
    this.document = text;
    this.stood.push(text);
    this.revision += 1;
    return { ok: true, value: { kind: 'saved', revision: this.revision, savedAt } };
  }
}

/** The storage of one machine, which outlives every tab. */
export class FakeMachine {
  readonly drafts = new Map<string, Draft>();
  works = true;

  readonly open = async (): Promise<DraftBox> => {
    if (!this.works) throw new DOMException('no storage here', 'SecurityError');
    return {
      read: async (userId, sheetId) => this.drafts.get(`${userId} ${sheetId}`) ?? null,
      write: async (draft) => {
        if (!this.works) throw new DOMException('full', 'QuotaExceededError');
        this.drafts.set(`${draft.userId} ${draft.sheetId}`, draft);
      },
      remove: async (userId, sheetId) => {
        this.drafts.delete(`${userId} ${sheetId}`);
      },
    };
  };
}

const NEVER = new Promise<never>(() => {});

let sheets = 0;

/** Each test has a sheet of its own: a tab remembers what it saw of a sheet. */
export function freshSheetId(): string {
  sheets += 1;
  return `sheet-${sheets}`;
}

/** A tab with the sheet open: what a person types in it, and what they see. */
export class FakeTab {
  readonly keeper: Keeper;
  document: SheetDocument;
  quiet = true;
  lease: LeaseEvents | null = null;
  leaseEnded = false;
  asksForHand = 0;
  private dead = false;

  constructor(
    readonly server: FakeServer,
    readonly machine: FakeMachine,
    sheetId: string,
    options: { readonly userId?: string; readonly mayWrite?: boolean; readonly standing?: Theirs; readonly holdLease?: boolean } = {},
  ) {
    const standing = options.standing ?? server.standing;
    const read = parseSheetDocument(standing.document);
    this.document = read.ok ? read.document : emptySheetDocument();
    this.keeper = new Keeper({
      userId: options.userId ?? 'user-mara',
      sheetId,
      mayWrite: options.mayWrite ?? true,
      standing,
      sheetName: () => 'A sheet',
      openDrafts: async () => this.whileAlive(await machine.open()),
      save: (input) => (this.dead ? NEVER : server.save(input)),
      fetchStanding: async () => (server.fate === 'lostOnTheWay' ? null : server.standing),
      lease: (events) => {
        this.lease = events;
        if (options.holdLease !== true) queueMicrotask(() => events.granted(false));
        return {
          take: () => {
            this.asksForHand += 1;
          },
          end: () => {
            this.leaseEnded = true;
          },
        };
      },
      isOutdated: (error) => error instanceof Outdated,
      document: () => this.document,
      show: (document) => {
        this.document = document;
      },
      isQuiet: () => this.quiet,
      now: () => Date.now(),
    });
  }

  /** The tab is gone, as after a crash: nothing of it reaches the machine or the server any more. */
  die(): void {
    this.dead = true;
  }

  private whileAlive(box: DraftBox): DraftBox {
    return {
      read: (userId, sheetId) => box.read(userId, sheetId),
      write: (draft) => (this.dead ? NEVER : box.write(draft)),
      remove: (userId, sheetId) => (this.dead ? NEVER : box.remove(userId, sheetId)),
    };
  }

  get keeping() {
    return this.keeper.getView().keeping;
  }

  type(purpose: string): void {
    this.document = { ...this.document, purpose };
    this.keeper.changed(this.document);
  }
}

export function withPurpose(purpose: string): SheetDocument {
  return { ...emptySheetDocument(), purpose };
}

/** The purpose in a document's text. */
export function purposeOf(text: string | undefined): string | null {
  const read = parseSheetDocument(text ?? '');
  return read.ok ? read.document.purpose : null;
}
