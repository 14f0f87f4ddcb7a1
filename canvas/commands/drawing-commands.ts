import { pinsOf } from '../document/lookup';
import { NOTHING_SELECTED, selectParts } from '../document/selection';
import { partsById } from '../document/lookup';
import { add, GRID, snap, type Point } from '../geometry/point';
import { turnBy } from '../geometry/placement';
import { definitionOf, PART_KINDS, type PartKind } from '../parts/registry';
import type { Command, CommandContext } from './command';
import { addPart } from './edits/parts';
import { connect, type WireTarget } from './edits/wires';

/** The keyboard's place: where it was left, else beside what is selected, else the middle of the view. */
export function cursorOf(context: CommandContext): Point {
  if (context.cursor) return context.cursor;
  const selected = [...context.selection.parts].flatMap((id) => partsById(context.document).get(id) ?? []);
  const last = selected[selected.length - 1];
  return last ? last.at : snap(context.screen.middle());
}

function withArticle(noun: string): string {
  return `${/^[aeiou]/.test(noun) ? 'an' : 'a'} ${noun}`;
}

function pick(kind: PartKind): Command {
  const definition = definitionOf(kind);
  return {
    id: `take.${kind}`,
    name: `Take ${withArticle(definition.name.toLowerCase())}`,
    group: 'Draw',
    keys: [definition.key],
    edits: true,
    run: (context) => takePart(context, kind),
  };
}

/** Takes a part from the Shelf into the hand. Sources and references start upright, as they are mostly drawn. */
export function takePart(context: CommandContext, kind: PartKind): void {
  const turn = kind === 'voltageSource' || kind === 'currentSource' ? 90 : 0;
  context.setCursor(cursorOf(context));
  context.setTool({ kind: 'place', part: kind, turn, mirrored: false });
  context.say(`${definitionOf(kind).name} in hand. Arrows move it, T turns it, Enter places it, Escape puts it back.`);
}

/** Puts the part in hand on the sheet. */
export function placePartInHand(context: CommandContext, at: Point, keepHolding = false): void {
  const { tool } = context;
  if (tool.kind !== 'place') return;
  const id = context.freshId();
  const { document, part } = addPart(context.document, tool.part, { at, turn: tool.turn, mirrored: tool.mirrored }, id);
  const name = definitionOf(tool.part).name.toLowerCase();
  const called = part.designator === '' ? name : `${name} ${part.designator}`;
  context.apply({ label: `Place ${called}`, document, selection: selectParts([id]), say: `Placed ${called}.` });
  if (!keepHolding) context.setTool({ kind: 'select' });
}

/** Starts, bends or ends the wire in hand at a target. */
export function wireTo(context: CommandContext, target: WireTarget): void {
  const { tool } = context;
  if (tool.kind !== 'wire') return;
  if (tool.from === null) {
    context.setTool({ kind: 'wire', from: target, corners: [] });
    context.say('Wire started. End it on a pin or a wire; Enter in the open makes a corner.');
    return;
  }
  if (target.kind === 'open') {
    context.setTool({ ...tool, corners: [...tool.corners, target.at] });
    context.say('Corner.');
    return;
  }
  endWire(context, tool.from, target, tool.corners);
}

/** Joins two targets; what cannot be joined is said, and the wire stays in hand. */
export function endWire(context: CommandContext, from: WireTarget, to: WireTarget, corners: readonly Point[]): boolean {
  const result = connect(context.document, from, to, corners, () => context.freshId());
  if (!result.ok) {
    context.say(result.message);
    return false;
  }
  context.apply({ label: 'Draw a wire', document: result.document, selection: NOTHING_SELECTED, say: 'Joined.' });
  context.setTool({ kind: 'select' });
  return true;
}

function targetAtCursor(context: CommandContext): WireTarget {
  const cursor = cursorOf(context);
  for (const part of context.document.parts) {
    for (const pin of pinsOf(part)) {
      if (pin.at.x === cursor.x && pin.at.y === cursor.y) return { kind: 'pin', ref: pin.ref, at: pin.at };
    }
  }
  return context.screen.targetAt(cursor);
}

/** Moves the cursor to the next or the previous pin, in drawing order. */
function stepPin(context: CommandContext, by: 1 | -1): void {
  const pins = context.document.parts.flatMap((part) => pinsOf(part).map((pin) => ({ part, pin })));
  if (pins.length === 0) return;
  const cursor = cursorOf(context);
  const here = pins.findIndex(({ pin }) => pin.at.x === cursor.x && pin.at.y === cursor.y);
  const next = pins[here === -1 ? (by === 1 ? 0 : pins.length - 1) : (here + by + pins.length) % pins.length];
  if (!next) return;
  context.setCursor(next.pin.at);
  context.screen.reveal(next.pin.at);
  const { part, pin } = next;
  context.say(`${part.designator || definitionOf(part.kind).name}, ${pin.label}.`);
}

function moveCursor(context: CommandContext, by: Point): void {
  const at = add(cursorOf(context), by);
  context.setCursor(at);
  context.screen.reveal(at);
}

function arrow(name: string, x: number, y: number): Command[] {
  const inHand = ({ tool }: CommandContext) => tool.kind !== 'select';
  return [
    {
      id: `cursor.${name}`,
      name: `Move the cursor ${name}`,
      listedAs: 'Move what is in hand',
      group: 'Draw',
      keys: [`arrow${name}`],
      edits: true,
      when: inHand,
      run: (context) => moveCursor(context, { x: x * GRID, y: y * GRID }),
    },
    {
      id: `cursor.far.${name}`,
      name: `Move the cursor far ${name}`,
      listedAs: 'Move what is in hand, five squares at a time',
      group: 'Draw',
      keys: [`shift+arrow${name}`],
      edits: true,
      when: inHand,
      run: (context) => moveCursor(context, { x: x * 5 * GRID, y: y * 5 * GRID }),
    },
  ];
}

const turnInHand = (quarterTurns: 1 | -1) => (context: CommandContext) => {
  const { tool } = context;
  if (tool.kind === 'place') context.setTool({ ...tool, turn: turnBy(tool.turn, quarterTurns) });
};

/** Taking, placing and wiring. */
export const drawingCommands: readonly Command[] = [
  ...PART_KINDS.map(pick),
  {
    id: 'wire.start',
    name: 'Draw a wire',
    group: 'Draw',
    keys: ['w'],
    edits: true,
    run: (context) => {
      context.setCursor(cursorOf(context));
      context.setTool({ kind: 'wire', from: null, corners: [] });
      context.say('Wire in hand. Tab goes from pin to pin, arrows move, Enter starts and ends.');
    },
  },
  ...[arrow('left', -1, 0), arrow('right', 1, 0), arrow('up', 0, -1), arrow('down', 0, 1)].flat(),
  {
    id: 'hand.use',
    name: 'Place the part in hand, or start, bend or end the wire',
    group: 'Draw',
    keys: ['enter'],
    edits: true,
    when: ({ tool }) => tool.kind === 'place' || tool.kind === 'wire',
    run: (context) => {
      if (context.tool.kind === 'place') placePartInHand(context, cursorOf(context));
      else wireTo(context, targetAtCursor(context));
    },
  },
  {
    id: 'pin.next',
    name: 'Go to the next pin',
    group: 'Draw',
    keys: ['tab'],
    edits: true,
    when: ({ tool }) => tool.kind === 'wire' || tool.kind === 'place',
    run: (context) => stepPin(context, 1),
  },
  {
    id: 'pin.previous',
    name: 'Go to the previous pin',
    group: 'Draw',
    keys: ['shift+tab'],
    edits: true,
    when: ({ tool }) => tool.kind === 'wire' || tool.kind === 'place',
    run: (context) => stepPin(context, -1),
  },
  {
    id: 'hand.turn',
    name: 'Turn the part in hand',
    group: 'Draw',
    keys: ['t'],
    edits: true,
    when: ({ tool }) => tool.kind === 'place',
    run: turnInHand(1),
  },
  {
    id: 'hand.turnBack',
    name: 'Turn the part in hand back',
    group: 'Draw',
    keys: ['shift+t'],
    edits: true,
    when: ({ tool }) => tool.kind === 'place',
    run: turnInHand(-1),
  },
  {
    id: 'hand.mirror',
    name: 'Mirror the part in hand',
    group: 'Draw',
    keys: ['m'],
    edits: true,
    when: ({ tool }) => tool.kind === 'place',
    run: (context) => {
      const { tool } = context;
      if (tool.kind === 'place') context.setTool({ ...tool, mirrored: !tool.mirrored });
    },
  },
];
