import { fireEvent, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { expect, test, vi } from 'vitest';
import { Dialog } from '@/components/dialog';

function Example({ onKey = () => {} }: { readonly onKey?: (key: string) => void }) {
  const [open, setOpen] = useState(false);
  return (
    <div onKeyDown={(event) => onKey(event.key)}>
      <button type="button" onClick={() => setOpen(true)}>
        Open
      </button>
      <Dialog open={open} onClose={() => setOpen(false)} title="A question" description="Why it is asked.">
        <input aria-label="Answer" />
      </Dialog>
    </div>
  );
}

test('is named and described, and starts at its first field, fresh each time', async () => {
  const user = userEvent.setup();
  render(<Example />);
  await user.click(screen.getByRole('button', { name: 'Open' }));
  const dialog = screen.getByRole('dialog', { name: 'A question', description: 'Why it is asked.' });
  expect(document.activeElement).toBe(screen.getByRole('textbox', { name: 'Answer' }));
  await user.keyboard('half an ans');
  await user.click(screen.getByRole('button', { name: 'Close' }));
  expect(dialog.isConnected).toBe(false);
  await user.click(screen.getByRole('button', { name: 'Open' }));
  expect(screen.getByRole<HTMLInputElement>('textbox', { name: 'Answer' }).value).toBe('');
});

test('Escape, which the browser tells as a cancel, closes it by way of its owner', async () => {
  const user = userEvent.setup();
  render(<Example />);
  await user.click(screen.getByRole('button', { name: 'Open' }));
  const cancel = new Event('cancel', { cancelable: true });
  fireEvent(screen.getByRole('dialog'), cancel);
  expect(cancel.defaultPrevented).toBe(true);
  expect(screen.queryByRole('dialog')).toBeNull();
});

test('keys typed in it do not reach the shortcuts of what it stands in', async () => {
  const onKey = vi.fn();
  const user = userEvent.setup();
  render(<Example onKey={onKey} />);
  await user.click(screen.getByRole('button', { name: 'Open' }));
  await user.keyboard('r');
  expect(screen.getByRole<HTMLInputElement>('textbox', { name: 'Answer' }).value).toBe('r');
  expect(onKey).not.toHaveBeenCalled();
});
