import { render, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import type { Result } from '@/app/_shared/result';
import type { SheetRecord } from '@/app/_shared/wire';
import { ConflictDialog } from '@/app/sheets/[id]/_room/conflict/conflict-dialog';
import { RoomBanner } from '@/app/sheets/[id]/_room/room-banner';
import { RoomHead } from '@/app/sheets/[id]/_room/room-head';
import type { RoomRights } from '@/app/sheets/[id]/_room/rights';
import { emptySheetDocument, serializeSheetDocument } from '@/canvas/document/schema';
import { createSheetStore } from '@/canvas/store/sheet-store';
import { FakeMachine, FakeServer, FakeTab, freshSheetId, withPurpose } from './fake-server';

const renameSheet = vi.hoisted(() => vi.fn<(input: unknown) => Promise<Result<{ name: string }>>>());
vi.mock('@/app/sheets/actions', () => ({ renameSheet, cloneSheet: vi.fn(), restoreSheet: vi.fn() }));

const DESIGNER: RoomRights = {
  save: true,
  rename: true,
  clone: true,
  unarchive: true,
  takeSnapshot: true,
  restoreSnapshot: true,
  createNote: true,
  replyNote: true,
  resolveNote: false,
  reopenNote: false,
};
const VIEWER: RoomRights = { ...DESIGNER, save: false, rename: false, clone: false, takeSnapshot: false, createNote: false };

async function head(rights: RoomRights, mayWrite = true) {
  const server = new FakeServer(withPurpose('as opened'));
  const tab = new FakeTab(server, new FakeMachine(), freshSheetId(), { mayWrite });
  tab.keeper.start();
  const store = createSheetStore(tab.document, mayWrite);
  const record: SheetRecord = {
    id: 'sheet-id-0001',
    name: 'Anti-alias low-pass',
    archived: false,
    origin: { sheetId: 'origin', sheetName: 'The first one', snapshotName: null, revision: 4 },
    teamName: 'Saltmarsh Acoustics',
    ...server.standing,
  };
  const foresee = vi.fn();
  const following = { record, error: undefined, foresee, refresh: () => {} };
  render(
    <>
      <RoomHead store={store} keeper={tab.keeper} following={following} rights={rights} theme="day" onConflict={() => {}} onSnapshots={() => {}} />
      <RoomBanner keeper={tab.keeper} archived={false} followError={undefined} onConflict={() => {}} onSaveFile={() => {}} onSaveLeftover={() => {}} />
    </>,
  );
  await waitFor(() => expect(tab.keeping.hand).not.toBe('opening'));
  return { server, tab, store, foresee };
}

const state = () => document.querySelector('[data-keeping]')?.textContent ?? '';

beforeEach(() => {
  renameSheet.mockReset();
});

describe('the masthead of a room', () => {
  it('shows the state from typed to saved, and what keeps it from being saved', async () => {
    const { server, tab } = await head(DESIGNER);
    expect(state()).toContain('Saved · revision 1');
    tab.type('one');
    await waitFor(() => expect(state()).toContain('Saving…'));
    await waitFor(() => expect(state()).toContain('Saved · revision 2'), { timeout: 3_000 });
    server.fate = 'signedOut';
    tab.type('two');
    await waitFor(() => expect(state()).toContain('Kept on this machine only'), { timeout: 3_000 });
    expect(screen.getByText(/Sign in again in another tab/)).toBeTruthy();
    expect(screen.getByRole('button', { name: 'Save as a file' })).toBeTruthy();
    tab.keeper.stop();
  });

  it('holds no button that the role may not use', async () => {
    await head(VIEWER, false);
    expect(state()).toContain('Read only · revision 1');
    expect(screen.queryByRole('button', { name: 'Snapshot' })).toBeNull();
    expect(screen.queryByRole('button', { name: 'Clone' })).toBeNull();
    await userEvent.keyboard('{F2}');
    expect(screen.queryByLabelText('Name of the sheet')).toBeNull();
    await userEvent.click(screen.getByRole('button', { name: 'More' }));
    const items = (await screen.findAllByRole('menuitem')).map((item) => item.textContent);
    expect(items).toContain('Export file');
    expect(items.join()).not.toMatch(/Clone…|Take a snapshot/);
  });

  it('renames by F2; Escape leaves the name; a refusal puts it back', async () => {
    renameSheet.mockResolvedValueOnce({ ok: true, value: { name: 'Low-pass' } });
    const { foresee } = await head(DESIGNER);
    const user = userEvent.setup();
    await user.keyboard('{F2}');
    await user.keyboard('Something{Escape}');
    expect(renameSheet).not.toHaveBeenCalled();
    await user.keyboard('{F2}');
    await user.keyboard('Low-pass{Enter}');
    expect(renameSheet).toHaveBeenCalledWith({ id: 'sheet-id-0001', name: 'Low-pass' });
    expect(foresee).toHaveBeenLastCalledWith({ name: 'Low-pass' });
    renameSheet.mockRejectedValueOnce(new TypeError('Failed to fetch'));
    await user.keyboard('{F2}');
    await user.keyboard('Other{Enter}');
    await waitFor(() => expect(foresee).toHaveBeenLastCalledWith({ name: 'Anti-alias low-pass' }));
  });

  it('says where a clone came from', async () => {
    await head(DESIGNER);
    expect(screen.getByRole('link', { name: 'Cloned from The first one, revision 4' }).getAttribute('href')).toBe('/sheets/origin');
  });

  it('opens the panels that a command opens', async () => {
    const { store } = await head(DESIGNER);
    await userEvent.click(screen.getByRole('button', { name: 'Snapshot' }));
    expect(store.getState().panel).toBe('snapshot');
    await userEvent.click(screen.getByRole('button', { name: 'Clone' }));
    expect(store.getState().panel).toBe('clone');
  });
});

describe('the conflict', () => {
  const calls = { mine: vi.fn(), theirs: vi.fn(), both: vi.fn(), download: vi.fn(), close: vi.fn() };
  function show() {
    for (const call of Object.values(calls)) call.mockReset();
    calls.both.mockResolvedValue('The clone could not be made.');
    const theirs = serializeSheetDocument({ ...emptySheetDocument(), operatingFrequency: '2 kHz' });
    render(
      <ConflictDialog
        mine={emptySheetDocument()}
        theirs={{ revision: 42, document: theirs, changedAt: new Date().toISOString(), changedBy: 'Aiko Marsh' }}
        madeFrom={40}
        mayClone
        onKeepMine={calls.mine}
        onKeepTheirs={calls.theirs}
        onKeepBoth={calls.both}
        onDownload={calls.download}
        onClose={calls.close}
      />,
    );
  }

  it('shows who, which revisions, and what differs', () => {
    show();
    expect(screen.getByText(/Aiko Marsh saved revision 42/)).toBeTruthy();
    const row = screen.getByRole('row', { name: /Operating frequency/ });
    expect(row.textContent).toBe('Operating frequency1 kHz2 kHz');
    // An Enter out of the flow of typing must drop nobody's work.
    expect(document.activeElement?.textContent).toBe('Keep both, mine as a clone');
  });

  it('drops mine only after a second question, where it can still be saved as a file', async () => {
    show();
    await userEvent.click(screen.getByRole('button', { name: 'Keep theirs' }));
    expect(calls.theirs).not.toHaveBeenCalled();
    await userEvent.click(screen.getByRole('button', { name: 'Save mine as a file' }));
    expect(calls.download).toHaveBeenCalledOnce();
    await userEvent.click(screen.getByRole('button', { name: 'Drop mine' }));
    expect(calls.theirs).toHaveBeenCalledOnce();
  });

  it('keeps both, or says why not and stays open', async () => {
    show();
    await userEvent.click(screen.getByRole('button', { name: /Keep both/ }));
    expect((await screen.findByRole('alert')).textContent).toBe('The clone could not be made.');
    expect(calls.close).not.toHaveBeenCalled();
  });
});
