import type { Room } from '../../e2e/support/room';

/** What the browser tests do for the main job: draw, value, tune, err, undo, look, in one sitting. */
export async function drawLowPass(room: Room): Promise<void> {
  const { drawing, ledger, band } = room;
  await drawing.place('voltageSource', { x: 420, y: 320 });
  await drawing.place('resistor', { x: 560, y: 200 });
  await drawing.place('capacitor', { x: 700, y: 320 });
  await drawing.turn('C1');
  await drawing.place('reference', { x: 560, y: 480 }, 'ground');
  await drawing.wire('VS1.a', 'R1.a');
  await drawing.wire('R1.b', 'C1.a');
  await drawing.wire('VS1.b', 'C1.b');
  await drawing.wireTo('ground.a', await drawing.middleOfWire(2));
  for (const [part, label, text] of [
    ['R1', 'Resistance', '4k7'],
    ['C1', 'Capacitance', '10n'],
    ['VS1', 'Amplitude', '5 V'],
  ] as const) {
    await drawing.select(part);
    const field = ledger.field(label);
    await field.click();
    await field.press('Control+a');
    await field.pressSequentially(text);
    await field.press('Enter');
  }
  await band.drag(160);
  for (const quantity of ['voltage', 'power', 'node', 'current'] as const) await ledger.show(quantity);
  await drawing.select('ground');
  await drawing.keys('Delete', 'Control+z', 'Escape');
  await drawing.move('R1', { x: 0, y: -40 });
  await drawing.keys('t', 't', 't', 't', 'ArrowRight', 'ArrowLeft', 'Control+d', 'Delete', 'f', '+', '-', '0', ']', '[', '}', '{');
  await drawing.keys('Control+a', 'Escape', 'p', 'p', 'o', 'o', '2', '2', '?', 'Escape', 'Control+k', 'Escape');
}
