import { act, screen, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { Ledger } from '@/canvas/react/ledger/ledger';
import { ladderSheet } from '../../support/sample-sheets';
import { openRoom, plain, type Room } from './open-room';

function openLadder(): Room {
  return openRoom(ladderSheet(14), <Ledger />);
}

function lines(): readonly string[] {
  const [, body] = within(screen.getByRole('table')).getAllByRole('rowgroup');
  if (!body) throw new Error('the table has no body');
  return within(body)
    .getAllByRole('row')
    .map((row) =>
      plain(
        [...row.children]
          .map((cell) => cell.textContent)
          .join(' | '),
      ),
    );
}

function names(): readonly string[] {
  return lines().map((line) => line.split(' | ')[0] ?? '');
}

describe('the table of readings', () => {
  it('has a line for every part, in the natural order of designators', () => {
    openLadder();
    expect(names()).toEqual(['C1', 'C2', 'C3', 'C4', 'C5', 'L1', 'L2', 'L3', 'R1', 'R2', 'R3', 'R4', 'R5', 'VS1']);
    expect(lines()[13]).toMatch(/^VS1 \| \d+(\.\d+)? [µm]A \| ∠ −?\d+\.\d°$/);
  });

  it('sorts by magnitude, largest first, and back by name', async () => {
    const room = openLadder();
    await room.user.click(screen.getByRole('button', { name: 'Magnitude' }));
    const { readings, document } = room.store.getState();
    const sizes = names().map((name) => {
      const part = document.parts.find(({ designator }) => designator === name);
      const current = part && readings.parts.get(part.id)?.current;
      return current ? Math.hypot(current.re, current.im) : NaN;
    });
    expect(sizes).toEqual([...sizes].sort((a, b) => b - a));
    expect(screen.getByRole('columnheader', { name: 'Magnitude' }).getAttribute('aria-sort')).toBe('descending');
    await room.user.click(screen.getByRole('button', { name: 'Part' }));
    expect(names()[0]).toBe('C1');
    expect(screen.getByRole('columnheader', { name: 'Magnitude' }).getAttribute('aria-sort')).toBeNull();
  });

  it('filters by name, and says so when nothing is left; Escape clears', async () => {
    const room = openLadder();
    const filter = screen.getByRole('searchbox', { name: 'Filter by name' });
    await room.user.type(filter, 'l');
    expect(names()).toEqual(['L1', 'L2', 'L3']);
    await room.user.type(filter, 'x');
    expect(screen.queryByRole('table')).toBeNull();
    expect(screen.getByText('No name here holds “lx”.')).toBeTruthy();
    await room.user.keyboard('{Escape}');
    expect(names()).toHaveLength(14);
  });

  it('shows powers as active and reactive, and nodes by their names', async () => {
    const room = openLadder();
    await room.user.click(screen.getByRole('radio', { name: 'Power' }));
    expect(lines().find((line) => line.startsWith('C1'))).toMatch(/^C1 \| 0 W \| −[\d.]+ [mµ]?var$/);
    await room.user.click(screen.getByRole('radio', { name: 'Nodes' }));
    expect(names()[0]).toBe('0 (reference)');
  });

  it('shows rectangular form in one figure', () => {
    const room = openLadder();
    const { document, apply } = room.store.getState();
    act(() => apply({ label: 'form', document: { ...document, convention: { amplitude: 'rms', form: 'rectangular' } } }));
    expect(lines()[0]).toMatch(/^C1 \| −?[\d.]+ [+−] j[\d.]+ [µm]A$/);
    expect(screen.getByText('rectangular · rms')).toBeTruthy();
  });

  it('leads from a line to the part, by pointer and by keys alone', async () => {
    const room = openLadder();
    await room.user.click(screen.getByRole('button', { name: 'L2' }));
    const selected = () =>
      room.store.getState().document.parts.flatMap((part) => (room.store.getState().selection.parts.has(part.id) ? [part.designator] : []));
    expect(selected()).toEqual(['L2']);
    expect(room.revealed).toHaveLength(1);
    await room.user.keyboard('{ArrowDown}{Enter}');
    expect(selected()).toEqual(['L3']);
    await room.user.keyboard('{End}{Enter}');
    expect(selected()).toEqual(['VS1']);
    // One Tab goes past all of it.
    const table = screen.getByRole('table');
    await room.user.tab();
    expect(table.contains(document.activeElement)).toBe(false);
  });

  it('selects the wires of a node', async () => {
    const room = openLadder();
    await room.user.click(screen.getByRole('radio', { name: 'Nodes' }));
    await room.user.click(screen.getByRole('button', { name: '0 (reference)' }));
    expect(room.store.getState().selection.wires).toEqual(
      new Set(room.store.getState().readings.network.nodes.byName.get('0')?.wires),
    );
  });

  it('copies what the filter leaves as CSV', async () => {
    const room = openLadder();
    await room.user.type(screen.getByRole('searchbox', { name: 'Filter by name' }), 'VS');
    await room.user.click(screen.getByRole('button', { name: 'Copy the readings of these names as CSV' }));
    expect(room.copied[0]?.split('\r\n')).toHaveLength(5);
  });
});

describe('folding', () => {
  it('takes a section away until it is opened again, and notes that on this machine', async () => {
    const room = openLadder();
    const heading = screen.getByRole('button', { name: /^Readings/ });
    await room.user.click(heading);
    expect(heading.getAttribute('aria-expanded')).toBe('false');
    expect(screen.queryByRole('table')).toBeNull();
    expect(localStorage.getItem('ohmstead.ledger.folded')).toBe('["readings"]');
    await room.user.click(heading);
    expect(screen.getByRole('table')).toBeTruthy();
  });
});
