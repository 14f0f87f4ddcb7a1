import type { BrowserContext } from '@playwright/test';

/** What a browser did that it should never do: errors in its console, exceptions, requests to another host. */
export type Watch = {
  readonly troubles: readonly string[];
  /** Watches every page of a browser, those opened later too. */
  over(context: BrowserContext): void;
  /** Takes out of the count what a story brings about on purpose, such as the 401 of a wrong password. */
  allow(pattern: RegExp): void;
};

/** What belongs to no host. */
const LOCAL_SCHEMES = ['data:', 'blob:', 'about:'];

export function createWatch(baseUrl: string): Watch {
  const house = new URL(baseUrl).host;
  const seen: string[] = [];
  const allowed: RegExp[] = [];
  return {
    get troubles() {
      return seen.filter((trouble) => !allowed.some((pattern) => pattern.test(trouble)));
    },
    over(context) {
      // A breach of the content security policy is an error of the console too.
      context.on('console', (message) => {
        if (message.type() !== 'error') return;
        seen.push(`console: ${message.text()} (${message.location().url})`);
      });
      context.on('weberror', (error) => {
        seen.push(`exception: ${error.error().stack ?? error.error().message}`);
      });
      context.on('request', (request) => {
        const url = new URL(request.url());
        if (!LOCAL_SCHEMES.includes(url.protocol) && url.host !== house) seen.push(`request to another host: ${request.url()}`);
      });
    },
    allow(pattern) {
      allowed.push(pattern);
    },
  };
}
