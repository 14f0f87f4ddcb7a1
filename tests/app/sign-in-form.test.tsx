import { render, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { SignInForm } from '@/app/(auth)/sign-in/sign-in-form';
import { loadPage } from '@/app/_client/load-page';

vi.mock('@/app/_client/load-page', () => ({ loadPage: vi.fn() }));

type Sent = { readonly path: string; readonly body: URLSearchParams | null };
let sent: Sent[];
let answer: () => Promise<Response>;

beforeEach(() => {
  sent = [];
  answer = async () => Response.json({ url: 'http://localhost/' });
  vi.stubGlobal('fetch', async (path: string, init?: RequestInit) => {
    sent.push({ path, body: init?.body instanceof URLSearchParams ? init.body : null });
    return path === '/api/auth/csrf' ? Response.json({ csrfToken: 'token-of-the-form' }) : answer();
  });
});
afterEach(() => {
  vi.unstubAllGlobals();
  vi.resetAllMocks();
});

const email = (): HTMLElement => screen.getByRole('textbox', { name: 'E-mail' });
const password = (): HTMLInputElement => screen.getByLabelText<HTMLInputElement>('Password');

async function fillIn(user: ReturnType<typeof userEvent.setup>): Promise<void> {
  await user.type(email(), '  Ines@Saltmarsh.example ');
  await user.type(password(), 'brine and reed{Enter}');
}

describe('signing in', () => {
  test('sends the address as the server keeps it, with the form’s token, and goes where one wanted to go', async () => {
    const user = userEvent.setup();
    render(<SignInForm next="/sheets/abc" />);
    await fillIn(user);
    await waitFor(() => expect(loadPage).toHaveBeenCalledExactlyOnceWith('/sheets/abc'));
    const post = sent.find(({ path }) => path === '/api/auth/callback/credentials');
    expect(Object.fromEntries(post?.body ?? [])).toMatchObject({
      csrfToken: 'token-of-the-form',
      email: 'ines@saltmarsh.example',
      password: 'brine and reed',
      json: 'true',
    });
  });

  test('without an address or a password nothing is sent, and each field says what it wants', async () => {
    const user = userEvent.setup();
    render(<SignInForm next="/sheets" />);
    await user.click(screen.getByRole('button', { name: 'Sign in' }));
    expect(await screen.findByText('That is not an e-mail address.')).toBeTruthy();
    expect(screen.getByText('Type your password.')).toBeTruthy();
    expect(email().getAttribute('aria-invalid')).toBe('true');
    expect(document.activeElement).toBe(email());
    expect(sent).toEqual([]);
  });

  test('a wrong password is said in one sentence for both, and the password is ready to be typed again', async () => {
    answer = async () =>
      Response.json({ url: 'http://localhost/sign-in?error=CredentialsSignin' }, { status: 401 });
    const user = userEvent.setup();
    render(<SignInForm next="/sheets" />);
    await fillIn(user);
    expect((await screen.findByText(/The address or the password is not right/)).getAttribute('role')).toBe('alert');
    await waitFor(() => expect(document.activeElement).toBe(password()));
    expect(loadPage).not.toHaveBeenCalled();
  });

  test('a lock says when to come back', async () => {
    const again = new Date(Date.now() + 5 * 60_000 - 2_000).toISOString();
    answer = async () =>
      Response.json({ url: `http://localhost/sign-in?error=${encodeURIComponent(`tooMany:${again}`)}` }, { status: 401 });
    const user = userEvent.setup();
    render(<SignInForm next="/sheets" />);
    await fillIn(user);
    expect(await screen.findByText('That was tried too often. Try again in 5 minutes.')).toBeTruthy();
  });

  test('a lost network is a sentence, and what was typed stays', async () => {
    answer = () => Promise.reject(new TypeError('Failed to fetch'));
    const user = userEvent.setup();
    render(<SignInForm next="/sheets" />);
    await fillIn(user);
    expect(await screen.findByText(/The server does not answer/)).toBeTruthy();
    expect(password().value).toBe('brine and reed');
  });

  test('the password can be shown and hidden, and the fields are named for a password manager', async () => {
    const user = userEvent.setup();
    render(<SignInForm next="/sheets" />);
    expect(email().getAttribute('autocomplete')).toBe('username');
    expect(password().getAttribute('autocomplete')).toBe('current-password');
    await user.click(screen.getByRole('button', { name: 'Show the password' }));
    expect(password().type).toBe('text');
    await user.click(screen.getByRole('button', { name: 'Hide the password' }));
    expect(password().type).toBe('password');
  });
});
