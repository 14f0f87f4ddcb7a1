import fc from 'fast-check';
import { afterEach, beforeEach, expect, it, vi } from 'vitest';
import { FakeMachine, FakeServer, FakeTab, freshSheetId, purposeOf, withPurpose, type Fate } from './fake-server';

beforeEach(() => {
  vi.useFakeTimers();
});

afterEach(() => {
  vi.useRealTimers();
});

type Move =
  | { readonly kind: 'type' }
  | { readonly kind: 'wait'; readonly ms: number }
  | { readonly kind: 'fate'; readonly fate: Fate }
  | { readonly kind: 'crash' }
  | { readonly kind: 'leave' }
  | { readonly kind: 'othersSave' }
  | { readonly kind: 'hurry' }
  | { readonly kind: 'look' };

const move: fc.Arbitrary<Move> = fc.oneof(
  { weight: 6, arbitrary: fc.constant({ kind: 'type' } as const) },
  { weight: 5, arbitrary: fc.record({ kind: fc.constant('wait' as const), ms: fc.constantFrom(1, 100, 700, 4_000, 31_000) }) },
  {
    weight: 4,
    arbitrary: fc.record({
      kind: fc.constant('fate' as const),
      fate: fc.constantFrom<Fate>('arrives', 'arrives', 'lostOnTheWay', 'answerLost', 'answerLost', 'noDatabase', 'signedOut', 'late'),
    }),
  },
  { weight: 2, arbitrary: fc.constantFrom<Move>({ kind: 'crash' }, { kind: 'leave' }) },
  { weight: 2, arbitrary: fc.constantFrom<Move>({ kind: 'hurry' }, { kind: 'look' }) },
);

const withOthers: fc.Arbitrary<Move> = fc.oneof(
  { weight: 9, arbitrary: move },
  { weight: 1, arbitrary: fc.constant({ kind: 'othersSave' } as const) },
);

async function play(moves: readonly Move[]) {
  const server = new FakeServer(withPurpose('as opened'));
  const machine = new FakeMachine();
  const sheetId = freshSheetId();
  const open = async () => {
    // A page cannot be loaded from a server that does not answer; it waits until it does.
    if (server.fate === 'lostOnTheWay' || server.fate === 'answerLost') server.fate = 'arrives';
    const tab = new FakeTab(server, machine, sheetId);
    tab.keeper.start();
    await vi.advanceTimersByTimeAsync(1);
    return tab;
  };
  let tab = await open();
  let typed = 0;
  for (const one of moves) {
    switch (one.kind) {
      case 'type':
        typed += 1;
        tab.type(`mine ${typed}`);
        // A crash loses at most what the storage had no time for; that bound has a test of its own.
        await vi.advanceTimersByTimeAsync(151);
        break;
      case 'wait':
        await vi.advanceTimersByTimeAsync(one.ms);
        break;
      case 'fate':
        server.release();
        server.fate = one.fate;
        break;
      case 'crash':
        tab.die();
        tab = await open();
        break;
      case 'leave':
        tab.keeper.stop();
        await vi.advanceTimersByTimeAsync(11_000);
        tab.die();
        tab = await open();
        break;
      case 'othersSave':
        server.othersSave(withPurpose(`theirs ${server.revision}`));
        break;
      case 'hurry':
        tab.keeper.hurry();
        break;
      case 'look':
        tab.keeper.seen(server.standing);
        break;
    }
  }
  server.fate = 'arrives';
  server.release();
  await vi.advanceTimersByTimeAsync(40_000);
  tab.keeper.seen(server.standing);
  return { server, machine, tab, typed };
}

it('alone on a sheet, whatever fails: the last that was typed is saved, with no question asked', async () => {
  await fc.assert(
    fc.asyncProperty(fc.array(move, { maxLength: 25 }), async (moves) => {
      const { server, machine, tab, typed } = await play(moves);
      expect(tab.keeping.conflict).toBeNull();
      expect(purposeOf(server.document)).toBe(typed === 0 ? 'as opened' : `mine ${typed}`);
      expect(tab.document.purpose).toBe(purposeOf(server.document));
      expect(machine.drafts.size).toBe(0);
    }),
    { numRuns: 400 },
  );
});

it('with others on the sheet: what was typed last was saved, or is on the sheet and kept while the person is asked', async () => {
  await fc.assert(
    fc.asyncProperty(fc.array(withOthers, { maxLength: 25 }), async (moves) => {
      const { server, machine, tab, typed } = await play(moves);
      if (tab.keeping.conflict !== null) {
        expect(tab.document.purpose).toBe(`mine ${typed}`);
        expect([...machine.drafts.values()].map(({ document }) => purposeOf(document))).toEqual([`mine ${typed}`]);
        expect(tab.keeping.conflict.document).toBe(server.document);
      } else {
        if (typed > 0) expect(server.stood.map(purposeOf)).toContain(`mine ${typed}`);
        expect(tab.document.purpose).toBe(purposeOf(server.document));
        expect(machine.drafts.size).toBe(0);
      }
    }),
    { numRuns: 400 },
  );
});
