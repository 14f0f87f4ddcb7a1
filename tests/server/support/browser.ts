/*
 * Stands in for the framework's request: the headers and the cookies of one browser at a time. A test file mocks
 * 'next/headers' with this module; everything underneath, the signed token and the database included, is real.
 */

let jar = new Map<string, string>();
let sent = new Headers();

export async function headers(): Promise<Headers> {
  return sent;
}

export async function cookies(): Promise<{
  get(name: string): { readonly name: string; readonly value: string } | undefined;
  set(name: string, value: string, options?: object): void;
}> {
  return {
    get: (name) => {
      const value = jar.get(name);
      return value === undefined ? undefined : { name, value };
    },
    set: (name, value) => void jar.set(name, value),
  };
}

export type Browser = { readonly cookies: Map<string, string>; readonly headers?: Readonly<Record<string, string>> };

/** Everything that follows is asked by this browser. */
export function as(browser: Browser): void {
  jar = browser.cookies;
  sent = new Headers(browser.headers ?? {});
}

export const nobody: Browser = { cookies: new Map() };
