import { REFERENCE_NODE } from '@/solver';
import { pinKey, pinsOf } from '../document/lookup';
import type { PartId, PinRef, SheetDocument, WireId } from '../document/types';
import { pointKey } from '../geometry/point';

/** A node of the drawing: all pins and wires that are one conductor. */
export type DrawnNode = {
  /** The name the solver knows it by: `0`, the name given on the sheet, or a number given in drawing order. */
  readonly name: string;
  /** Whether a person named it. */
  readonly named: boolean;
  readonly pins: readonly PinRef[];
  readonly wires: readonly WireId[];
};

export type Nodes = {
  readonly all: readonly DrawnNode[];
  /** The node of a pin, by `pinKey`. */
  readonly byPin: ReadonlyMap<string, DrawnNode>;
  readonly byName: ReadonlyMap<string, DrawnNode>;
  /** Names that were given to one node beside another; the first counts. */
  readonly alsoCalled: readonly { readonly part: PartId; readonly name: string; readonly instead: string }[];
};

/** Disjoint sets over strings, with path halving (Tarjan and van Leeuwen 1984). */
class DisjointSets {
  private readonly parent = new Map<string, string>();

  find(item: string): string {
    let root = item;
    for (;;) {
      const above = this.parent.get(root) ?? root;
      if (above === root) return root;
      const over = this.parent.get(above) ?? above;
      this.parent.set(root, over);
      root = over;
    }
  }

  join(a: string, b: string): void {
    const rootA = this.find(a);
    const rootB = this.find(b);
    if (rootA !== rootB) this.parent.set(rootB, rootA);
  }
}

/**
 * Finds the nodes of a drawing. Pins are one node when a wire joins them, when they lie on the same grid point, when
 * they carry the same node name, or when both have a reference mark. A crossing of wires is no connection.
 */
export function findNodes(document: Pick<SheetDocument, 'parts' | 'wires'>): Nodes {
  const sets = new DisjointSets();
  const pinsAt = new Map<string, string>();
  const pinOfName = new Map<string, string>();
  let referencePin: string | null = null;

  for (const part of document.parts) {
    for (const pin of pinsOf(part)) {
      const key = pinKey(pin.ref);
      const place = pointKey(pin.at);
      const there = pinsAt.get(place);
      if (there === undefined) pinsAt.set(place, key);
      else sets.join(there, key);
      if (part.kind === 'reference') {
        if (referencePin === null) referencePin = key;
        else sets.join(referencePin, key);
      }
      if (part.kind === 'nodeName') {
        const name = part.values['name'] ?? '';
        const namesake = pinOfName.get(name);
        if (namesake === undefined) pinOfName.set(name, key);
        else sets.join(namesake, key);
      }
    }
  }
  for (const wire of document.wires) sets.join(pinKey(wire.from), pinKey(wire.to));
  return nameNodes(document, sets, referencePin);
}

type Gathered = { name: string | null; readonly pins: PinRef[]; readonly wires: WireId[] };

function nameNodes(
  document: Pick<SheetDocument, 'parts' | 'wires'>,
  sets: DisjointSets,
  referencePin: string | null,
): Nodes {
  const gathered = new Map<string, Gathered>();
  const gather = (key: string): Gathered => {
    const root = sets.find(key);
    const known = gathered.get(root);
    if (known) return known;
    const made: Gathered = { name: null, pins: [], wires: [] };
    gathered.set(root, made);
    return made;
  };

  if (referencePin !== null) gather(referencePin).name = REFERENCE_NODE;
  const alsoCalled: { part: PartId; name: string; instead: string }[] = [];
  for (const part of document.parts) {
    for (const pin of pinsOf(part)) {
      const node = gather(pinKey(pin.ref));
      node.pins.push(pin.ref);
      if (part.kind !== 'nodeName') continue;
      const name = part.values['name'] ?? '';
      if (node.name === null) node.name = name;
      else if (node.name !== name) alsoCalled.push({ part: part.id, name, instead: node.name });
    }
  }
  for (const wire of document.wires) gather(pinKey(wire.from)).wires.push(wire.id);

  const taken = new Set([...gathered.values()].flatMap((node) => (node.name === null ? [] : [node.name])));
  let number = 1;
  const all = [...gathered.values()].map((node): DrawnNode => {
    if (node.name !== null) return { name: node.name, named: node.name !== REFERENCE_NODE, pins: node.pins, wires: node.wires };
    while (taken.has(String(number))) number += 1;
    const name = String(number);
    taken.add(name);
    return { name, named: false, pins: node.pins, wires: node.wires };
  });

  const byPin = new Map<string, DrawnNode>();
  for (const node of all) for (const pin of node.pins) byPin.set(pinKey(pin), node);
  return { all, byPin, byName: new Map(all.map((node) => [node.name, node])), alsoCalled };
}
