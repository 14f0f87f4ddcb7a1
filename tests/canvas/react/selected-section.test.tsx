import { act, screen, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { Ledger } from '@/canvas/react/ledger/ledger';
import { MAX_PURPOSE } from '@/canvas/document/limits';
import { dividerSheet } from '../../support/sample-sheets';
import { SheetBuilder } from '../../support/sheet-builder';
import { openRoom, plain, type Room } from './open-room';

function openDivider(mayEdit = true): Room {
  return openRoom(dividerSheet(), <Ledger />, mayEdit);
}

function valueOf(room: Room, designator: string, field: string): string | undefined {
  return room.store.getState().document.parts.find((part) => part.designator === designator)?.values[field];
}

/** The figures beside a term of the readings. */
function figureBeside(term: string): string {
  const found = screen.getAllByRole('term').find((dt) => dt.textContent === term);
  if (!found) throw new Error(`no line is called ${term}`);
  return plain(found.nextElementSibling?.textContent);
}

describe('the main field of the selected part', () => {
  it('echoes what is understood while it is typed, and commits on Enter as one named step', async () => {
    const room = openDivider();
    act(() => room.select('R1'));
    const field = screen.getByLabelText('Resistance');
    await room.user.clear(field);
    await room.user.type(field, '4k7');
    expect(plain(field.parentElement?.textContent)).toContain('4.70 kΩ');
    expect(valueOf(room, 'R1', 'resistance')).toBe('1k');
    await room.user.keyboard('{Enter}');
    expect(valueOf(room, 'R1', 'resistance')).toBe('4k7');
    expect(room.steps().map(plain)).toEqual(['Set R1 to 4.70 kΩ']);
    expect(figureBeside('Impedance')).toContain('4.700 + j0 kΩ');
  });

  it('commits on leaving', async () => {
    const room = openDivider();
    act(() => room.select('R2'));
    await room.user.clear(screen.getByLabelText('Resistance'));
    await room.user.type(screen.getByLabelText('Resistance'), '3k');
    await room.user.tab();
    expect(valueOf(room, 'R2', 'resistance')).toBe('3k');
  });

  it('keeps what was typed when another part is selected before the field was left', async () => {
    const room = openDivider();
    act(() => room.select('R1'));
    await room.user.type(screen.getByLabelText('Resistance'), '5');
    act(() => room.select('R2'));
    expect(valueOf(room, 'R1', 'resistance')).toBe('1k5');
    expect(valueOf(room, 'R2', 'resistance')).toBe('1k');
  });

  it('goes back on Escape, and lets only the next Escape through', async () => {
    const room = openDivider();
    act(() => room.select('R1'));
    const heard: string[] = [];
    const listen = (event: KeyboardEvent) => void heard.push(event.key);
    window.addEventListener('keydown', listen);
    const field = screen.getByLabelText('Resistance');
    await room.user.type(field, '9');
    heard.length = 0;
    await room.user.keyboard('{Escape}');
    expect(field).toHaveProperty('value', '1k');
    expect(heard).toEqual([]);
    await room.user.keyboard('{Escape}');
    expect(heard).toEqual(['Escape']);
    window.removeEventListener('keydown', listen);
    expect(room.steps()).toEqual([]);
  });

  it('names the fault while it is typed, and never commits it', async () => {
    const room = openDivider();
    act(() => room.select('R1'));
    const field = screen.getByLabelText('Resistance');
    await room.user.clear(field);
    await room.user.type(field, '4.7 kF');
    expect(field.getAttribute('aria-invalid')).toBe('true');
    const sentence = document.getElementById(field.getAttribute('aria-describedby') ?? '')?.textContent;
    expect(sentence).toMatch(/capacitance/);
    await room.user.keyboard('{Enter}');
    expect(field).toHaveProperty('value', '4.7 kF');
    expect(room.store.getState().spoken.text).toBe(sentence);
    await room.user.tab();
    expect(field).toHaveProperty('value', '1k');
    expect(field.getAttribute('aria-invalid')).toBeNull();
    expect(plain(screen.getByText(/was not taken/).textContent)).toMatch(/^“4\.7 kF” was not taken; R1 keeps 1\.00 kΩ\. /);
    expect(plain(room.store.getState().spoken.text)).toMatch(/R1 keeps 1\.00 kΩ/);
    expect(room.steps()).toEqual([]);
  });

  it('cannot be typed in by those who may only read', async () => {
    const room = openDivider(false);
    act(() => room.select('R1'));
    await room.user.type(screen.getByLabelText('Resistance'), '9{Enter}');
    expect(valueOf(room, 'R1', 'resistance')).toBe('1k');
  });
});

describe('the designator', () => {
  it('is changed, and refused when it is taken', async () => {
    const room = openDivider();
    act(() => room.select('R1'));
    const field = screen.getByLabelText('Designator');
    await room.user.clear(field);
    await room.user.type(field, 'R2');
    expect(screen.getByText('R2 is on the sheet already.')).toBeTruthy();
    await room.user.clear(field);
    await room.user.type(field, 'RS{Enter}');
    expect(room.steps()).toEqual(['Rename R1 to RS']);
    expect(screen.getByText('RS · resistor')).toBeTruthy();
  });
});

describe('a source', () => {
  it('is given as rms, peak or peak to peak, on a cosine or a sine, with a phase', async () => {
    const room = openDivider();
    act(() => room.select('VS1'));
    await room.user.click(screen.getByRole('radio', { name: 'peak to peak' }));
    await room.user.click(screen.getByRole('radio', { name: 'sine' }));
    await room.user.clear(screen.getByLabelText('Phase'));
    await room.user.type(screen.getByLabelText('Phase'), '0.5 rad{Enter}');
    expect(room.steps()).toEqual([
      'Set VS1 to peak to peak',
      'Set VS1 to sine',
      'Set phase of VS1 to 28.65°',
    ]);
    expect(figureBeside('Voltage')).toBe('0.3536 V ∠ −61.35°');
  });

  it('takes a frequency of its own, and says when it is dead', async () => {
    const room = openDivider();
    act(() => room.select('VS1'));
    await room.user.click(screen.getByRole('radio', { name: 'its own' }));
    expect(valueOf(room, 'VS1', 'frequency')).toBe('1 kHz');
    const field = screen.getByLabelText('In Hz or rad/s');
    await room.user.clear(field);
    await room.user.type(field, '50{Enter}');
    expect(plain(document.body.textContent)).toContain('Its own frequency is 50.00 Hz: dead at 1.000 kHz.');
    await room.user.click(screen.getByRole('radio', { name: 'operating' }));
    expect(valueOf(room, 'VS1', 'frequency')).toBe('');
    expect(plain(document.body.textContent)).not.toContain('dead at');
  });
});

describe('the readings of the selected part', () => {
  it('are in the convention of the sheet; powers never become peak', () => {
    const room = openDivider();
    act(() => room.select('R1'));
    expect(figureBeside('Current')).toBe('500.0 µA ∠ 0.00°');
    expect(figureBeside('Power P, Q')).toBe('250.0 µW, 0 var');
    const { document: sheet, apply } = room.store.getState();
    act(() => apply({ label: 'peak', document: { ...sheet, convention: { amplitude: 'peak', form: 'rectangular' } } }));
    expect(figureBeside('Current')).toBe('707.1 + j0 µA');
    expect(figureBeside('Power P, Q')).toBe('250.0 µW, 0 var');
  });

  it('copies time functions with every digit', async () => {
    const room = openDivider();
    act(() => room.select('R1'));
    expect(plain(document.body.textContent)).toContain('i(t) = 707.1 µA · cos(ωt)');
    await room.user.click(screen.getByRole('button', { name: 'Copy i(t) with all digits' }));
    expect(room.copied).toEqual([`i(t) = ${0.0005 * Math.SQRT2} A · cos(2π · 1000 Hz · t)`]);
  });

  it('says open and closed at 0 Hz, and shows no phase', () => {
    const sheet = new SheetBuilder();
    const source = sheet.part('voltageSource', 200, 320, { turn: 90 });
    const capacitor = sheet.capacitor(400, 320, '1u', 90);
    sheet.wire(source, capacitor);
    sheet.wire([source, 'b'], [capacitor, 'b']);
    sheet.wire([source, 'b'], sheet.reference(200, 400));
    const room = openRoom(sheet.document({ operatingFrequency: '0 Hz' }), <Ledger />);
    act(() => room.select('C1'));
    expect(figureBeside('Impedance')).toBe('open');
    expect(figureBeside('Voltage')).toBe('1.000 V');
    expect(screen.queryByText('Power factor')).toBeNull();
  });

  it('says that a reading is not determined instead of showing one', () => {
    // Two voltage sources side by side: nothing says how they share the current.
    const sheet = new SheetBuilder();
    const one = sheet.part('voltageSource', 200, 320, { turn: 90 });
    const other = sheet.part('voltageSource', 400, 320, { turn: 90 });
    sheet.wire(one, other);
    sheet.wire([one, 'b'], [other, 'b']);
    sheet.wire([one, 'b'], sheet.reference(200, 400));
    const room = openRoom(sheet.document(), <Ledger />);
    act(() => room.select('VS1'));
    expect(figureBeside('Current')).toBe('not determined');
    expect(figureBeside('Voltage')).toBe('1.000 V ∠ 0.00°');
  });
});

describe('what else can be selected', () => {
  it('is a wire: its node, the voltage, and the parts on it, which lead on', async () => {
    const room = openDivider();
    const wire = room.store.getState().document.wires[1];
    act(() => room.store.getState().select({ parts: new Set(), wires: new Set([wire?.id ?? '']) }));
    expect(figureBeside('Node')).toBe('out');
    expect(figureBeside('Voltage')).toBe('0.5000 V ∠ 0.00°');
    await room.user.click(within(screen.getByRole('group', { name: 'Parts on this node' })).getByRole('button', { name: 'R2' }));
    expect(screen.getByText('R2 · resistor')).toBeTruthy();
    expect(room.revealed).toHaveLength(1);
  });

  it('is a node name: its text and the node under it', async () => {
    const room = openDivider();
    const name = room.store.getState().document.parts.find(({ kind }) => kind === 'nodeName');
    act(() => room.store.getState().select({ parts: new Set([name?.id ?? '']), wires: new Set() }));
    const field = screen.getByLabelText('Name');
    await room.user.clear(field);
    await room.user.type(field, '0');
    expect(screen.getByText(/0 is the reference node/)).toBeTruthy();
    await room.user.type(field, 'x');
    await room.user.clear(field);
    await room.user.type(field, 'tap{Enter}');
    expect(figureBeside('Node')).toBe('tap');
  });

  it('is several things: how many of each', () => {
    const room = openDivider();
    const { parts, wires } = room.store.getState().document;
    act(() =>
      room.store.getState().select({ parts: new Set(parts.map(({ id }) => id)), wires: new Set(wires.map(({ id }) => id)) }),
    );
    expect(screen.getByText(/^2 resistors, 1 voltage source, 1 reference, 1 node name, 2 junctions, 6 wires$/)).toBeTruthy();
  });
});

describe('nothing selected', () => {
  it('shows the purpose, and keeps what is typed into it', async () => {
    const room = openDivider();
    await room.user.type(screen.getByLabelText('Purpose'), 'Halves.');
    expect(screen.getByLabelText('Purpose').getAttribute('maxlength')).toBe(String(MAX_PURPOSE));
    act(() => room.select('R1'));
    expect(room.store.getState().document.purpose).toBe('Halves.');
    expect(room.steps()).toEqual(['Change the purpose']);
  });

  it('switches conventions and what is shown, for readers too', async () => {
    const room = openDivider(false);
    await room.user.click(screen.getByRole('radio', { name: 'peak' }));
    await room.user.click(screen.getByRole('radio', { name: 'rectangular' }));
    await room.user.click(screen.getByRole('checkbox', { name: 'Powers' }));
    expect(room.store.getState().document.convention).toEqual({ amplitude: 'peak', form: 'rectangular' });
    expect(room.store.getState().showing.powers).toBe(true);
    expect(screen.queryByLabelText('Purpose')).toBeNull();
  });
});
