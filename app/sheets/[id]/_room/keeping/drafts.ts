import { openDB, type DBSchema, type IDBPDatabase } from 'idb';

/** What this machine holds of a sheet that the server has not acknowledged. One a person and sheet. */
export type Draft = {
  readonly userId: string;
  readonly sheetId: string;
  readonly sheetName: string;
  /** The document, as it is sent. */
  readonly document: string;
  /** The server's revision that it was made from. */
  readonly madeFrom: number;
  /** Marks of what was sent from that revision without an answer: the server may have taken any one of them. */
  readonly unanswered: readonly string[];
  /** When it was typed, in milliseconds since 1970. */
  readonly at: number;
};

/** Where drafts are kept. Calls take effect in the order in which they are made. */
export type DraftBox = {
  read(userId: string, sheetId: string): Promise<Draft | null>;
  write(draft: Draft): Promise<void>;
  remove(userId: string, sheetId: string): Promise<void>;
};

interface DraftSchema extends DBSchema {
  drafts: { key: [userId: string, sheetId: string]; value: Draft };
}

const DATABASE = 'ohmstead';
const VERSION = 1;

let opened: Promise<IDBPDatabase<DraftSchema>> | null = null;

function open(): Promise<IDBPDatabase<DraftSchema>> {
  opened ??= openDB<DraftSchema>(DATABASE, VERSION, {
    upgrade(database) {
      // A person's drafts are found by the person: whoever uses the machine next never meets them.
      database.createObjectStore('drafts', { keyPath: ['userId', 'sheetId'] });
    },
    blocking(_current, _blocked, event) {
      // A newer build in another tab wants to change the store; holding it up would stop that tab.
      (event.target as IDBDatabase).close();
      opened = null;
    },
    terminated() {
      opened = null;
    },
  });
  // A database that could not be opened is tried again at the next call, not remembered as broken.
  opened.catch(() => {
    opened = null;
  });
  return opened;
}

/**
 * Drafts in IndexedDB.
 * @throws (rejects) where the browser has no such storage, or it is full
 */
export async function openDraftBox(): Promise<DraftBox> {
  let database = await open();
  // A connection can be closed under our feet; the next call then takes a new one.
  const live = async <T>(ask: (database: IDBPDatabase<DraftSchema>) => Promise<T>): Promise<T> => {
    try {
      return await ask(database);
    } catch (error) {
      if (!(error instanceof DOMException) || error.name !== 'InvalidStateError') throw error;
      database = await open();
      return ask(database);
    }
  };
  return {
    read: (userId, sheetId) => live(async (db) => (await db.get('drafts', [userId, sheetId])) ?? null),
    write: (draft) => live((db) => change(db, (store) => store.put(draft))),
    remove: (userId, sheetId) => live((db) => change(db, (store) => store.delete([userId, sheetId]))),
  };
}

type Store = { put(draft: Draft): Promise<unknown>; delete(key: [userId: string, sheetId: string]): Promise<unknown> };

/**
 * Begins, asks and commits in one go, without waiting in between: a page that is being closed has no later moment, and
 * a transaction that was told to commit is carried out without it.
 */
async function change(database: IDBPDatabase<DraftSchema>, ask: (store: Store) => Promise<unknown>): Promise<void> {
  const transaction = database.transaction('drafts', 'readwrite');
  const asked = ask(transaction.store);
  transaction.commit();
  await Promise.all([asked, transaction.done]);
}
