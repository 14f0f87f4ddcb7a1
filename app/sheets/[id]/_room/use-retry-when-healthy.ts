'use client';

import { useEffect, useRef } from 'react';

const ASK_MS = 3_000;

/**
 * Calls `retry` once the server says that it and its database answer again.
 * @param wanted false where trying again would only fail again, such as after a fault of the page itself
 */
export function useRetryWhenHealthy(wanted: boolean, retry: () => void): void {
  const act = useRef(retry);
  useEffect(() => {
    act.current = retry;
  }, [retry]);

  useEffect(() => {
    if (!wanted) return;
    const ended = new AbortController();
    const timer = setInterval(() => {
      if (document.visibilityState === 'hidden') return;
      fetch('/api/health', { signal: ended.signal })
        .then((response) => {
          if (response.ok) act.current();
        })
        // Not reached: asked again in a moment.
        .catch(() => undefined);
    }, ASK_MS);
    return () => {
      clearInterval(timer);
      ended.abort();
    };
  }, [wanted]);
}
