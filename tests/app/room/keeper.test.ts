import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { keepingWords } from '@/app/sheets/[id]/_room/keeping/words';
import { FakeMachine, FakeServer, FakeTab, freshSheetId, purposeOf, withPurpose } from './fake-server';

beforeEach(() => {
  vi.useFakeTimers();
});

afterEach(() => {
  vi.useRealTimers();
});

/** Lets promises and timers of the given time run. */
const pass = (ms: number) => vi.advanceTimersByTimeAsync(ms);

async function opened(options: ConstructorParameters<typeof FakeTab>[3] = {}) {
  const server = new FakeServer(withPurpose('as opened'));
  const machine = new FakeMachine();
  const sheetId = freshSheetId();
  const tab = new FakeTab(server, machine, sheetId, options);
  tab.keeper.start();
  await pass(1);
  const draft = () => machine.drafts.get(`user-mara ${sheetId}`);
  return { server, machine, sheetId, tab, draft };
}

/** The tab dies, and the same sheet is opened anew on the same machine. */
async function reopened(old: FakeTab, sheetId: string, userId = 'user-mara') {
  old.die();
  const { server, machine } = old;
  const tab = new FakeTab(server, machine, sheetId, { userId });
  tab.keeper.start();
  await pass(1);
  return tab;
}

describe('what is typed', () => {
  it('is on this machine within 150 ms, and on the server after a pause, and then no longer here', async () => {
    const { server, tab, draft } = await opened();
    tab.type('one');
    await pass(0);
    expect(purposeOf(draft()?.document)).toBe('one');
    tab.type('two');
    await pass(150);
    expect(purposeOf(draft()?.document)).toBe('two');
    expect(server.asked).toHaveLength(0);
    expect(keepingWords(tab.keeping, false).text).toBe('Saving…');
    await pass(600);
    expect(purposeOf(server.document)).toBe('two');
    expect(server.revision).toBe(2);
    expect(draft()).toBeUndefined();
    expect(keepingWords(tab.keeping, false).text).toBe('Saved · revision 2');
  });

  it('is saved at most 3 s after the first change, however busy the hand is', async () => {
    const { server, tab } = await opened();
    for (let turn = 0; turn < 40; turn += 1) {
      tab.type(`stroke ${turn}`);
      await pass(100);
    }
    expect(server.asked.length).toBeGreaterThanOrEqual(1);
    expect(server.asked.length).toBeLessThanOrEqual(2);
  });

  it('is sent one save at a time, each from the revision of the one before', async () => {
    const { server, tab } = await opened();
    server.fate = 'late';
    tab.type('one');
    await pass(700);
    expect(server.asked).toHaveLength(1);
    tab.type('two');
    await pass(5_000);
    expect(server.asked).toHaveLength(1);
    server.fate = 'arrives';
    server.release();
    await pass(700);
    expect(server.mostAtOnce).toBe(1);
    expect(server.asked.map(({ revision }) => revision)).toEqual([1, 2]);
    expect(purposeOf(server.document)).toBe('two');
    expect(tab.keeping.revision).toBe(3);
  });

  it('says that it is on this machine only while an answer is overdue', async () => {
    const { server, tab } = await opened();
    server.fate = 'late';
    tab.type('one');
    await pass(700 + 8_000);
    expect(keepingWords(tab.keeping, false).text).toBe('Kept on this machine only');
    server.release();
    await pass(1);
    expect(keepingWords(tab.keeping, false).text).toBe('Saved · revision 2');
  });
});

describe('a key that comes before the sheet is open', () => {
  it('counts as typed', async () => {
    const server = new FakeServer(withPurpose('as opened'));
    const tab = new FakeTab(server, new FakeMachine(), freshSheetId());
    tab.keeper.start();
    tab.type('early');
    await pass(700);
    expect(purposeOf(server.document)).toBe('early');
  });
});

describe('a server that does not answer', () => {
  it.each(['lostOnTheWay', 'noDatabase'] as const)('%s: keeps it here, tries at 1, 2, 4 … 30 s, and saves when it answers', async (fate) => {
    const { server, tab, draft } = await opened();
    server.fate = fate;
    tab.type('one');
    await pass(601);
    expect(server.asked).toHaveLength(1);
    expect(keepingWords(tab.keeping, false).text).toBe('Kept on this machine only');
    expect(purposeOf(draft()?.document)).toBe('one');
    const gaps: number[] = [];
    for (let turn = 0; turn < 7; turn += 1) {
      const before = server.asked.length;
      let waited = 0;
      while (server.asked.length === before) {
        await pass(100);
        waited += 100;
      }
      gaps.push(Math.round(waited / 1_000));
    }
    expect(gaps).toEqual([1, 2, 4, 8, 16, 30, 30]);
    server.fate = 'arrives';
    tab.keeper.hurry();
    await pass(1);
    expect(purposeOf(server.document)).toBe('one');
    expect(draft()).toBeUndefined();
  });

  it('is not asked more often because the hand goes on typing', async () => {
    const { server, tab, draft } = await opened();
    server.fate = 'lostOnTheWay';
    for (let turn = 0; turn < 100; turn += 1) {
      tab.type(`stroke ${turn}`);
      await pass(100);
    }
    // 0.6 s, then after 1, 2 and 4 s more.
    expect(server.asked).toHaveLength(4);
    await pass(200);
    expect(purposeOf(draft()?.document)).toBe('stroke 99');
  });

  it('has saved, but its answer was lost: the same is sent again and there is no conflict', async () => {
    const { server, tab } = await opened();
    server.fate = 'answerLost';
    tab.type('one');
    await pass(700);
    server.fate = 'arrives';
    await pass(1_100);
    expect(tab.keeping.conflict).toBeNull();
    expect(keepingWords(tab.keeping, false).text).toBe('Saved · revision 2');
  });

  it('has saved, but its answer was lost while the hand went on: it knows its own work again', async () => {
    const { server, tab, draft } = await opened();
    server.fate = 'answerLost';
    tab.type('one');
    await pass(700);
    server.fate = 'lostOnTheWay';
    tab.type('two');
    await pass(1_100);
    server.fate = 'arrives';
    tab.type('three');
    await pass(10_000);
    expect(tab.keeping.conflict).toBeNull();
    expect(purposeOf(server.document)).toBe('three');
    expect(server.revision).toBe(3);
    expect(draft()).toBeUndefined();
  });

  it('does not know this build any more: says to load again, does not hammer, keeps the draft', async () => {
    const { server, tab, draft } = await opened();
    server.fate = 'outdated';
    tab.type('one');
    await pass(60_000);
    expect(server.asked).toHaveLength(1);
    expect(tab.keeping.trouble).toEqual({ kind: 'outdated' });
    expect(purposeOf(draft()?.document)).toBe('one');
  });
});

describe('a session or a role that ends while the sheet is open', () => {
  it('keeps the draft, and saves at once when the person is signed in again', async () => {
    const { server, tab, draft } = await opened();
    server.fate = 'signedOut';
    tab.type('one');
    await pass(700);
    expect(tab.keeping.trouble).toEqual({ kind: 'signedOut' });
    expect(purposeOf(draft()?.document)).toBe('one');
    server.fate = 'arrives';
    tab.keeper.hurry();
    await pass(1);
    expect(keepingWords(tab.keeping, false).text).toBe('Saved · revision 2');
  });

  it.each(['refused', 'gone'] as const)('%s: keeps the draft and says so', async (fate) => {
    const { server, tab, draft } = await opened();
    server.fate = fate;
    tab.type('one');
    await pass(700);
    expect(tab.keeping.trouble).toEqual({ kind: fate });
    expect(purposeOf(draft()?.document)).toBe('one');
  });

  it('a document that the server refuses is not sent again until it changes', async () => {
    const { server, tab } = await opened();
    tab.type('x'.repeat(2_001));
    await pass(60_000);
    expect(server.asked).toHaveLength(1);
    expect(tab.keeping.trouble?.kind).toBe('rejected');
    tab.type('short');
    await pass(700);
    expect(purposeOf(server.document)).toBe('short');
    expect(tab.keeping.trouble).toBeNull();
  });
});

describe('on return', () => {
  it('a tab closed before the save: the draft is taken up and saved without asking', async () => {
    const { server, machine, sheetId, tab } = await opened();
    tab.type('one');
    await pass(100);
    const again = await reopened(tab, sheetId);
    expect(again.document.purpose).toBe('one');
    await pass(1);
    expect(purposeOf(server.document)).toBe('one');
    expect(again.keeping.conflict).toBeNull();
    expect(machine.drafts.size).toBe(0);
  });

  it('a tab that died between sending and the answer: its own work is known again, and what came after is saved', async () => {
    const { server, sheetId, tab } = await opened();
    server.fate = 'answerLost';
    tab.type('one');
    await pass(700);
    server.fate = 'lostOnTheWay';
    tab.type('two');
    await pass(200);
    server.fate = 'arrives';
    expect(server.revision).toBe(2);
    const again = await reopened(tab, sheetId);
    await pass(10);
    expect(again.keeping.conflict).toBeNull();
    expect(purposeOf(server.document)).toBe('two');
    expect(server.revision).toBe(3);
  });

  it('a draft that the server has already: nothing is saved, and the draft goes', async () => {
    const { server, machine, sheetId, tab } = await opened();
    server.fate = 'answerLost';
    tab.type('one');
    await pass(700);
    server.fate = 'arrives';
    const asked = server.asked.length;
    const again = await reopened(tab, sheetId);
    await pass(10);
    expect(server.asked).toHaveLength(asked);
    expect(machine.drafts.size).toBe(0);
    expect(keepingWords(again.keeping, false).text).toBe('Saved · revision 2');
  });

  it('someone changed the sheet meanwhile: both are held, and nothing is sent until the person chooses', async () => {
    const { server, machine, sheetId, tab } = await opened();
    server.fate = 'lostOnTheWay';
    tab.type('mine');
    await pass(700);
    server.fate = 'arrives';
    server.othersSave(withPurpose('theirs'));
    const asked = server.asked.length;
    const again = await reopened(tab, sheetId);
    await pass(10_000);
    expect(again.document.purpose).toBe('mine');
    expect(purposeOf(again.keeping.conflict?.document)).toBe('theirs');
    expect(again.keeping.conflict?.changedBy).toBe('Tarik Rahimi');
    expect(server.asked).toHaveLength(asked);
    expect(machine.drafts.size).toBe(1);
  });

  it('the draft of another person on the same machine is not offered, and stays theirs', async () => {
    const { machine, sheetId, tab } = await opened();
    tab.type('mara’s');
    await pass(100);
    const other = await reopened(tab, sheetId, 'user-tarik');
    await pass(5_000);
    expect(other.document.purpose).toBe('as opened');
    expect(other.keeper.getView().leftover).toBeNull();
    expect(machine.drafts.has(`user-mara ${sheetId}`)).toBe(true);
  });

  it('someone who may not change the sheet any more gets the draft as a file, not on the sheet', async () => {
    const { server, machine, sheetId, tab } = await opened();
    tab.type('mine');
    await pass(100);
    const viewer = new FakeTab(server, machine, sheetId, { mayWrite: false });
    viewer.keeper.start();
    await pass(1);
    expect(viewer.document.purpose).toBe('as opened');
    expect(viewer.keeper.getView().leftover?.reason).toBe('notAllowed');
    expect(purposeOf(viewer.keeper.getView().leftover?.document)).toBe('mine');
    viewer.keeper.dropLeftover();
    await pass(1);
    expect(machine.drafts.size).toBe(0);
  });

  it('a draft that cannot be read as a sheet is set aside, not written over', async () => {
    const { server, machine, sheetId, tab: first } = await opened();
    machine.drafts.set(`user-mara ${sheetId}`, {
      userId: 'user-mara',
      sheetId,
      sheetName: 'A sheet',
      document: '{"version":99}',
      madeFrom: 1,
      unanswered: [],
      at: 5,
    });
    const tab = await reopened(first, sheetId);
    expect(tab.keeper.getView().leftover).toEqual({ reason: 'unreadable', document: '{"version":99}', at: 5 });
    tab.type('new work');
    await pass(100);
    expect(machine.drafts.get(`user-mara ${sheetId}/unreadable`)?.document).toBe('{"version":99}');
    await pass(1_000);
    expect(purposeOf(server.document)).toBe('new work');
    const again = await reopened(tab, sheetId);
    expect(again.keeper.getView().leftover?.document).toBe('{"version":99}');
  });

  it('a page from the browser’s history, older than what this tab saved: the newer one is fetched first', async () => {
    const { server, machine, sheetId, tab } = await opened();
    const stale = server.standing;
    tab.type('one');
    await pass(700);
    const again = new FakeTab(server, machine, sheetId, { standing: stale });
    again.keeper.start();
    await pass(1);
    expect(again.document.purpose).toBe('one');
    again.type('two');
    await pass(700);
    expect(again.keeping.conflict).toBeNull();
    expect(server.revision).toBe(3);
  });
});

describe('a conflict', () => {
  async function conflicted() {
    const all = await opened();
    all.server.othersSave(withPurpose('theirs'));
    all.tab.type('mine');
    await pass(700);
    expect(keepingWords(all.tab.keeping, false).text).toBe('Conflict');
    return all;
  }

  it('keeps what is typed after it too', async () => {
    const { tab, server, draft } = await conflicted();
    tab.type('mine, further');
    await pass(10_000);
    expect(purposeOf(draft()?.document)).toBe('mine, further');
    expect(purposeOf(server.document)).toBe('theirs');
  });

  it('mine: is saved over theirs, from their revision', async () => {
    const { tab, server, draft } = await conflicted();
    tab.keeper.keepMine();
    await pass(1);
    expect(purposeOf(server.document)).toBe('mine');
    expect(server.revision).toBe(3);
    expect(draft()).toBeUndefined();
    expect(keepingWords(tab.keeping, false).text).toBe('Saved · revision 3');
  });

  it('mine, but someone saved again before: asks again, with what stands there now', async () => {
    const { tab, server } = await conflicted();
    server.othersSave(withPurpose('theirs, further'));
    tab.keeper.keepMine();
    await pass(1);
    expect(purposeOf(tab.keeping.conflict?.document)).toBe('theirs, further');
    expect(purposeOf(server.document)).toBe('theirs, further');
  });

  it('theirs: is shown, mine is dropped, and the next change goes on from theirs', async () => {
    const { tab, server, draft } = await conflicted();
    tab.keeper.keepTheirs();
    await pass(1);
    expect(tab.document.purpose).toBe('theirs');
    expect(draft()).toBeUndefined();
    tab.type('theirs and mine');
    await pass(700);
    expect(purposeOf(server.document)).toBe('theirs and mine');
  });

  it('survives a closed tab', async () => {
    const { tab, sheetId } = await conflicted();
    const again = await reopened(tab, sheetId);
    expect(again.document.purpose).toBe('mine');
    expect(purposeOf(again.keeping.conflict?.document)).toBe('theirs');
  });

  it('a choice of mine that could not be sent is not asked for again on return', async () => {
    const { server, sheetId, tab } = await conflicted();
    server.fate = 'lostOnTheWay';
    tab.keeper.keepMine();
    await pass(100);
    server.fate = 'arrives';
    const again = await reopened(tab, sheetId);
    await pass(10);
    expect(again.keeping.conflict).toBeNull();
    expect(purposeOf(server.document)).toBe('mine');
  });
});

describe('following what others save', () => {
  it('takes it in when nothing is unsaved, and saves from there', async () => {
    const { tab, server } = await opened();
    server.othersSave(withPurpose('theirs'));
    expect(tab.keeper.seen(server.standing)).toBe(true);
    expect(tab.document.purpose).toBe('theirs');
    expect(tab.keeping.typed).toBe(tab.keeping.saved);
    tab.type('on top');
    await pass(700);
    expect(tab.keeping.conflict).toBeNull();
    expect(purposeOf(server.document)).toBe('on top');
  });

  it('leaves alone what is unsaved, on its way, or under the hand', async () => {
    const { tab, server } = await opened();
    tab.type('mine');
    server.othersSave(withPurpose('theirs'));
    expect(tab.keeper.seen(server.standing)).toBe(false);
    expect(tab.document.purpose).toBe('mine');

    const second = await opened();
    second.tab.quiet = false;
    second.server.othersSave(withPurpose('theirs'));
    expect(second.tab.keeper.seen(second.server.standing)).toBe(false);
    expect(second.tab.document.purpose).toBe('as opened');
  });

  it('an answer older than the tab’s own save changes nothing', async () => {
    const { tab, server } = await opened();
    const old = server.standing;
    tab.type('one');
    await pass(700);
    expect(tab.keeper.seen(old)).toBe(false);
    expect(tab.document.purpose).toBe('one');
  });

  it('readers follow', async () => {
    const { tab, server } = await opened({ mayWrite: false });
    server.othersSave(withPurpose('theirs'));
    expect(tab.keeper.seen(server.standing)).toBe(true);
    expect(tab.document.purpose).toBe('theirs');
  });
});

describe('storage that does not work', () => {
  it('says so, goes on, and warns before leaving until the server has it', async () => {
    const server = new FakeServer(withPurpose('as opened'));
    const machine = new FakeMachine();
    machine.works = false;
    const tab = new FakeTab(server, machine, freshSheetId());
    tab.keeper.start();
    await pass(1);
    expect(tab.keeping.hand).toBe('here');
    expect(tab.keeping.storage).toBe('fails');
    tab.type('one');
    expect(tab.keeper.wouldLose()).toBe(true);
    await pass(700);
    expect(purposeOf(server.document)).toBe('one');
    expect(tab.keeper.wouldLose()).toBe(false);
  });

  it('that fills up: says so, and is tried again', async () => {
    const { server, machine, tab, draft } = await opened();
    server.fate = 'lostOnTheWay';
    machine.works = false;
    tab.type('one');
    await pass(700);
    expect(keepingWords(tab.keeping, false).text).toBe('Not kept anywhere yet');
    expect(tab.keeper.wouldLose()).toBe(true);
    machine.works = true;
    await pass(2_100);
    expect(purposeOf(draft()?.document)).toBe('one');
    expect(tab.keeping.storage).toBe('works');
    expect(tab.keeper.wouldLose()).toBe(false);
  });
});

describe('two tabs of one browser', () => {
  it('the second looks on, asks, and goes on where the first stopped', async () => {
    const { server, machine, sheetId, tab: first } = await opened();
    const second = new FakeTab(server, machine, sheetId, { holdLease: true });
    second.keeper.start();
    second.lease?.waiting();
    expect(second.keeping.hand).toBe('elsewhere');
    second.type('not mine to change');
    await pass(1_000);
    expect(server.asked).toHaveLength(0);

    server.fate = 'lostOnTheWay';
    first.type('from the first');
    second.keeper.takeHand();
    expect(second.asksForHand).toBe(1);
    await Promise.all([first.lease?.wanted(), pass(100)]);
    first.lease?.lost();
    expect(first.keeping.hand).toBe('elsewhere');
    server.fate = 'arrives';
    second.lease?.granted(true);
    await pass(10);
    expect(second.document.purpose).toBe('from the first');
    expect(purposeOf(server.document)).toBe('from the first');
    first.type('not any more');
    await pass(5_000);
    expect(purposeOf(server.document)).toBe('from the first');
    expect(machine.drafts.size).toBe(0);
  });
});

describe('leaving the sheet for another page', () => {
  it('sends what is unsaved, then gives the sheet up', async () => {
    const { server, tab, draft } = await opened();
    tab.type('one');
    tab.keeper.stop();
    await pass(10);
    expect(purposeOf(server.document)).toBe('one');
    expect(draft()).toBeUndefined();
    expect(tab.leaseEnded).toBe(true);
  });

  it('with the server away: gives it up at once, with the draft on this machine', async () => {
    const { server, tab, draft } = await opened();
    server.fate = 'lostOnTheWay';
    tab.type('one');
    tab.keeper.stop();
    await pass(10);
    expect(tab.leaseEnded).toBe(true);
    expect(purposeOf(draft()?.document)).toBe('one');
    await pass(60_000);
    expect(server.asked).toHaveLength(1);
  });

  it('and back at once, as React’s strict mode does, changes nothing', async () => {
    const server = new FakeServer(withPurpose('as opened'));
    const tab = new FakeTab(server, new FakeMachine(), freshSheetId());
    tab.keeper.start();
    tab.keeper.stop();
    tab.keeper.start();
    await pass(10);
    expect(tab.keeping.hand).toBe('here');
    tab.type('one');
    await pass(700);
    expect(purposeOf(server.document)).toBe('one');
    expect(server.revision).toBe(2);
  });
});

describe('settle', () => {
  it('saves first, and answers the revision', async () => {
    const { tab } = await opened();
    tab.type('one');
    const settled = tab.keeper.settle();
    await pass(10);
    expect(await settled).toEqual({ ok: true, revision: 2 });
  });

  it('answers no when the save fails, and when there is a conflict', async () => {
    const { tab, server } = await opened();
    server.fate = 'noDatabase';
    tab.type('one');
    const failed = tab.keeper.settle();
    await pass(10);
    expect(await failed).toEqual({ ok: false });
    server.fate = 'arrives';
    server.othersSave(withPurpose('theirs'));
    const conflicted = tab.keeper.settle();
    await pass(10);
    expect(await conflicted).toEqual({ ok: false });
  });
});
