import { render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { SWRConfig } from 'swr';
import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import { loadPage } from '@/app/_client/load-page';
import type { MemberItem } from '@/app/_shared/wire';
import { changeRole, removeMember } from '@/app/team/actions';
import { TeamView } from '@/app/team/team-view';
import { currentToasts, toast } from '@/components/toast';
import { Toaster } from '@/components/toaster';

const router = { refresh: vi.fn() };
vi.mock('next/navigation', () => ({ useRouter: () => router }));
vi.mock('@/app/team/actions', () => ({ changeRole: vi.fn(), removeMember: vi.fn() }));
vi.mock('@/app/_client/load-page', () => ({ loadPage: vi.fn() }));

const INES: MemberItem = {
  id: 'member000001',
  name: 'Ines Harrow',
  email: 'ines@saltmarsh.example',
  role: 'owner',
  self: true,
  joinedAt: '2025-11-01T10:00:00.000Z',
};
const BELA: MemberItem = { ...INES, id: 'member000002', name: 'Bela Fenn', email: 'b@s.example', role: 'viewer', self: false };

let onServer: MemberItem[];

beforeEach(() => {
  onServer = [INES, BELA];
  vi.stubGlobal('fetch', async () => Response.json({ ok: true, value: onServer }));
});
afterEach(() => {
  for (const one of currentToasts()) toast.dismiss(one.id);
  vi.unstubAllGlobals();
  vi.resetAllMocks();
});

function show(may = { changeRole: true, removeMember: true }) {
  const user = userEvent.setup();
  render(
    <SWRConfig value={{ provider: () => new Map(), dedupingInterval: 0 }}>
      <TeamView first={onServer} may={may} />
      <Toaster />
    </SWRConfig>,
  );
  return user;
}

const roleOf = (name: string): HTMLSelectElement => screen.getByRole<HTMLSelectElement>('combobox', { name: `Role of ${name}` });

test('a role shows at once, and is put back with the reason when it is refused', async () => {
  let answer: (result: Awaited<ReturnType<typeof changeRole>>) => void = () => {};
  vi.mocked(changeRole).mockImplementation(() => new Promise((resolve) => (answer = resolve)));
  const user = show();
  await user.selectOptions(roleOf('Ines Harrow'), 'Designer');
  await waitFor(() => expect(roleOf('Ines Harrow').value).toBe('designer'));
  answer({ ok: false, error: { code: 'conflict', message: 'A team keeps at least one owner.' } });
  expect(await screen.findByText('A team keeps at least one owner.')).toBeTruthy();
  await waitFor(() => expect(roleOf('Ines Harrow').value).toBe('owner'));
  expect(router.refresh).not.toHaveBeenCalled();
});

test('removing asks first, starts on the harmless button, and can be left', async () => {
  const user = show();
  await user.click(screen.getByRole('button', { name: 'Remove Bela Fenn from the team' }));
  const question = screen.getByRole('alertdialog', { name: 'Remove Bela Fenn from the team?' });
  expect(document.activeElement).toBe(within(question).getByRole('button', { name: 'Cancel' }));
  await user.click(within(question).getByRole('button', { name: 'Cancel' }));
  expect(screen.queryByRole('alertdialog')).toBeNull();
  expect(removeMember).not.toHaveBeenCalled();
});

test('a removed member is gone from the list', async () => {
  vi.mocked(removeMember).mockImplementation(async () => {
    onServer = [INES];
    return { ok: true, value: { removed: true } };
  });
  const user = show();
  await user.click(screen.getByRole('button', { name: 'Remove Bela Fenn from the team' }));
  await user.click(screen.getByRole('button', { name: 'Remove' }));
  await waitFor(() => expect(screen.queryByText('Bela Fenn')).toBeNull());
  expect(removeMember).toHaveBeenCalledExactlyOnceWith({ memberId: BELA.id });
});

test('who leaves is shown out', async () => {
  vi.mocked(removeMember).mockResolvedValue({ ok: true, value: { removed: true } });
  const user = show();
  await user.click(screen.getByRole('button', { name: 'Leave the team' }));
  await user.click(screen.getByRole('button', { name: 'Leave' }));
  await waitFor(() => expect(loadPage).toHaveBeenCalledExactlyOnceWith('/'));
});

test('who may not change the team sees the roles as words, and no means to change them', () => {
  show({ changeRole: false, removeMember: false });
  expect(screen.queryByRole('combobox')).toBeNull();
  expect(screen.queryByRole('button')).toBeNull();
  expect(screen.getByText('Viewer')).toBeTruthy();
});
