import { describe, expect, it } from 'vitest';
import { descriptionSchema } from '@/db/seeds/description';
import { bodyOf, coursesOf, designatorsOf, findPin } from '@/canvas/document/lookup';
import { writeSheetFile } from '@/canvas/document/export-file';
import type { SheetDocument } from '@/canvas/document/types';
import { overlap, type Box } from '@/canvas/geometry/box';
import { samePoint, snap, type Point } from '@/canvas/geometry/point';
import { layOutLabels } from '@/canvas/labels/label-layout';
import { openPins, meetingPlaces } from '@/canvas/network/marks';
import { findNodes } from '@/canvas/network/nodes';
import { readNetwork } from '@/canvas/network/readings';
import { definitionOf } from '@/canvas/parts/registry';
import { DEMONSTRATION_SHEETS, demonstrationDescription, demonstrationSheet, demonstrationText } from '../support/demonstration';
import { ladderSheet } from '../support/sample-sheets';

/** Whether a segment passes through the inside of a box. */
function enters(a: Point, b: Point, box: Box): boolean {
  return Math.max(a.x, b.x) > box.left && Math.min(a.x, b.x) < box.right && Math.max(a.y, b.y) > box.top && Math.min(a.y, b.y) < box.bottom;
}

/** Every straight run of every wire. */
function runsOf(document: SheetDocument): readonly { readonly id: string; readonly a: Point; readonly b: Point }[] {
  return [...coursesOf(document)].flatMap(([id, course]) =>
    course.slice(1).flatMap((b, index) => {
      const a = course[index];
      return a ? [{ id, a, b }] : [];
    }),
  );
}

const drawn = [
  ...DEMONSTRATION_SHEETS.map((key) => [key, demonstrationSheet(key).document] as const),
  ['a ladder of 60', ladderSheet(60)] as const,
  ['a ladder of 200', ladderSheet(200)] as const,
];

it('there are the six sheets of the demonstration team', () => {
  expect(DEMONSTRATION_SHEETS).toEqual([
    'hydrophone-anti-alias-low-pass',
    'hydrophone-preamplifier',
    'mains-inlet-filter',
    'pump-motor-power-factor-bank',
    'transducer-match-40-khz',
    'two-way-monitor-crossover',
  ]);
});

describe.each(DEMONSTRATION_SHEETS)('the sheet %s', (key) => {
  it('is a file as this version writes it, with nothing to mend', () => {
    const text = demonstrationText(key);
    expect(writeSheetFile(demonstrationSheet(key))).toBe(text);
  });

  it('says in a paragraph what it is for', () => {
    const { purpose } = demonstrationSheet(key).document;
    expect(purpose.length).toBeGreaterThan(300);
    expect(purpose).toMatch(/Found/);
    expect(purpose).toMatch(/Not in the drawing|Parts are ideal|equivalent/);
  });
});

describe.each(drawn)('the drawing of %s', (_name, document) => {
  it('is solved with nothing to say against it, and its power balances', () => {
    const { problems, balance, parts } = readNetwork(document);
    expect(problems).toEqual([]);
    expect(balance?.holds).toBe(true);
    expect(balance?.ratio).toBeLessThan(1e-12);
    for (const part of document.parts) {
      if (definitionOf(part.kind).element) expect(parts.get(part.id)?.current).not.toBeNull();
    }
  });

  it('gives every part that has one a designator of its own', () => {
    const designated = document.parts.filter(({ kind }) => definitionOf(kind).letters !== '');
    expect(designatorsOf(document).size).toBe(designated.length);
  });

  it('sits on the grid', () => {
    for (const { at } of document.parts) expect(samePoint(snap(at), at)).toBe(true);
  });

  it('has no two parts that overlap', () => {
    const bodies = document.parts.map((part) => ({ id: part.id, box: bodyOf(part) }));
    const found = bodies.flatMap((one, index) => bodies.slice(index + 1).flatMap((other) => (overlap(one.box, other.box) ? [`${one.id} on ${other.id}`] : [])));
    expect(found).toEqual([]);
  });

  it('has no wire through a part', () => {
    // A mark on a node lies on its wires; a name's pill does not.
    const bodies = document.parts
      .filter(({ kind }) => kind === 'nodeName' || definitionOf(kind).pins.length > 1)
      .map((part) => ({ id: part.id, box: bodyOf(part) }));
    const found = runsOf(document).flatMap(({ id, a, b }) => bodies.flatMap((body) => (enters(a, b, body.box) ? [`${id} through ${body.id}`] : [])));
    expect(found).toEqual([]);
  });

  it('has no two wires that run on one another', () => {
    const runs = runsOf(document).map(({ id, a, b }) => ({
      id,
      box: { left: Math.min(a.x, b.x), right: Math.max(a.x, b.x), top: Math.min(a.y, b.y), bottom: Math.max(a.y, b.y) },
    }));
    const found = runs.flatMap((one, index) =>
      runs.slice(index + 1).flatMap((other) => {
        const width = Math.min(one.box.right, other.box.right) - Math.max(one.box.left, other.box.left);
        const height = Math.min(one.box.bottom, other.box.bottom) - Math.max(one.box.top, other.box.top);
        const share = (width > 0 && height === 0) || (height > 0 && width === 0);
        return share ? [`${one.id} on ${other.id}`] : [];
      }),
    );
    expect(found).toEqual([]);
  });

  it('leaves room beside each standing part for its label and its reading', () => {
    const showing = { currents: true, voltages: false, powers: false, nodes: true };
    const { labels, readings } = layOutLabels(document, findNodes(document), showing, document.convention.form);
    for (const part of document.parts) {
      if (part.turn !== 90 || definitionOf(part.kind).pins.length < 2) continue;
      expect([part.designator, readings.get(part.id)?.align]).toEqual([part.designator, 'start']);
      if (part.kind === 'voltageSource' || part.kind === 'currentSource') continue;
      expect([part.designator, labels.get(part.id)?.align]).toEqual([part.designator, 'start']);
    }
  });

  it('leaves no pin open, and wherever three meet there is a junction', () => {
    const nodes = findNodes(document);
    expect(openPins(document, nodes)).toEqual([]);
    expect(meetingPlaces(document)).toEqual([]);
  });

  it('has no junction that joins fewer than three', () => {
    for (const part of document.parts) {
      if (part.kind !== 'junction') continue;
      const ends = document.wires.filter(({ from, to }) => from.part === part.id || to.part === part.id).length;
      const named = document.parts.some(({ kind, at }) => kind === 'nodeName' && samePoint(at, part.at));
      expect([part.id, ends + Number(named) >= 3]).toEqual([part.id, true]);
    }
  });
});

describe('a ladder for measuring', () => {
  it.each([6, 7, 8, 60, 200])('of %i parts has that many elements', (parts) => {
    const document = ladderSheet(parts);
    const { network, problems, nodes } = readNetwork(document);
    expect(network.list.elements).toHaveLength(parts);
    expect(problems).toEqual([]);
    expect(Math.hypot(nodes.get('1')?.re ?? 0, nodes.get('1')?.im ?? 0)).toBeCloseTo(1, 12);
  });
});

describe('what is on the sheets beside their drawings', () => {
  const description = descriptionSchema.parse(demonstrationDescription());

  it('is about sheets that are there', () => {
    const named = [...Object.keys(description.drawnBy), ...description.snapshots.map(({ sheet }) => sheet), ...description.notes.map(({ sheet }) => sheet)];
    for (const sheet of named) expect(DEMONSTRATION_SHEETS).toContain(sheet);
    expect(description.snapshots).toHaveLength(1);
  });

  it('has an open note with an answer, pinned where its anchor says', () => {
    const [note] = description.notes;
    expect(note?.resolvedBy).toBeUndefined();
    expect(note?.replies).toHaveLength(1);
    if (note?.anchor.kind !== 'node') throw new Error('the note is pinned to a node');
    const { document } = demonstrationSheet(note.sheet);
    expect(findPin(document, { part: note.anchor.part, pin: note.anchor.pin })?.at).toEqual(note.anchor.at);
  });
});
