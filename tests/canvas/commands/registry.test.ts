import { describe, expect, it } from 'vitest';
import type { Command } from '@/canvas/commands/command';
import { commandFor, commands, keyName } from '@/canvas/commands/registry';
import { NOTHING_SELECTED, selectAll, selectParts } from '@/canvas/document/selection';
import type { SheetDocument } from '@/canvas/document/types';
import { PART_KINDS } from '@/canvas/parts/registry';
import { OpenSheet } from '../../support/open-sheet';
import { dividerSheet } from '../../support/sample-sheets';

const stroke = (key: string, mods: Partial<Record<'ctrlKey' | 'metaKey' | 'shiftKey' | 'altKey', boolean>> = {}) => ({
  key,
  ctrlKey: false,
  metaKey: false,
  shiftKey: false,
  altKey: false,
  ...mods,
});

describe('the registry of commands', () => {
  it('gives every command an id of its own and a name in words', () => {
    expect(new Set(commands.map(({ id }) => id)).size).toBe(commands.length);
    expect(new Set(commands.map(({ name }) => name.toLowerCase())).size).toBeGreaterThan(0);
    for (const { name } of commands) expect(name).toMatch(/^\p{Lu}[^<>]{2,}/u);
  });

  it('lets two commands share a key only where each says when it runs', () => {
    const byKey = new Map<string, Command[]>();
    for (const command of commands) for (const key of command.keys) byKey.set(key, [...(byKey.get(key) ?? []), command]);
    for (const [key, sharing] of byKey) {
      if (sharing.length > 1) expect([key, sharing.filter(({ when }) => when === undefined).map(({ id }) => id)]).toEqual([key, []]);
    }
  });

  it('never leaves it to the order which of two commands a key runs', () => {
    const sheet = dividerSheet();
    const tools = [
      { kind: 'select' },
      { kind: 'place', part: 'resistor', turn: 0, mirrored: false },
      { kind: 'wire', from: null, corners: [] },
      { kind: 'note' },
    ] as const;
    for (const tool of tools) {
      for (const selection of [NOTHING_SELECTED, selectParts(['resistor-1']), selectAll(sheet)]) {
        const open = new OpenSheet(sheet);
        open.store.getState().select(selection);
        open.store.getState().setTool(tool);
        const context = open.context();
        for (const key of new Set(commands.flatMap(({ keys }) => keys))) {
          const able = commands.filter((command) => command.keys.includes(key) && (command.when?.(context) ?? true));
          expect([tool.kind, selection.parts.size, key, able.slice(1).map(({ id }) => id)]).toEqual([tool.kind, selection.parts.size, key, []]);
        }
      }
    }
  });

  it('writes keys the way that a keystroke comes to be written', () => {
    for (const { keys } of commands) {
      for (const key of keys) expect(key).toMatch(/^(mod\+)?(alt\+)?(shift\+)?([a-z]+|[0-9]|[^a-zA-Z0-9\s])$/);
    }
  });

  it('has a key for every part on the Shelf', () => {
    const open = new OpenSheet(dividerSheet());
    for (const kind of PART_KINDS) {
      const command = commands.find(({ id }) => id === `take.${kind}`);
      expect(command?.keys).toHaveLength(1);
      expect(commandFor(stroke(command?.keys[0] ?? ''), open.context())?.id).toBe(`take.${kind}`);
    }
  });

  it('lets nobody change a sheet who may not', async () => {
    const open = new OpenSheet(dividerSheet(), false);
    open.store.getState().select(selectAll(open.document));
    for (const command of commands) if (command.edits) expect(await open.run(command.id)).toBe(false);
    for (const command of commands) await open.run(command.id);
    const { parts, wires } = open.document;
    expect({ parts, wires }).toEqual({ parts: dividerSheet().parts, wires: dividerSheet().wires });
  });
});

describe('a keystroke', () => {
  it.each([
    [stroke('r'), 'r'],
    [stroke('R', { shiftKey: true }), 'shift+r'],
    [stroke('z', { ctrlKey: true }), 'mod+z'],
    [stroke('Z', { metaKey: true, shiftKey: true }), 'mod+shift+z'],
    [stroke('?', { shiftKey: true }), '?'],
    [stroke('+', { shiftKey: true }), '+'],
    [stroke('+'), '+'],
    [stroke('ArrowLeft', { shiftKey: true }), 'shift+arrowleft'],
    [stroke('Delete'), 'delete'],
    [stroke('Enter', { altKey: true }), 'alt+enter'],
  ])('%j is written %s', (struck, written) => {
    expect(keyName(struck)).toBe(written);
  });
});

/** What a command must leave alone: it may hand in a new document, but never change the one it was given. */
function deepFreeze<T>(value: T): T {
  if (typeof value === 'object' && value !== null && !Object.isFrozen(value)) {
    Object.freeze(value);
    for (const inner of Object.values(value)) deepFreeze(inner);
  }
  return value;
}

describe('every command that edits', () => {
  const selections: Record<string, (sheet: SheetDocument) => ReturnType<typeof selectAll>> = {
    nothing: () => NOTHING_SELECTED,
    'one part': () => selectParts(['resistor-1']),
    everything: selectAll,
  };

  it.each(Object.keys(selections))('changes no document in place, and is undone and done again, with %s selected', async (which) => {
    const edited = new Set<string>();
    for (const { id } of commands) {
      if (id === 'edit.undo' || id === 'edit.redo') continue;
      const open = new OpenSheet(deepFreeze(dividerSheet()));
      const selection = (selections[which] ?? selectAll)(open.document);
      open.store.getState().select(selection);
      open.clipboard = '';
      await open.run('edit.copy');
      const before = open.document;
      await open.run(id);
      const after = open.document;
      if (after === before) continue;
      edited.add(id);
      expect(await open.run('edit.undo')).toBe(true);
      expect(open.document).toBe(before);
      expect([...open.store.getState().selection.parts]).toEqual([...selection.parts]);
      expect(open.said).toMatch(/^Undid: .+\.$/);
      expect(await open.run('edit.redo')).toBe(true);
      expect(open.document).toBe(after);
    }
    // Guards the test itself: these do edit, so the loop above has seen edits.
    expect(edited.has('frequency.up')).toBe(true);
    if (which !== 'nothing') for (const id of ['edit.delete', 'edit.duplicate', 'arrange.turn', 'nudge.left']) expect(edited.has(id)).toBe(true);
  });
});
