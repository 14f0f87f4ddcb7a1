import { render, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, expect, test, vi } from 'vitest';
import { signUp } from '@/app/(auth)/actions';
import { SignUpForm } from '@/app/(auth)/sign-up/sign-up-form';
import { loadPage } from '@/app/_client/load-page';
import { signInWithPassword } from '@/app/_client/session';

vi.mock('@/app/(auth)/actions', () => ({ signUp: vi.fn() }));
vi.mock('@/app/_client/load-page', () => ({ loadPage: vi.fn() }));
vi.mock('@/app/_client/session', () => ({ signInWithPassword: vi.fn() }));

afterEach(() => {
  vi.resetAllMocks();
});

const field = (name: string): HTMLElement => screen.getByLabelText(name);

async function fillIn(user: ReturnType<typeof userEvent.setup>, password = 'saltings at ebb'): Promise<void> {
  await user.type(field('Your name'), 'Nora Quill');
  await user.type(field('Team'), 'Quill Instruments');
  await user.type(field('E-mail'), 'nora@quill.example');
  await user.type(field('Password'), password);
  await user.click(screen.getByRole('button', { name: 'Make the account' }));
}

test('makes the account, signs in with the same words, and goes on', async () => {
  vi.mocked(signUp).mockResolvedValue({ ok: true, value: { email: 'nora@quill.example' } });
  vi.mocked(signInWithPassword).mockResolvedValue({ ok: true });
  render(<SignUpForm next="/sheets" />);
  await fillIn(userEvent.setup());
  await waitFor(() => expect(loadPage).toHaveBeenCalledExactlyOnceWith('/sheets'));
  expect(signUp).toHaveBeenCalledExactlyOnceWith({
    name: 'Nora Quill',
    team: 'Quill Instruments',
    email: 'nora@quill.example',
    password: 'saltings at ebb',
  });
  expect(signInWithPassword).toHaveBeenCalledExactlyOnceWith('nora@quill.example', 'saltings at ebb');
});

test('a short password is refused before anything is sent', async () => {
  render(<SignUpForm next="/sheets" />);
  await fillIn(userEvent.setup(), 'short');
  expect(await screen.findByText('A password has at least 10 characters.')).toBeTruthy();
  expect(signUp).not.toHaveBeenCalled();
});

test('what the server says of a field stands at the field, and has the focus', async () => {
  const message = 'There is an account with this address already. Sign in instead.';
  vi.mocked(signUp).mockResolvedValue({ ok: false, error: { code: 'invalid', message, fields: { email: message } } });
  render(<SignUpForm next="/sheets" />);
  await fillIn(userEvent.setup());
  expect(await screen.findByText(message)).toBeTruthy();
  expect(field('E-mail').getAttribute('aria-invalid')).toBe('true');
  await waitFor(() => expect(document.activeElement).toBe(field('E-mail')));
  expect(loadPage).not.toHaveBeenCalled();
});

test('any other refusal stands below the form, with its reference', async () => {
  vi.mocked(signUp).mockResolvedValue({
    ok: false,
    error: { code: 'unexpected', message: 'Something went wrong.', reference: 'K7Q2' },
  });
  render(<SignUpForm next="/sheets" />);
  await fillIn(userEvent.setup());
  expect((await screen.findByText('Something went wrong. Reference K7Q2.')).getAttribute('role')).toBe('alert');
});

test('an account that was made but not signed in to leads to the sign-in page', async () => {
  vi.mocked(signUp).mockResolvedValue({ ok: true, value: { email: 'nora@quill.example' } });
  vi.mocked(signInWithPassword).mockResolvedValue({ ok: false, message: 'No.' });
  render(<SignUpForm next="/sheets/x?y=1" />);
  await fillIn(userEvent.setup());
  await waitFor(() => expect(loadPage).toHaveBeenCalledExactlyOnceWith('/sign-in?next=%2Fsheets%2Fx%3Fy%3D1'));
});
