import { act, cleanup, render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { SWRConfig } from 'swr';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import type { AppError, Result } from '@/app/_shared/result';
import type { NoteThread } from '@/app/_shared/wire';
import { NotesSection } from '@/app/sheets/[id]/_room/notes/notes-section';
import { useNotes } from '@/app/sheets/[id]/_room/notes/use-notes';
import type { RoomRights } from '@/app/sheets/[id]/_room/rights';
import type { NoteAnchor } from '@/canvas/document/notes';
import { emptySheetDocument } from '@/canvas/document/schema';
import { createSheetStore } from '@/canvas/store/sheet-store';

type Answer = Result<NoteThread>;

const actions = vi.hoisted(() => ({
  createNote: vi.fn<(input: unknown) => Promise<Answer>>(),
  replyNote: vi.fn<(input: unknown) => Promise<Answer>>(),
  resolveNote: vi.fn<(input: unknown) => Promise<Answer>>(),
  reopenNote: vi.fn<(input: unknown) => Promise<Answer>>(),
}));
vi.mock('@/app/sheets/[id]/actions', () => actions);

const PLACE: NoteAnchor = { kind: 'place', at: { x: 0, y: 0 } };
const REVIEWER: RoomRights = {
  save: false,
  rename: false,
  clone: false,
  unarchive: false,
  takeSnapshot: false,
  restoreSnapshot: false,
  createNote: true,
  replyNote: true,
  resolveNote: true,
  reopenNote: true,
};

function thread(over: Partial<NoteThread> = {}): NoteThread {
  return {
    id: 'note-1',
    number: 1,
    anchor: PLACE,
    class: 'major',
    text: 'Put the converter in.',
    author: 'Ruth Calder',
    writtenAt: '2026-12-01T10:00:00.000Z',
    resolved: null,
    replies: [],
    ...over,
  };
}

/** What the server has; the handler answers it. */
let standing: NoteThread[] = [];
const store = createSheetStore(emptySheetDocument(), false);

function Section({ rights, composing }: { readonly rights: RoomRights; readonly composing: NoteAnchor | null }) {
  const notes = useNotes('sheet', 'Ruth Calder');
  return (
    <NotesSection
      store={store}
      notes={notes}
      rights={rights}
      composing={composing}
      onComposed={() => {}}
      openNote={null}
      onOpenNote={() => {}}
      keptAs="ruth/sheet"
    />
  );
}

function show(rights: RoomRights = REVIEWER, composing: NoteAnchor | null = null) {
  render(
    <SWRConfig value={{ provider: () => new Map(), dedupingInterval: 0 }}>
      <Section rights={rights} composing={composing} />
    </SWRConfig>,
  );
}

/** An answer that comes when it is told to. */
function awaited() {
  let answer: (result: Answer) => void = () => {};
  const promise = new Promise<Answer>((resolve) => {
    answer = resolve;
  });
  return { promise, answer };
}

const REFUSED: AppError = { code: 'unavailable', message: 'The server cannot reach its database.' };

beforeEach(() => {
  localStorage.clear();
  standing = [thread()];
  for (const one of Object.values(actions)) one.mockReset();
  vi.stubGlobal('fetch', async () => Response.json({ ok: true, value: standing }));
  Element.prototype.scrollIntoView = () => {};
});

describe('the notes in the Ledger', () => {
  it('show text as text, and no button that the role may not use', async () => {
    standing = [thread({ text: '<img src=x onerror=alert(1)>\nsecond line', replies: [{ id: 'r', author: 'Tomas', text: '<b>so</b>', writtenAt: '2026-12-01T10:00:00.000Z' }] })];
    show({ ...REVIEWER, createNote: false, replyNote: false, resolveNote: false, reopenNote: false });
    expect(await screen.findByText(/<img src=x onerror=alert\(1\)>/)).toBeTruthy();
    expect(screen.getByText('<b>so</b>')).toBeTruthy();
    expect(document.querySelector('img, b')).toBeNull();
    for (const name of ['Reply', 'Resolve', 'Reopen', 'Pin a note']) expect(screen.queryByRole('button', { name })).toBeNull();
  });

  it('reach an open browser within three seconds of being written elsewhere', async () => {
    show();
    await screen.findByText('Put the converter in.');
    standing = [...standing, thread({ id: 'note-2', number: 2, text: 'From elsewhere.' })];
    await screen.findByText('From elsewhere.', undefined, { timeout: 3_000 });
  });

  it('a reply shows at once, and stays when the server has taken it', async () => {
    const { promise, answer } = awaited();
    actions.replyNote.mockReturnValue(promise);
    show();
    const user = userEvent.setup();
    await user.click(await screen.findByRole('button', { name: 'Reply' }));
    await user.type(screen.getByRole('textbox', { name: 'Reply to note 1' }), 'It is in now.');
    await user.click(screen.getByRole('button', { name: 'Reply' }));
    const replies = await screen.findByRole('list', { name: 'Replies to note 1' });
    expect(within(replies).getByText('It is in now.')).toBeTruthy();
    expect(within(replies).getByText(/sending/)).toBeTruthy();
    standing = [thread({ replies: [{ id: 'r', author: 'Ruth Calder', text: 'It is in now.', writtenAt: new Date().toISOString() }] })];
    await act(async () => answer({ ok: true, value: standing[0] ?? thread() }));
    await waitFor(() => expect(within(replies).queryByText(/sending/)).toBeNull());
    expect(screen.queryByRole('textbox', { name: 'Reply to note 1' })).toBeNull();
    expect(localStorage.length).toBe(0);
  });

  it('a reply that the server refuses is taken back from the thread, and is still in its box, with the reason', async () => {
    actions.replyNote.mockResolvedValue({ ok: false, error: REFUSED });
    show();
    const user = userEvent.setup();
    await user.click(await screen.findByRole('button', { name: 'Reply' }));
    await user.type(screen.getByRole('textbox', { name: 'Reply to note 1' }), 'Not lost.');
    await user.click(screen.getByRole('button', { name: 'Reply' }));
    expect(await screen.findByText(/cannot reach its database/)).toBeTruthy();
    expect(screen.getByRole<HTMLTextAreaElement>('textbox', { name: 'Reply to note 1' }).value).toBe('Not lost.');
    expect(screen.queryByRole('list', { name: 'Replies to note 1' })).toBeNull();
  });

  it('a new note that never gets an answer is kept on this machine, and is there when the composer opens next', async () => {
    actions.createNote.mockRejectedValue(new TypeError('Failed to fetch'));
    show(REVIEWER, PLACE);
    const user = userEvent.setup();
    await user.type(await screen.findByLabelText('Note'), 'Half written');
    await user.click(screen.getByRole('button', { name: 'Pin note' }));
    expect(await screen.findByText(/server does not answer/)).toBeTruthy();
    cleanup();
    show(REVIEWER, PLACE);
    expect((await screen.findByLabelText<HTMLTextAreaElement>('Note')).value).toBe('Half written');
  });

  it('is sent with its class and its anchor', async () => {
    actions.createNote.mockResolvedValue({ ok: true, value: thread({ id: 'note-2', number: 2 }) });
    show(REVIEWER, PLACE);
    const user = userEvent.setup();
    await user.selectOptions(await screen.findByLabelText('Class'), 'query');
    await user.type(screen.getByLabelText('Note'), 'Why 82 nF?');
    await user.keyboard('{Control>}{Enter}{/Control}');
    await waitFor(() =>
      expect(actions.createNote).toHaveBeenCalledWith({ sheetId: 'sheet', anchor: PLACE, class: 'query', text: 'Why 82 nF?' }),
    );
  });

  it('a resolved note leaves the open ones and is found under all; reopening brings it back', async () => {
    const resolved = thread({ resolved: { by: 'Ruth Calder', at: '2026-12-01T11:00:00.000Z' } });
    actions.resolveNote.mockImplementation(async () => {
      standing = [resolved];
      return { ok: true, value: resolved };
    });
    actions.reopenNote.mockImplementation(async () => {
      standing = [thread()];
      return { ok: true, value: thread() };
    });
    show();
    const user = userEvent.setup();
    await user.click(await screen.findByRole('button', { name: 'Resolve' }));
    expect(await screen.findByText(/Every note is resolved/)).toBeTruthy();
    await user.click(screen.getByRole('radio', { name: 'All' }));
    expect(await screen.findByText(/Resolved by Ruth Calder/)).toBeTruthy();
    await user.click(screen.getByRole('button', { name: 'Reopen' }));
    expect(await screen.findByRole('button', { name: 'Resolve' })).toBeTruthy();
  });

  it('says so when the part that a note was pinned to is gone', async () => {
    standing = [thread({ anchor: { kind: 'part', part: 'gone', at: { x: 0, y: 0 } } })];
    show();
    expect(await screen.findByText(/no longer on the sheet/)).toBeTruthy();
  });
});
