import { NextResponse, type NextRequest } from 'next/server';
import { getToken } from 'next-auth/jwt';

/** Pages that need no session. Handlers and actions are not judged here: each answers for itself. */
const OPEN = new Set(['/', '/sign-in', '/sign-up', '/icon.svg']);

/**
 * Before every page: a content security policy with a nonce of its own, and the way to the sign-in page for a browser
 * that has no session at all. Whether a session still counts is asked of the database, by the page, the action or the
 * handler; nothing relies on what is decided here.
 */
export async function proxy(request: NextRequest): Promise<NextResponse> {
  const { pathname, search } = request.nextUrl;
  const nonce = Buffer.from(crypto.getRandomValues(new Uint8Array(16))).toString('base64');
  const policy = contentSecurityPolicy(nonce);

  // A server action is a POST to its page's address, and says in words that the session is over; redirected, it would
  // come back to the page as no answer at all.
  const reads = request.method === 'GET' || request.method === 'HEAD';
  const isPage = reads && !OPEN.has(pathname) && !pathname.startsWith('/api/');
  if (isPage && !(await getToken({ req: request }))) {
    const signIn = request.nextUrl.clone();
    signIn.pathname = '/sign-in';
    signIn.search = '';
    signIn.searchParams.set('next', pathname + search);
    return withPolicy(NextResponse.redirect(signIn), policy);
  }

  // The framework reads the nonce from the request's policy; a page that redirects needs to know where it stands.
  const headers = new Headers(request.headers);
  headers.set('Content-Security-Policy', policy);
  headers.set('x-nonce', nonce);
  headers.set('x-ohmstead-path', pathname + search);
  return withPolicy(NextResponse.next({ request: { headers } }), policy);
}

function withPolicy(response: NextResponse, policy: string): NextResponse {
  response.headers.set('Content-Security-Policy', policy);
  return response;
}

function contentSecurityPolicy(nonce: string): string {
  // Development compiles in the browser and sets styles as text; neither is ever let into a build.
  const development = process.env.NODE_ENV === 'development';
  return [
    `default-src 'self'`,
    // The solver's kernels are a WebAssembly module, made in the page; that lets no text be run as script.
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic' 'wasm-unsafe-eval'${development ? " 'unsafe-eval'" : ''}`,
    development ? `style-src 'self' 'unsafe-inline'` : `style-src 'self' 'nonce-${nonce}'`,
    `style-src-attr 'unsafe-inline'`,
    `img-src 'self' blob: data:`,
    `font-src 'self'`,
    `connect-src 'self'`,
    `worker-src 'self' blob:`,
    `object-src 'none'`,
    `base-uri 'self'`,
    `form-action 'self'`,
    `frame-ancestors 'none'`,
  ].join('; ');
}

/** Everything but the build's own files. No exception for prefetches: the header that marks one is the client's to set. */
export const config = { matcher: ['/((?!_next/static|_next/image|favicon.ico|icon.svg).*)'] };
