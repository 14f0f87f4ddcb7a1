import { act, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { IconButton } from '@/components/icon-button';
import { besideOf } from '@/components/tooltip-place';

describe('a tooltip', () => {
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
  const show = (): HTMLElement => {
    render(<IconButton label="Rotate" shortcut="R" icon={<svg />} />);
    return screen.getByRole('button', { name: 'Rotate' });
  };

  test('comes to a mouse that rests, not to one that passes, and not to a finger', () => {
    const button = show();
    fireEvent.pointerEnter(button, { pointerType: 'mouse' });
    pass(300);
    fireEvent.pointerLeave(button, { pointerType: 'mouse' });
    pass(2_000);
    expect(screen.queryByRole('tooltip')).toBeNull();
    fireEvent.pointerEnter(button, { pointerType: 'touch' });
    pass(2_000);
    expect(screen.queryByRole('tooltip')).toBeNull();
    fireEvent.pointerEnter(button, { pointerType: 'mouse' });
    pass(450);
    expect(screen.getByRole('tooltip').textContent).toBe('RotateR');
  });

  test('stays while the pointer is on it, and goes by Escape', () => {
    const button = show();
    fireEvent.pointerEnter(button, { pointerType: 'mouse' });
    pass(450);
    fireEvent.pointerLeave(button, { pointerType: 'mouse' });
    fireEvent.pointerEnter(screen.getByRole('tooltip'), { pointerType: 'mouse' });
    pass(5_000);
    expect(screen.getByRole('tooltip')).toBeTruthy();
    fireEvent.keyDown(window, { key: 'Escape' });
    expect(screen.queryByRole('tooltip')).toBeNull();
  });

  test('goes when the button is pressed', () => {
    const button = show();
    fireEvent.pointerEnter(button, { pointerType: 'mouse' });
    pass(450);
    fireEvent.pointerDown(button);
    pass(2_000);
    expect(screen.queryByRole('tooltip')).toBeNull();
  });
});

describe('its place', () => {
  const view = { width: 400, height: 300 };
  const size = { width: 100, height: 30 };

  test('is the middle of the wished side', () => {
    expect(besideOf({ left: 180, top: 100, width: 40, height: 40 }, size, 'bottom', view)).toEqual({ x: 150, y: 146 });
    expect(besideOf({ left: 180, top: 100, width: 40, height: 40 }, size, 'right', view)).toEqual({ x: 226, y: 105 });
  });

  test('is the other side where there is no room', () => {
    expect(besideOf({ left: 180, top: 250, width: 40, height: 40 }, size, 'bottom', view).y).toBe(214);
    expect(besideOf({ left: 20, top: 100, width: 40, height: 40 }, size, 'left', view).x).toBe(66);
  });

  test('never leaves the view', () => {
    expect(besideOf({ left: 0, top: 100, width: 20, height: 20 }, size, 'bottom', view).x).toBe(8);
    expect(besideOf({ left: 380, top: 100, width: 20, height: 20 }, size, 'top', view).x).toBe(292);
  });
});
