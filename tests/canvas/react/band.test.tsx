import { act, fireEvent, screen } from '@testing-library/react';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { Band } from '@/canvas/react/band/band';
import { dividerSheet } from '../../support/sample-sheets';
import { openRoom, plain, type Room } from './open-room';

/** Three decades on 900 px: 300 px a decade. jsdom has no layout, so the frame's box is given. */
function openBand(change: Parameters<typeof dividerSheet>[0] = {}, mayEdit = true): Room {
  return openRoom(
    dividerSheet({ band: { fromHz: 100, toHz: 100_000 }, operatingFrequency: '1 kHz', ...change }),
    <Band />,
    mayEdit,
  );
}

beforeEach(() => {
  vi.spyOn(Element.prototype, 'getBoundingClientRect').mockReturnValue(new DOMRect(0, 0, 900, 60));
});

afterEach(() => {
  vi.restoreAllMocks();
});

function handle(): HTMLElement {
  return screen.getByRole('slider', { name: 'Operating frequency' });
}

function frequency(room: Room): string {
  return plain(room.store.getState().document.operatingFrequency);
}

function pointer(type: 'pointerDown' | 'pointerMove' | 'pointerUp', target: Element, clientX: number): void {
  fireEvent[type](target, { clientX, pointerId: 1, button: 0, bubbles: true });
}

describe('dragging the handle', () => {
  it('turns the frequency with it, and is one step for undo', () => {
    const room = openBand();
    const flag = handle();
    pointer('pointerDown', flag, 300);
    pointer('pointerMove', flag, 350);
    pointer('pointerMove', flag, 390.3);
    pointer('pointerUp', flag, 390.3);
    expect(frequency(room)).toBe('2.000 kHz');
    expect(room.steps()).toHaveLength(1);
    pointer('pointerDown', flag, 390.3);
    pointer('pointerMove', flag, 300);
    pointer('pointerUp', flag, 300);
    expect(room.steps()).toHaveLength(2);
    act(() => room.store.getState().undo());
    act(() => room.store.getState().undo());
    expect(frequency(room)).toBe('1 kHz');
  });

  it('does not move a handle that was only pressed, wherever on it', () => {
    const room = openBand();
    pointer('pointerDown', handle(), 312);
    pointer('pointerMove', handle(), 313);
    pointer('pointerUp', handle(), 313);
    expect(frequency(room)).toBe('1 kHz');
    expect(room.steps()).toEqual([]);
  });

  it('lets the handle hold the pointer, or a double click on it would be the axis’s', () => {
    // jsdom has no pointer capture of its own.
    const holders: Element[] = [];
    HTMLElement.prototype.setPointerCapture = function hold(this: HTMLElement) {
      holders.push(this);
    };
    openBand();
    pointer('pointerDown', handle(), 300);
    expect(holders).toEqual([handle()]);
    Reflect.deleteProperty(HTMLElement.prototype, 'setPointerCapture');
  });

  it('goes back to where it began on Escape', () => {
    const room = openBand();
    pointer('pointerDown', handle(), 300);
    pointer('pointerMove', handle(), 500);
    fireEvent.keyDown(handle(), { key: 'Escape' });
    expect(frequency(room)).toBe('1 kHz');
    pointer('pointerMove', handle(), 700);
    expect(frequency(room)).toBe('1 kHz');
  });

  it('stays on the Band', () => {
    const room = openBand();
    pointer('pointerDown', handle(), 300);
    pointer('pointerMove', handle(), 5_000);
    pointer('pointerUp', handle(), 5_000);
    expect(frequency(room)).toBe('100.0 kHz');
  });

  it('keeps the unit that the sheet uses', () => {
    const room = openBand({ operatingFrequency: '6.283 krad/s' });
    pointer('pointerDown', handle(), 300);
    pointer('pointerMove', handle(), 600);
    pointer('pointerUp', handle(), 600);
    expect(frequency(room)).toMatch(/^62\.8\d krad\/s$/);
  });
});

describe('a press on the axis', () => {
  it('brings the handle there, and the focus to it', () => {
    const room = openBand();
    const axis = handle().closest('.touch-pan-y');
    if (!axis) throw new Error('the axis is missing');
    pointer('pointerDown', axis, 600);
    pointer('pointerUp', axis, 600);
    expect(frequency(room)).toBe('10.00 kHz');
    expect(document.activeElement).toBe(handle());
  });

  it('is open to those who may only read', () => {
    const room = openBand({}, false);
    const axis = handle().closest('.touch-pan-y');
    if (!axis) throw new Error('the axis is missing');
    pointer('pointerDown', axis, 600);
    pointer('pointerUp', axis, 600);
    expect(frequency(room)).toBe('10.00 kHz');
  });
});

describe('the handle by keys', () => {
  it('is a slider that says its value, and steps', async () => {
    const room = openBand();
    act(() => handle().focus());
    expect(plain(handle().getAttribute('aria-valuetext'))).toBe('1.000 kHz, ω 6.283 krad/s');
    await room.user.keyboard('{ArrowRight}');
    expect(frequency(room)).toBe('1.010 kHz');
    await room.user.keyboard('{Shift>}{ArrowLeft}{/Shift}{End}');
    expect(frequency(room)).toBe('100.0 kHz');
    expect(handle().getAttribute('aria-valuenow')).toBe('100000');
  });

  it('makes a key held down one step for undo, and the next press another', () => {
    const room = openBand();
    for (let count = 0; count < 5; count += 1) fireEvent.keyDown(handle(), { key: 'ArrowRight' });
    fireEvent.keyUp(handle(), { key: 'ArrowRight' });
    fireEvent.keyDown(handle(), { key: 'ArrowRight' });
    fireEvent.keyUp(handle(), { key: 'ArrowRight' });
    expect(room.steps()).toHaveLength(2);
  });

  it('keeps its keys from the drawing', () => {
    openBand();
    const heard = vi.fn();
    window.addEventListener('keydown', heard);
    fireEvent.keyDown(handle(), { key: 'ArrowRight' });
    expect(heard).not.toHaveBeenCalled();
    fireEvent.keyDown(handle(), { key: 'r' });
    expect(heard).toHaveBeenCalledTimes(1);
    window.removeEventListener('keydown', heard);
  });
});

describe('typing the frequency', () => {
  async function openEntry(room: Room): Promise<HTMLElement> {
    act(() => handle().focus());
    await room.user.keyboard('{Enter}');
    return screen.getByRole('textbox', { name: 'Operating frequency' });
  }

  it('takes hertz, radians a second, and 0 for direct current', async () => {
    const room = openBand();
    for (const [typed, valueText] of [
      ['2k', '2.000 kHz, ω 12.57 krad/s'],
      ['12.57 krad/s', '2.001 kHz, ω 12.57 krad/s'],
      ['0', '0 Hz, direct current'],
    ] as const) {
      const field = await openEntry(room);
      await room.user.clear(field);
      await room.user.type(field, `${typed}{Enter}`);
      expect(frequency(room)).toBe(typed);
      expect(plain(handle().getAttribute('aria-valuetext'))).toBe(valueText);
    }
    expect(room.steps()).toHaveLength(3);
  });

  it('opens on a double click, and names the fault of what cannot be read', async () => {
    const room = openBand();
    await room.user.dblClick(handle());
    const field = screen.getByRole('textbox', { name: 'Operating frequency' });
    await room.user.clear(field);
    await room.user.type(field, '-50{Enter}');
    expect(field.getAttribute('aria-invalid')).toBe('true');
    expect(screen.getByText('A frequency is zero or more; for direct current type 0 Hz.')).toBeTruthy();
    expect(frequency(room)).toBe('1 kHz');
    await room.user.keyboard('{Escape}');
    expect(screen.queryByRole('textbox', { name: 'Operating frequency' })).toBeNull();
    expect(document.activeElement).toBe(handle());
  });

  it('moves nothing when the pointer is pressed inside its window', async () => {
    const room = openBand();
    const field = await openEntry(room);
    pointer('pointerDown', field, 700);
    pointer('pointerUp', field, 700);
    expect(frequency(room)).toBe('1 kHz');
  });
});

describe('the range of the Band', () => {
  it('is set by typing its ends, and refused in words', async () => {
    const room = openBand();
    await room.user.click(screen.getByRole('button', { name: 'Set the range of the Band' }));
    const to = screen.getByRole('textbox', { name: 'To' });
    await room.user.clear(to);
    await room.user.type(to, '50{Enter}');
    expect(screen.getByText(/^The Band rises/)).toBeTruthy();
    expect(room.steps()).toEqual([]);
    await room.user.clear(to);
    await room.user.type(to, '1 MHz{Enter}');
    expect(room.store.getState().document.band).toEqual({ fromHz: 100, toHz: 1e6 });
    expect(room.steps()).toEqual(['Set the Band from 100 Hz to 1 MHz']);
  });

  it('widens in one press to hold a frequency that is off it', async () => {
    const room = openBand({ operatingFrequency: '2.5 MHz' });
    await room.user.click(screen.getByRole('button', { name: 'Set the range of the Band' }));
    await room.user.click(screen.getByRole('button', { name: /^Widen to hold/ }));
    expect(room.store.getState().document.band).toEqual({ fromHz: 100, toHz: 1e7 });
  });
});
