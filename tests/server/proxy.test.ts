import './support/configuration';
import { NextRequest } from 'next/server';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { encodeSession, sessionCookieName } from '@/app/_server/session';
import { config, proxy } from '@/proxy';

vi.mock('next/headers', () => import('./support/browser'));
afterEach(() => vi.unstubAllEnvs());

async function ask(path: string, headers: Readonly<Record<string, string>> = {}): Promise<Response> {
  return proxy(new NextRequest(`http://localhost:3000${path}`, { headers }));
}

async function session(): Promise<Readonly<Record<string, string>>> {
  return { cookie: `${sessionCookieName()}=${await encodeSession({ userId: 'u'.repeat(20), version: 1 })}` };
}

const policyOf = (response: Response): string => response.headers.get('content-security-policy') ?? '';

describe('before every page', () => {
  it.each(['/', '/sign-in', '/sign-up', '/api/health', '/api/sheets', '/api/auth/session'])('%s is open', async (path) => {
    const response = await ask(path);
    expect(response.headers.get('x-middleware-next')).toBe('1');
    expect(policyOf(response)).toContain("default-src 'self'");
  });

  it.each(['/sheets', '/sheets/abc?x=1', '/team', '/account', '/apix', '/sign-in/x', '/nothing'])(
    '%s leads to the sign-in page without a session, however it is asked for, and back',
    async (path) => {
      const plain: Readonly<Record<string, string>>[] = [{}, { 'next-router-prefetch': '1' }, { purpose: 'prefetch' }, { rsc: '1' }];
      for (const headers of plain) {
        const response = await ask(path, headers);
        expect(response.status).toBe(307);
        const to = new URL(response.headers.get('location') ?? '');
        expect(to.pathname).toBe('/sign-in');
        expect(to.searchParams.get('next')).toBe(path);
        expect(policyOf(response)).toContain("default-src 'self'");
      }
    },
  );

  it('does not lead a server action away: it says itself that the session is over, and a redirect would say nothing', async () => {
    const action = new NextRequest('http://localhost:3000/sheets/abc', { method: 'POST', headers: { 'next-action': 'x' } });
    const response = await proxy(action);
    expect(response.headers.get('x-middleware-next')).toBe('1');
    expect(policyOf(response)).toContain("default-src 'self'");
  });

  it('lets a session through, and not one that is forged', async () => {
    expect((await ask('/sheets', await session())).status).toBe(200);
    expect((await ask('/sheets', { cookie: `${sessionCookieName()}=a.b.c.d.e` })).status).toBe(307);
  });

  it('makes a policy with a new nonce each time, and hands it on in the request', async () => {
    const [one, other] = [await ask('/'), await ask('/')];
    const nonce = /script-src 'self' 'nonce-([A-Za-z0-9+/]{22}==)' 'strict-dynamic' 'wasm-unsafe-eval';/.exec(policyOf(one))?.[1];
    expect(nonce).toBeDefined();
    expect(policyOf(other)).not.toContain(nonce);
    expect(policyOf(one)).toContain(`style-src 'self' 'nonce-${nonce}'`);
    expect(one.headers.get('x-middleware-request-x-nonce')).toBe(nonce);
    expect(one.headers.get('x-middleware-request-content-security-policy')).toBe(policyOf(one));
  });

  it('does not take a nonce or a path from the client', async () => {
    const response = await ask('/?a=1', { 'x-nonce': 'mine', 'x-ohmstead-path': '//evil.example' });
    expect(response.headers.get('x-middleware-request-x-nonce')).not.toBe('mine');
    expect(response.headers.get('x-middleware-request-x-ohmstead-path')).toBe('/?a=1');
  });

  it('allows what development needs in development only', async () => {
    vi.stubEnv('NODE_ENV', 'production');
    expect(policyOf(await ask('/'))).not.toMatch(/'unsafe-eval'|style-src [^;]*unsafe-inline/);
    vi.stubEnv('NODE_ENV', 'development');
    expect(policyOf(await ask('/'))).toMatch(/script-src [^;]*'unsafe-eval'.*style-src 'self' 'unsafe-inline'/);
  });

  it('is passed by the build’s own files alone', () => {
    const pattern = new RegExp(`^${config.matcher[0]}$`);
    for (const path of ['/', '/sheets', '/api/health', '/_next', '/x/_next/static/y']) expect(pattern.test(path)).toBe(true);
    for (const path of ['/_next/static/chunks/a.js', '/icon.svg']) expect(pattern.test(path)).toBe(false);
  });
});
