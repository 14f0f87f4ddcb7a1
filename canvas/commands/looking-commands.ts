import { formatQuantity } from '@/solver';
import { readFrequency, TWO_PI } from '../parts/read-values';
import type { Command, CommandContext, Showing } from './command';

/** The operating frequency as text: four significant digits, in the unit that the sheet uses. */
export function frequencyText(hz: number, like: string): string {
  const angular = /rad/.test(like);
  const value = angular ? hz * TWO_PI : hz;
  if (value === 0) return angular ? '0 rad/s' : '0 Hz';
  const rounded = Number(value.toPrecision(4));
  // A plain number, a unit with a prefix: what a person would type, and what is read back exactly.
  return formatQuantity(rounded, angular ? 'rad/s' : 'Hz', 4).replace(/\u2009/g, ' ');
}

/** Sets the operating frequency, within what the Band can show. */
export function setOperatingFrequency(context: CommandContext, text: string, gesture?: string): void {
  if (text === context.document.operatingFrequency) return;
  context.apply({
    label: `Set the operating frequency to ${text}`,
    document: { ...context.document, operatingFrequency: text },
    gesture,
  });
}

/** The frequency is text of four digits, so it stands this close to a rung, in rungs, and is on it. */
const ON_RUNG = 0.02;

/**
 * The next frequency up or down a ladder of equal ratios with a rung at every power of ten, so that a step up and a step
 * down come back to where they were.
 * @param decades of a step, less than zero for down
 */
function nextRung(hz: number, decades: number): number {
  const place = Math.log10(hz) / decades;
  return 10 ** (Math.floor(place + 1 + ON_RUNG) * decades);
}

function stepFrequency(id: string, name: string, key: string, decades: number): Command {
  return {
    id,
    name,
    group: 'Drive',
    keys: [key],
    edits: false,
    run: (context) => {
      const { operatingFrequency, band } = context.document;
      const read = readFrequency(operatingFrequency);
      const hz = read.ok && read.value > 0 ? read.value : band.fromHz;
      // The rungs are round in the unit that the sheet uses.
      const scale = /rad/.test(operatingFrequency) ? TWO_PI : 1;
      const wanted = nextRung(hz * scale, decades) / scale;
      const next = frequencyText(Math.max(1e-3, Math.min(1e12, wanted)), operatingFrequency);
      setOperatingFrequency(context, next, 'frequency keys');
      context.say(`Operating frequency ${next}.`);
    },
  };
}

function toggleShowing(key: string, name: string, which: keyof Showing): Command {
  return {
    id: `show.${which}`,
    name: `Show or hide ${name} on the drawing`,
    group: 'Look',
    keys: [key],
    edits: false,
    run: (context) => {
      const shown = !context.showing[which];
      context.setShowing({ ...context.showing, [which]: shown });
      context.say(`${name} ${shown ? 'shown' : 'hidden'}.`);
    },
  };
}

/** Looking around, the operating frequency, and the sheet's own panels. */
export const lookingCommands: readonly Command[] = [
  { id: 'view.in', name: 'Zoom in', group: 'Look', keys: ['+', '='], edits: false, run: ({ screen }) => screen.zoomIn() },
  { id: 'view.out', name: 'Zoom out', group: 'Look', keys: ['-'], edits: false, run: ({ screen }) => screen.zoomOut() },
  { id: 'view.fit', name: 'Fit the drawing', group: 'Look', keys: ['f'], edits: false, run: ({ screen }) => screen.zoomToFit() },
  { id: 'view.full', name: 'Zoom to 100 %', group: 'Look', keys: ['0'], edits: false, run: ({ screen }) => screen.zoomToFull() },
  toggleShowing('1', 'currents', 'currents'),
  toggleShowing('2', 'voltages', 'voltages'),
  toggleShowing('3', 'powers', 'powers'),
  toggleShowing('4', 'node voltages', 'nodes'),
  stepFrequency('frequency.up', 'Raise the operating frequency', ']', 1 / 48),
  stepFrequency('frequency.down', 'Lower the operating frequency', '[', -1 / 48),
  stepFrequency('frequency.far.up', 'Raise the operating frequency by a third of an octave', '}', 0.1),
  stepFrequency('frequency.far.down', 'Lower the operating frequency by a third of an octave', '{', -0.1),
  {
    id: 'convention.amplitude',
    name: 'Show readings as peak or as rms',
    group: 'Look',
    keys: ['p'],
    edits: false,
    run: (context) => {
      const { convention } = context.document;
      const amplitude = convention.amplitude === 'rms' ? 'peak' : 'rms';
      context.apply({
        label: `Show readings as ${amplitude}`,
        document: { ...context.document, convention: { ...convention, amplitude } },
        say: `Readings are ${amplitude}.`,
      });
    },
  },
  {
    id: 'convention.form',
    name: 'Show readings in polar or rectangular form',
    group: 'Look',
    keys: ['o'],
    edits: false,
    run: (context) => {
      const { convention } = context.document;
      const form = convention.form === 'polar' ? 'rectangular' : 'polar';
      context.apply({
        label: `Show readings in ${form} form`,
        document: { ...context.document, convention: { ...convention, form } },
        say: `Readings are ${form}.`,
      });
    },
  },
  { id: 'sheet.keys', name: 'List the keys', group: 'Sheet', keys: ['?'], edits: false, run: ({ screen }) => screen.open('keys') },
  {
    id: 'sheet.commands',
    name: 'Open the command list',
    group: 'Sheet',
    keys: ['mod+k'],
    edits: false,
    run: ({ screen }) => screen.open('commands'),
  },
  {
    id: 'sheet.note',
    name: 'Pin a note',
    group: 'Sheet',
    keys: ['q'],
    edits: false,
    run: (context) => {
      context.setTool({ kind: 'note' });
      context.say('Press on a part, a node or a place to pin the note there. Escape to leave it.');
    },
  },
  {
    id: 'sheet.snapshot',
    name: 'Take a snapshot',
    group: 'Sheet',
    keys: ['mod+s'],
    edits: true,
    run: ({ screen }) => screen.open('snapshot'),
  },
  { id: 'sheet.clone', name: 'Clone this sheet', group: 'Sheet', keys: [], edits: false, run: ({ screen }) => screen.open('clone') },
];
