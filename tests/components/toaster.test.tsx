import { act, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import { currentToasts, toast } from '@/components/toast';
import { Toaster } from '@/components/toaster';

beforeEach(() => {
  vi.useFakeTimers();
});
afterEach(() => {
  for (const one of currentToasts()) toast.dismiss(one.id);
  vi.useRealTimers();
});

const pass = (milliseconds: number): void =>
  act(() => {
    vi.advanceTimersByTime(milliseconds);
  });
const region = (): HTMLElement => screen.getByRole('region', { name: 'Messages' });

test('the region that is read aloud is there before its first words', () => {
  render(<Toaster />);
  expect(region().getAttribute('aria-live')).toBe('polite');
  act(() => void toast.done('Saved.'));
  expect(region().textContent).toContain('Saved.');
});

test('words go again by themselves, but not from under the hand', () => {
  render(<Toaster />);
  act(() => void toast.done('Saved.', { staysMs: 1_000 }));
  fireEvent.mouseEnter(region());
  pass(60_000);
  expect(screen.getByText('Saved.')).toBeTruthy();
  fireEvent.mouseLeave(region());
  pass(1_000);
  expect(screen.queryByText('Saved.')).toBeNull();
});

test('a way back stays longer than plain words, and is taken once', () => {
  const undo = vi.fn();
  render(<Toaster />);
  act(() => void toast.done('Archived.', { action: { label: 'Undo', onPress: undo } }));
  pass(10_000);
  fireEvent.click(screen.getByRole('button', { name: 'Undo' }));
  expect(undo).toHaveBeenCalledOnce();
  expect(screen.queryByRole('button', { name: 'Undo' })).toBeNull();
});

test('no pile grows: the oldest goes', () => {
  render(<Toaster />);
  act(() => {
    for (const text of ['one', 'two', 'three', 'four', 'five']) toast.plain(text);
  });
  expect(currentToasts().map(({ text }) => text)).toEqual(['two', 'three', 'four', 'five']);
});
