import type { CommandContext } from '../../commands/command';
import { endWire, placePartInHand, wireTo } from '../../commands/drawing-commands';
import { selectionWords } from '../../commands/editing-commands';
import { moveParts } from '../../commands/edits/parts';
import { targetAt, type WireTarget } from '../../commands/edits/wires';
import { allPins, bodyOf, courseOf, coursesOf, extentOf, partsById, placePin } from '../../document/lookup';
import { NOTHING_SELECTED, selectParts, selectWires, type Selection } from '../../document/selection';
import type { Part, PartId, SheetDocument, Wire } from '../../document/types';
import { boxOfPoints, contains, grow, overlap, type Box } from '../../geometry/box';
import { nearestOnCourse } from '../../geometry/hit';
import { distance, GRID, snap, subtract, type Point } from '../../geometry/point';
import { pathOf } from '../../geometry/route';
import { definitionOf } from '../../parts/registry';
import { MOVING_WIRES, RESTING_WIRES } from './wire-layer';

/*
 * What the hand does on the drawing. A gesture takes the sheet as it stood when it began and computes everything from
 * that; while it lasts it writes to the page directly, past React; at its end it commits once, as one step for undo;
 * Escape puts everything back.
 */

/** What lies under the pointer. */
export type Hit =
  | { readonly kind: 'pin'; readonly target: WireTarget }
  | { readonly kind: 'part'; readonly part: Part }
  | { readonly kind: 'wire'; readonly wire: Wire; readonly at: Point }
  | { readonly kind: 'nothing' };

type Carried = { readonly parts: ReadonlySet<PartId>; readonly by: Point };

type Move = {
  readonly kind: 'move';
  readonly from: Point;
  readonly document: SheetDocument;
  readonly parts: ReadonlySet<PartId>;
  readonly wires: readonly Wire[];
  by: Point;
  begun: boolean;
};
type Marquee = { readonly kind: 'marquee'; readonly from: Point; to: Point; readonly before: Selection; begun: boolean };
type Pull = { readonly kind: 'pull'; readonly from: Point; begun: boolean };
type Gesture = Move | Marquee | Pull;

/** Reach of a pin and of a wire, in pixels on the screen; a fingertip reaches further. */
const PIN_REACH = { fine: 9, coarse: 20 } as const;
const WIRE_REACH = { fine: 6, coarse: 14 } as const;
const DRAG_THRESHOLD = 4;

export type Press = {
  readonly at: Point;
  readonly zoom: number;
  readonly pointer: 'fine' | 'coarse';
  readonly adds: boolean;
  readonly keeps: boolean;
};

export type Gestures = ReturnType<typeof createGestures>;

export function createGestures(context: () => CommandContext) {
  let gesture: Gesture | null = null;
  const carryListeners = new Set<() => void>();
  const marqueeListeners = new Set<(box: Box | null) => void>();
  const noteListeners = new Set<(hit: Hit, at: Point) => void>();
  const tellCarry = () => carryListeners.forEach((listener) => listener());
  const tellMarquee = (box: Box | null) => marqueeListeners.forEach((listener) => listener(box));

  function hit({ at, zoom, pointer }: Press): Hit {
    const { document } = context();
    const reach = PIN_REACH[pointer] / zoom;
    const pin = nearestPin(document, at, reach);
    const part = partAt(document, at, pointer === 'coarse' ? 8 / zoom : 2);
    // A junction is little more than its pin: its rim drags it, its middle starts a wire.
    const middle = part?.kind === 'junction' && pin ? distance(part.at, at) <= 4 : true;
    // Over a body a pin counts only close by: on a drawing zoomed far out its reach would cover all of the part.
    const overBody = part !== null && part.kind !== 'junction';
    if (pin && middle && !(overBody && distance(pin.at, at) > Math.min(reach * 0.7, GRID * 0.8))) {
      return { kind: 'pin', target: pin };
    }
    if (part) return { kind: 'part', part };
    const wire = wireAt(document, at, WIRE_REACH[pointer] / zoom);
    return wire ? { kind: 'wire', ...wire } : { kind: 'nothing' };
  }

  function target({ at, zoom, pointer }: Press): WireTarget {
    const { document } = context();
    return targetAt(document, at, PIN_REACH[pointer] / zoom, allPins(document), coursesOf(document));
  }

  /** @returns whether the drawing takes this press, so that nothing else may. */
  function press(at: Press): boolean {
    const now = context();
    const { tool } = now;
    if (tool.kind === 'place') {
      placePartInHand(now, at.at, at.keeps);
      return true;
    }
    if (tool.kind === 'wire') {
      wireTo(now, target(at));
      gesture = { kind: 'pull', from: at.at, begun: false };
      return true;
    }
    const found = hit(at);
    if (tool.kind === 'note') {
      noteListeners.forEach((listener) => listener(found, at.at));
      now.setTool({ kind: 'select' });
      return true;
    }
    now.setCursor(null);
    if (found.kind === 'pin' && now.mayEdit) {
      now.setTool({ kind: 'wire', from: found.target, corners: [] });
      gesture = { kind: 'pull', from: at.at, begun: false };
      return true;
    }
    if (found.kind === 'part') return pressPart(now, found.part, at);
    if (found.kind === 'wire') {
      const wires = new Set(at.adds ? now.selection.wires : []);
      if (at.adds && wires.has(found.wire.id)) wires.delete(found.wire.id);
      else wires.add(found.wire.id);
      now.select(at.adds ? { ...now.selection, wires } : selectWires(wires));
      return true;
    }
    if (at.pointer === 'coarse') {
      now.select(NOTHING_SELECTED);
      return false;
    }
    gesture = { kind: 'marquee', from: at.at, to: at.at, before: at.adds ? now.selection : NOTHING_SELECTED, begun: false };
    return true;
  }

  function pressPart(now: CommandContext, part: Part, { at, adds, pointer }: Press): boolean {
    const was = now.selection.parts.has(part.id);
    if (adds) {
      const parts = new Set(now.selection.parts);
      if (was) parts.delete(part.id);
      else parts.add(part.id);
      now.select({ ...now.selection, parts });
      return true;
    }
    if (!was) now.select(selectParts([part.id]));
    // A finger moves a part once it is selected; before that it pans, as it does everywhere else.
    if (pointer === 'coarse' && !was) return false;
    if (!now.mayEdit) return true;
    const parts = was ? now.selection.parts : new Set([part.id]);
    const wires = now.document.wires.filter((wire) => parts.has(wire.from.part) || parts.has(wire.to.part));
    gesture = { kind: 'move', from: at, document: now.document, parts, wires, by: { x: 0, y: 0 }, begun: false };
    return true;
  }

  function move({ at, zoom }: Press): void {
    if (!gesture) return;
    if (!gesture.begun && distance(gesture.from, at) * zoom < DRAG_THRESHOLD) return;
    gesture.begun = true;
    switch (gesture.kind) {
      case 'move': {
        const by = snap(subtract(at, gesture.from));
        if (by.x === gesture.by.x && by.y === gesture.by.y) return;
        gesture.by = by;
        showMove(gesture);
        tellCarry();
        return;
      }
      case 'marquee':
        gesture.to = at;
        tellMarquee(boxOfPoints([gesture.from, at]));
        return;
      case 'pull':
        return;
    }
  }

  function release(at: Press): void {
    const ended = gesture;
    gesture = null;
    if (!ended) return;
    const now = context();
    switch (ended.kind) {
      case 'move':
        if (!ended.begun) return;
        clearMove(ended);
        now.apply({
          label: `Move ${selectionWords(ended.document, selectParts(ended.parts))}`,
          document: moveParts(ended.document, ended.parts, ended.by),
        });
        tellCarry();
        return;
      case 'marquee':
        tellMarquee(null);
        now.select(ended.begun ? within(now.document, ended) : ended.before);
        return;
      case 'pull': {
        const { tool } = now;
        if (!ended.begun || tool.kind !== 'wire' || tool.from === null) return;
        const end = target(at);
        if (end.kind === 'open') {
          now.setTool({ ...tool, corners: [...tool.corners, end.at] });
          now.say('The wire is still in hand: press a pin or a wire to end it, Escape to step back.');
        } else {
          endWire(now, tool.from, end, tool.corners);
        }
      }
    }
  }

  /** Puts back what the gesture under way has moved. @returns whether there was one. */
  function cancel(): boolean {
    const ended = gesture;
    gesture = null;
    if (!ended) return false;
    if (ended.kind === 'move') clearMove(ended);
    if (ended.kind === 'marquee') tellMarquee(null);
    tellCarry();
    return ended.begun;
  }

  function carried(): Carried | null {
    return gesture?.kind === 'move' && gesture.begun ? { parts: gesture.parts, by: gesture.by } : null;
  }

  return {
    hit,
    target,
    press,
    move,
    release,
    cancel,
    carried,
    active: () => gesture !== null,
    onCarry(listener: () => void): () => void {
      carryListeners.add(listener);
      return () => carryListeners.delete(listener);
    },
    onMarquee(listener: (box: Box | null) => void): () => void {
      marqueeListeners.add(listener);
      return () => marqueeListeners.delete(listener);
    },
    /** The place that a new note was pressed on. */
    onNote(listener: (hit: Hit, at: Point) => void): () => void {
      noteListeners.add(listener);
      return () => noteListeners.delete(listener);
    },
  };
}

function nearestPin(document: SheetDocument, at: Point, reach: number): Extract<WireTarget, { kind: 'pin' }> | null {
  let best: Extract<WireTarget, { kind: 'pin' }> | null = null;
  let bestFar = reach;
  for (const pin of allPins(document)) {
    const far = distance(pin.at, at);
    if (far > bestFar) continue;
    bestFar = far;
    best = { kind: 'pin', ref: pin.ref, at: pin.at };
  }
  return best;
}

function partAt(document: SheetDocument, at: Point, margin: number): Part | null {
  // The last drawn lies on top.
  for (let index = document.parts.length - 1; index >= 0; index -= 1) {
    const part = document.parts[index];
    if (part && contains(grow(bodyOf(part), margin), at)) return part;
  }
  return null;
}

function wireAt(document: SheetDocument, at: Point, reach: number): { wire: Wire; at: Point } | null {
  let best: { wire: Wire; at: Point } | null = null;
  let bestFar = reach;
  for (const wire of document.wires) {
    const nearest = nearestOnCourse(courseOf(document, wire), at);
    if (!nearest || nearest.distance > bestFar) continue;
    bestFar = nearest.distance;
    best = { wire, at: nearest.at };
  }
  return best;
}

function within(document: SheetDocument, { from, to, before }: Marquee): Selection {
  const box = boxOfPoints([from, to]);
  if (!box) return before;
  const parts = new Set(before.parts);
  const wires = new Set(before.wires);
  for (const part of document.parts) {
    if (overlap(box, part.kind === 'nodeName' ? bodyOf(part) : extentOf(part))) parts.add(part.id);
  }
  for (const wire of document.wires) {
    const course = courseOf(document, wire);
    if (course.length > 0 && course.every((point) => contains(box, point))) wires.add(wire.id);
  }
  return { parts, wires };
}

function nodeElement(part: PartId): HTMLElement | null {
  return window.document.querySelector<HTMLElement>(`.react-flow__node[data-id="${CSS.escape(part)}"]`);
}

/** Writes the positions of carried parts and the courses of their wires to the page. */
function showMove({ document, parts, wires, by }: Move): void {
  for (const id of parts) {
    const element = nodeElement(id);
    if (!element) continue;
    element.dataset['resting'] ??= element.style.transform;
    element.style.transform = `translate(${by.x}px,${by.y}px) ${element.dataset['resting']}`;
  }
  const moved = moveParts(document, parts, by);
  const moving = new Set(wires.map(({ id }) => id));
  setPath(RESTING_WIRES, document.wires.filter(({ id }) => !moving.has(id)), document);
  setPath(MOVING_WIRES, moved.wires.filter(({ id }) => moving.has(id)), moved);
}

function clearMove({ document, parts }: Move): void {
  for (const id of parts) {
    const element = nodeElement(id);
    const resting = element?.dataset['resting'];
    if (!element || resting === undefined) continue;
    element.style.transform = resting;
    delete element.dataset['resting'];
  }
  setPath(RESTING_WIRES, document.wires, document);
  setPath(MOVING_WIRES, [], document);
}

function setPath(id: string, wires: readonly Wire[], document: SheetDocument): void {
  window.document.getElementById(id)?.setAttribute('d', wires.map((wire) => pathOf(courseOf(document, wire))).join(''));
}

/** The anchor of a note for what was pressed. */
export function noteAnchor(document: SheetDocument, found: Hit, at: Point) {
  const place = { x: Math.round(at.x), y: Math.round(at.y) };
  switch (found.kind) {
    case 'part':
      return { kind: 'part' as const, part: found.part.id, at: found.part.at };
    case 'pin':
      return found.target.kind === 'pin'
        ? { kind: 'node' as const, part: found.target.ref.part, pin: found.target.ref.pin, at: found.target.at }
        : { kind: 'place' as const, at: place };
    case 'wire': {
      const part = partsById(document).get(found.wire.from.part);
      const pin = part && definitionOf(part.kind).pins.find(({ name }) => name === found.wire.from.pin);
      if (!part || !pin) return { kind: 'place' as const, at: place };
      return { kind: 'node' as const, part: part.id, pin: pin.name, at: placePin(part, pin).at };
    }
    case 'nothing':
      return { kind: 'place' as const, at: place };
  }
}
