'use client';

import { useEffect, useState } from 'react';

/** The value as it stood when it last kept still for `pauseMs`. An empty text needs no waiting: nobody types it. */
export function useDebounced(value: string, pauseMs: number): string {
  const [settled, setSettled] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setSettled(value), value === '' ? 0 : pauseMs);
    return () => clearTimeout(timer);
  }, [value, pauseMs]);
  return settled;
}
