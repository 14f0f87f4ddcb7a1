import { act, renderHook } from '@testing-library/react';
import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import { useDebounced } from '@/app/sheets/(list)/use-debounced';

beforeEach(() => {
  vi.useFakeTimers();
});
afterEach(() => {
  vi.useRealTimers();
});

const pass = (milliseconds: number): void =>
  act(() => {
    vi.advanceTimersByTime(milliseconds);
  });

test('a value that goes on changing is given out once it has rested', () => {
  const { result, rerender } = renderHook(({ value }) => useDebounced(value, 180), { initialProps: { value: '' } });
  for (const value of ['m', 'ma', 'mat']) {
    rerender({ value });
    pass(179);
    expect(result.current).toBe('');
  }
  pass(1);
  expect(result.current).toBe('mat');
});

test('an emptied value does not wait', () => {
  const { result, rerender } = renderHook(({ value }) => useDebounced(value, 180), { initialProps: { value: 'mat' } });
  rerender({ value: '' });
  pass(0);
  expect(result.current).toBe('');
});
