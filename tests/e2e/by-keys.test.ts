import { expectPolar } from './support/figures';
import { currentOf, type LowPass } from './support/low-pass';
import type { Room } from './support/room';
import { SheetList } from './support/sheet-list';
import { expect, test } from './support/test';

// Whoever cannot use a pointer draws the same network and reads the same figures.
test('a low-pass is drawn, valued, tuned and undone with keys alone', async ({ makeTeam, visit }) => {
  const team = await makeTeam('designer');
  const page = await visit(team.person('designer'));
  const room = await (await SheetList.open(page)).begin('By keys');
  const { drawing } = room;
  await page.evaluate(() => {
    for (const kind of ['pointerdown', 'mousedown', 'touchstart']) {
      const refuse = () => {
        throw new Error(`the pointer was used: ${kind}`);
      };
      window.addEventListener(kind, refuse, { capture: true });
    }
  });

  // Nothing has to be looked for first: the keys work from the start.
  await expect(drawing.surface).toBeFocused();
  // Each part is placed from where the one before was left.
  await drawing.keys('v', ...far('ArrowLeft', 3), 'Enter');
  await expect(drawing.spoken).toContainText('Placed voltage source VS1.');
  await drawing.keys('r', ...far('ArrowRight', 3), ...far('ArrowUp', 2), 'Enter');
  await expect(drawing.spoken).toContainText('Placed resistor R1.');
  await drawing.keys('c', 't', ...far('ArrowRight', 3), ...far('ArrowDown', 2), 'Enter');
  await expect(drawing.spoken).toContainText('Placed capacitor C1.');
  await drawing.keys('g', ...far('ArrowLeft', 3), ...far('ArrowDown', 2), 'Enter');
  await expect(drawing.spoken).toContainText('Placed reference.');

  await wireByKeys(room, 'VS1, plus.', 'R1, first pin.');
  await wireByKeys(room, 'R1, second pin.', 'C1, first pin.');
  await wireByKeys(room, 'C1, second pin.', 'VS1, minus.');
  await wireByKeys(room, 'Reference, pin.', 'VS1, minus.');

  await setByKeys(room, 'R1', 'Resistance', '2k2');
  await setByKeys(room, 'C1', 'Capacitance', '47n');
  await setByKeys(room, 'VS1', 'Amplitude', '3');
  const filter: LowPass = { volts: 3, ohms: 2200, farads: 47e-9 };
  await expectCurrent(room, filter);

  // By its key, and by the handle's own keys, and typed.
  await drawing.keys('Escape', '}');
  expect(await room.band.hertz()).toBe(1259);
  await expectCurrent(room, filter);
  await room.band.handle.focus();
  await drawing.keys('PageUp');
  expect(await room.band.hertz()).toBe(1585);
  await expectCurrent(room, filter);
  await room.band.type('5k rad/s');
  expect(await room.band.hertz()).toBeCloseTo(5000 / (2 * Math.PI), 9);
  await expectCurrent(room, filter);

  // A step back takes the readings with it.
  await drawing.surface.focus();
  await drawing.keys('Control+z');
  expect(await room.band.hertz()).toBe(1585);
  await expectCurrent(room, filter);
  await room.expectKeeping('saved');
});

function far(arrow: string, times: number): string[] {
  return Array.from({ length: times }, () => `Shift+${arrow}`);
}

/** Goes from pin to pin until the wanted one is spoken. */
async function wireByKeys({ drawing }: Room, from: string, to: string): Promise<void> {
  await drawing.keys('w');
  await expect(drawing.spoken).toContainText('Wire in hand.');
  await goToPin(from);
  await drawing.keys('Enter');
  await expect(drawing.spoken).toContainText('Wire started.');
  await goToPin(to);
  await drawing.keys('Enter');
  await expect(drawing.spoken).toContainText('Joined.');

  async function goToPin(words: string): Promise<void> {
    const spoken: string[] = [];
    for (let steps = 0; steps < 20; steps += 1) {
      await drawing.keys('Tab');
      const now = (await drawing.spoken.textContent()) ?? '';
      if (now === words) return;
      spoken.push(now);
    }
    throw new Error(`Tab never came to “${words}”, only to ${spoken.join(' ')}`);
  }
}

/** Goes to a part with Tab, opens its field with Enter, and types. */
async function setByKeys({ drawing }: Room, name: string, label: string, text: string): Promise<void> {
  const part = drawing.part(name);
  await drawing.surface.focus();
  for (let steps = 0; steps < 20; steps += 1) {
    await drawing.keys('Tab');
    if (await part.evaluate((node) => node === document.activeElement)) break;
  }
  await expect(part).toBeFocused();
  await drawing.keys('Enter');
  const editor = drawing.editor(label, name);
  await expect(editor).toBeFocused();
  // What is there is selected, so that typing takes its place.
  await editor.page().keyboard.type(text);
  await drawing.keys('Enter');
  await expect(editor).toBeHidden();
  await expect(drawing.spoken).toContainText(`${name} is `);
}

/** The reading as it is read aloud with the part. */
async function expectCurrent({ drawing, band }: Room, filter: LowPass): Promise<void> {
  const hertz = await band.hertz();
  await expect(async () => {
    const said = /current (\S+\s\S+ ∠ [^,]+)/.exec(await drawing.words('R1'))?.[1] ?? '';
    expectPolar(said, currentOf(filter, hertz), `current of R1 at ${hertz} Hz`);
  }).toPass({ timeout: 15_000 });
}
