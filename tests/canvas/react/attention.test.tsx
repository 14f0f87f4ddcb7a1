import { act, screen, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { CAUTION_ADVICE, VOLTAGE_LIMIT } from '@/canvas/network/cautions';
import type { SheetDocument } from '@/canvas/document/types';
import { Ledger } from '@/canvas/react/ledger/ledger';
import { powerOfTen, StatusLine } from '@/canvas/react/ledger/status-line';
import { dividerSheet } from '../../support/sample-sheets';
import { openRoom, plain } from './open-room';

function withSource(values: Readonly<Record<string, string>>): SheetDocument {
  const document = dividerSheet();
  return {
    ...document,
    parts: document.parts.map((part) =>
      part.kind === 'voltageSource' ? { ...part, values: { ...part.values, ...values } } : part,
    ),
  };
}

function withoutReference(): SheetDocument {
  const document = dividerSheet();
  return {
    ...document,
    parts: document.parts.filter(({ kind }) => kind !== 'reference'),
    wires: document.wires.filter(({ to }) => !to.part.startsWith('reference')),
  };
}

describe('problems', () => {
  it('stand at the top in words, and lead to what is at fault', async () => {
    const room = openRoom(withoutReference(), <Ledger />);
    const block = screen.getByRole('region', { name: 'Problems' });
    const [message] = room.store.getState().readings.problems;
    await room.user.click(within(block).getByRole('button', { name: message?.message }));
    expect(room.store.getState().selection.parts).toEqual(new Set(message?.parts));
    expect(room.revealed).toHaveLength(1);
  });

  it('are not there when all is well', () => {
    openRoom(dividerSheet(), <Ledger />);
    expect(screen.queryByRole('region', { name: 'Problems' })).toBeNull();
  });
});

describe('cautions', () => {
  it('say what is there, the limit with its source, and the advice', () => {
    openRoom(withSource({ amplitude: '230' }), <Ledger />);
    const block = screen.getByRole('region', { name: /caution/ });
    expect(plain(block.textContent)).toContain('230 V AC (rms), above 50 V');
    expect(block.textContent).toContain(VOLTAGE_LIMIT.source);
    expect(block.textContent).toContain(CAUTION_ADVICE);
  });

  it('fold, but stay announced, and stay on the page for a print', async () => {
    const room = openRoom(withSource({ amplitude: '230' }), <Ledger />);
    const heading = screen.getByRole('button', { name: /Take care/ });
    await room.user.click(heading);
    expect(heading.getAttribute('aria-expanded')).toBe('false');
    const advice = screen.getByText(CAUTION_ADVICE);
    expect(advice.closest('.print\\:block')).toBeTruthy();
    expect(screen.getByRole('region', { name: /caution/ })).toBeTruthy();
    await room.user.click(heading);
  });

  it('come into view from the status line, unfolded', async () => {
    const room = openRoom(
      withSource({ amplitude: '230' }),
      <>
        <StatusLine />
        <Ledger />
      </>,
    );
    // jsdom has no layout, and so no scrolling.
    Element.prototype.scrollIntoView = () => {};
    const [chip, heading] = screen.getAllByRole('button', { name: /Take care/ });
    if (!chip || !heading) throw new Error('the chip or the heading is missing');
    await room.user.click(heading);
    await room.user.click(chip);
    expect(heading.getAttribute('aria-expanded')).toBe('true');
    expect(document.activeElement).toBe(heading);
    expect(room.store.getState().panel).toBeNull();
  });
});

describe('the status line', () => {
  it('says how the figures are to be read, and that the power balances', () => {
    openRoom(dividerSheet(), <StatusLine />);
    const said = plain(screen.getByRole('list').textContent);
    expect(said).toContain('Phasors: rms, cosine · degrees · f1.000 kHz · ω6.283 krad/s');
    expect(said).toMatch(/Power balances (exactly|to \d·10⁻\d+)/u);
  });

  it('says peak when the sheet does, and direct at 0 Hz', () => {
    const room = openRoom(dividerSheet({ convention: { amplitude: 'peak', form: 'polar' } }), <StatusLine />);
    expect(screen.getByRole('list').textContent).toContain('Phasors: peak, cosine');
    const { document, apply } = room.store.getState();
    act(() => apply({ label: 'direct', document: { ...document, operatingFrequency: '0 Hz' } }));
    expect(screen.getByRole('list').textContent).toContain('Direct values: no phase');
  });

  it('names sources that are dead at this frequency', () => {
    openRoom(withSource({ frequency: '50 Hz' }), <StatusLine />);
    expect(plain(screen.getByRole('list').textContent)).toContain('VS1 (50.00 Hz) is dead at 1.000 kHz');
  });

  it('does not say that power balances while there is a problem', () => {
    openRoom(withoutReference(), <StatusLine />);
    const said = screen.getByRole('list').textContent;
    expect(said).not.toContain('Power balances');
    expect(said).toMatch(/1 problem/);
  });

  it('sets a ratio as a digit and a power of ten', () => {
    expect(powerOfTen(2.2e-16)).toBe('2·10⁻¹⁶');
    expect(powerOfTen(3.4e-5)).toBe('3·10⁻⁵');
    expect(powerOfTen(9.7e-17)).toBe('1·10⁻¹⁶');
  });
});
