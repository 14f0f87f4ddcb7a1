import { render, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { expect, test, vi } from 'vitest';
import { MenuButton } from '@/components/menu-button';

function show(onSelect = vi.fn(), onCloseFocus?: (event: Event) => void) {
  render(
    <MenuButton
      label="Actions"
      onCloseFocus={onCloseFocus}
      entries={[
        { kind: 'item', label: 'Clone', onSelect },
        { kind: 'separator' },
        { kind: 'item', label: 'Archive', onSelect: () => {} },
      ]}
    >
      …
    </MenuButton>,
  );
  return { user: userEvent.setup(), onSelect, button: screen.getByRole('button', { name: 'Actions' }) };
}

test('opens by a press, tells its state, and a second press closes it', async () => {
  const { user, button } = show();
  expect(button.getAttribute('aria-expanded')).toBe('false');
  await user.click(button);
  expect(await screen.findByRole('menu', { name: 'Actions' })).toBeTruthy();
  expect(button.getAttribute('aria-expanded')).toBe('true');
  await user.click(button);
  await waitFor(() => expect(screen.queryByRole('menu')).toBeNull());
  expect(button.getAttribute('aria-expanded')).toBe('false');
});

test('works from the keyboard, and gives the focus back to its button', async () => {
  const { user, onSelect, button } = show();
  button.focus();
  await user.keyboard('{ArrowDown}');
  await screen.findByRole('menu');
  await waitFor(() => expect(document.activeElement?.textContent).toBe('Clone'));
  await user.keyboard('{ArrowDown}');
  expect(document.activeElement?.textContent).toBe('Archive');
  await user.keyboard('{Escape}');
  await waitFor(() => expect(document.activeElement).toBe(button));
  await user.keyboard('{Enter}');
  await user.click(await screen.findByRole('menuitem', { name: 'Clone' }));
  expect(onSelect).toHaveBeenCalledOnce();
});

test('a caller may send the focus elsewhere', async () => {
  const onCloseFocus = vi.fn((event: Event) => event.preventDefault());
  const { user, button } = show(vi.fn(), onCloseFocus);
  await user.click(button);
  await user.click(await screen.findByRole('menuitem', { name: 'Archive' }));
  await waitFor(() => expect(onCloseFocus).toHaveBeenCalled());
  expect(document.activeElement).not.toBe(button);
});
