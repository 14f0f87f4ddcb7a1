import { definitionOf } from '@/canvas/parts/registry';
import type { Part, SheetDocument } from '@/canvas/document/types';

/** One difference between two versions of a sheet, in the words that the dialog sets beside each other. */
export type Difference = { readonly what: string; readonly mine: string; readonly theirs: string };

const NOTHING = '—';

/**
 * How two versions of a sheet differ, in the order of the drawing: parts by designator with what differs in them, then
 * the connections, then what belongs to the whole sheet.
 */
export function differences(mine: SheetDocument, theirs: SheetDocument): readonly Difference[] {
  const inTheirs = new Map(theirs.parts.map((part) => [part.id, part]));
  const inMine = new Set(mine.parts.map((part) => part.id));
  const found: Difference[] = [];
  let moved = 0;
  for (const part of mine.parts) {
    const other = inTheirs.get(part.id);
    if (other === undefined) {
      found.push({ what: nameOf(part), mine: valueOf(part), theirs: NOTHING });
      continue;
    }
    if (part.designator !== other.designator || !sameValues(part, other)) {
      found.push({
        what: nameOf(part),
        mine: part.designator === other.designator ? valueOf(part) : `${part.designator} ${valueOf(part)}`,
        theirs: part.designator === other.designator ? valueOf(other) : `${other.designator} ${valueOf(other)}`,
      });
    }
    if (part.at.x !== other.at.x || part.at.y !== other.at.y || part.turn !== other.turn || part.mirrored !== other.mirrored) {
      moved += 1;
    }
  }
  for (const part of theirs.parts) {
    if (!inMine.has(part.id)) found.push({ what: nameOf(part), mine: NOTHING, theirs: valueOf(part) });
  }
  if (moved > 0) found.push({ what: 'Lying elsewhere', mine: counted(moved, 'part'), theirs: counted(moved, 'part') });

  const connections = connectionsOnlyIn(mine, theirs);
  const theirConnections = connectionsOnlyIn(theirs, mine);
  if (connections > 0 || theirConnections > 0) {
    found.push({
      what: 'Connections only here',
      mine: connections === 0 ? NOTHING : String(connections),
      theirs: theirConnections === 0 ? NOTHING : String(theirConnections),
    });
  }
  if (mine.operatingFrequency !== theirs.operatingFrequency) {
    found.push({ what: 'Operating frequency', mine: mine.operatingFrequency, theirs: theirs.operatingFrequency });
  }
  if (mine.band.fromHz !== theirs.band.fromHz || mine.band.toHz !== theirs.band.toHz) {
    found.push({ what: 'Band', mine: bandOf(mine), theirs: bandOf(theirs) });
  }
  if (mine.convention.amplitude !== theirs.convention.amplitude || mine.convention.form !== theirs.convention.form) {
    found.push({ what: 'Convention', mine: conventionOf(mine), theirs: conventionOf(theirs) });
  }
  if (mine.purpose !== theirs.purpose) {
    found.push({ what: 'Purpose', mine: opening(mine.purpose), theirs: opening(theirs.purpose) });
  }
  return found;
}

/** A paragraph by its first words. */
function opening(text: string): string {
  const characters = Array.from(text);
  if (characters.length === 0) return NOTHING;
  return characters.length <= 140 ? text : `${characters.slice(0, 140).join('')}…`;
}

function nameOf(part: Part): string {
  const { name } = definitionOf(part.kind);
  return part.designator === '' ? name : part.designator;
}

function valueOf(part: Part): string {
  return definitionOf(part.kind).describe(part.values).replaceAll('\n', ', ') || definitionOf(part.kind).name;
}

function sameValues(a: Part, b: Part): boolean {
  const keys = new Set([...Object.keys(a.values), ...Object.keys(b.values)]);
  return [...keys].every((key) => a.values[key] === b.values[key]);
}

/** Wires of the one that join no such pins in the other. */
function connectionsOnlyIn(one: SheetDocument, other: SheetDocument): number {
  const joined = new Set(other.wires.map((wire) => ends(wire)));
  return one.wires.filter((wire) => !joined.has(ends(wire))).length;
}

function ends(wire: SheetDocument['wires'][number]): string {
  return [`${wire.from.part}/${wire.from.pin}`, `${wire.to.part}/${wire.to.pin}`].sort().join(' ');
}

function counted(count: number, word: string): string {
  return count === 1 ? `1 ${word}` : `${count} ${word}s`;
}

function bandOf({ band }: SheetDocument): string {
  return `${band.fromHz} to ${band.toHz} Hz`;
}

function conventionOf({ convention }: SheetDocument): string {
  return `${convention.amplitude}, ${convention.form}`;
}
