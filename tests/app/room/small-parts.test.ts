import { describe, expect, it } from 'vitest';
import { cloneName } from '@/app/sheets/[id]/_room/clone/clone-dialog';
import { keepLooks } from '@/app/sheets/[id]/_room/keep-looks';
import { fingerprint } from '@/app/sheets/[id]/_room/keeping/fingerprint';
import { describeAnchor } from '@/app/sheets/[id]/_room/notes/describe-anchor';
import { openWords } from '@/app/sheets/[id]/_room/notes/note-words';
import { fileName } from '@/app/sheets/[id]/_room/save-file';
import type { NoteThread } from '@/app/_shared/wire';
import { emptySheetDocument } from '@/canvas/document/schema';
import type { SheetDocument } from '@/canvas/document/types';
import { findNodes } from '@/canvas/network/nodes';

describe('the mark of a text', () => {
  it('is the same for the same text, and another for one character more, less or other', () => {
    const text = JSON.stringify(emptySheetDocument());
    expect(fingerprint(text)).toBe(fingerprint(`${text}`));
    const others = [`${text} `, text.slice(1), text.replace('1 kHz', '2 kHz'), [...text].reverse().join(''), ''];
    expect(new Set([text, ...others].map(fingerprint)).size).toBe(6);
  });
});

describe('a file’s name', () => {
  it.each([
    ['Anti-alias low-pass', 'Anti-alias low-pass.sheet.json'],
    ['../../etc/passwd', 'etc passwd.sheet.json'],
    ['a:b*c?"d"<e>|f', 'a b c d e f.sheet.json'],
    ['\u202Egnp.exe', 'gnp.exe.sheet.json'],
    ['   ', 'sheet.sheet.json'],
    ['Ω'.repeat(200), `${'Ω'.repeat(80)}.sheet.json`],
  ])('%j', (name, expected) => {
    expect(fileName(name)).toBe(expected);
  });
});

describe('the name of a clone', () => {
  it('fits where names are bounded', () => {
    expect(cloneName('Match')).toBe('Match (clone)');
    expect(cloneName('x'.repeat(120))).toHaveLength(120);
  });
});

describe('what a reader has turned for themselves', () => {
  const given = emptySheetDocument();
  it('stays when the sheet changes under them', () => {
    const shown: SheetDocument = { ...given, operatingFrequency: '5 kHz' };
    const next: SheetDocument = { ...given, purpose: 'new', operatingFrequency: '2 kHz', convention: { amplitude: 'peak', form: 'polar' } };
    expect(keepLooks(next, shown, given)).toEqual({ ...next, operatingFrequency: '5 kHz' });
  });

  it('and what was not turned follows the sheet', () => {
    const next: SheetDocument = { ...given, band: { fromHz: 1, toHz: 10 } };
    expect(keepLooks(next, structuredClone(given), given)).toEqual(next);
  });
});

describe('where a note is pinned, in words', () => {
  const document: SheetDocument = {
    ...emptySheetDocument(),
    parts: [
      { id: 'r', kind: 'resistor', designator: 'R1', at: { x: 0, y: 0 }, turn: 0, mirrored: false, values: { resistance: '1k' } },
      { id: 'n', kind: 'nodeName', designator: '', at: { x: 30, y: 0 }, turn: 0, mirrored: false, values: { name: 'out' } },
    ],
  };
  const nodes = findNodes(document);
  const at = { x: 0, y: 0 };
  it.each([
    [{ kind: 'place', at } as const, 'at a place', false],
    [{ kind: 'part', part: 'r', at } as const, 'at R1', false],
    [{ kind: 'node', part: 'r', pin: 'b', at } as const, 'at node out', false],
    [{ kind: 'part', part: 'gone', at } as const, 'its part is gone', true],
    [{ kind: 'node', part: 'gone', pin: 'a', at } as const, 'its node is gone', true],
  ])('%j', (anchor, text, gone) => {
    expect(describeAnchor(anchor, document, nodes)).toEqual({ text, gone });
  });
});

describe('how many notes are open', () => {
  const thread = (over: Partial<NoteThread>): NoteThread => ({
    id: 'x',
    number: 1,
    anchor: { kind: 'place', at: { x: 0, y: 0 } },
    class: 'minor',
    text: 'x',
    author: 'x',
    writtenAt: '',
    resolved: null,
    replies: [],
    ...over,
  });
  it('is said with the weightiest first', () => {
    expect(openWords([])).toBe('none');
    expect(openWords([thread({ resolved: { by: 'x', at: '' } })])).toBe('none open');
    expect(openWords([thread({}), thread({ class: 'major' }), thread({})])).toBe('1 major, 2 minor open');
    expect(openWords([thread({}), thread({ class: 'major' }), thread({ class: 'query' })])).toBe('3 open');
  });
});
