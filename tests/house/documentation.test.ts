import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { PERMISSIONS } from '@/app/_server/permissions';
import { LIMITS } from '@/app/_server/limits';
import { ROLES } from '@/app/_shared/roles';
import { clip, paste, readClipping, writeClipping } from '@/canvas/commands/edits/clipboard';
import { parseSheetFile, writeSheetFile } from '@/canvas/document/export-file';
import * as documentLimits from '@/canvas/document/limits';
import { sheetDocumentSchema } from '@/canvas/document/schema';
import { selectAll } from '@/canvas/document/selection';
import { buildNetwork } from '@/canvas/network/network';
import { readNetwork } from '@/canvas/network/readings';
import { definitionOf, PART_KINDS } from '@/canvas/parts/registry';
import accounts from '@/db/seeds/accounts.json';
import { solve, validateElementList, type ElementList, type ProblemKind, type Solution } from '@/solver';
import { elementKinds } from '@/solver/elements/registry';
import { blockOf, links, quoted, tableOf } from './support/markdown';
import { allFiles, read } from './support/source-files';

const GUIDE = 'DEVELOPERS.md';

function listOf(data: unknown): ElementList {
  const checked = validateElementList(data);
  if (!checked.ok) throw new Error(checked.message);
  return checked.list;
}

function solutionOf(list: ElementList, frequency: number): Solution {
  const answer = solve(list, { frequency });
  if (!answer.ok) throw new Error(answer.message);
  return answer;
}

function exampleSheet() {
  const file = parseSheetFile(blockOf(GUIDE, 'json sheet-file'));
  if (!file.ok) throw new Error(file.message);
  return file;
}

const pair = z.tuple([z.number(), z.number()]);
const solutionSchema = z.strictObject({
  frequency: z.number(),
  voltages: z.record(z.string(), pair),
  currents: z.record(z.string(), pair),
  powers: z.record(z.string(), pair),
});

/** A figure as the guide prints it. What is zero but for rounding, against `size`, is printed as 0. */
function printed(value: number, size: number): number {
  return Math.abs(value) <= 4 * Number.EPSILON * size ? 0 : Number(value.toPrecision(6));
}

describe('the element list in DEVELOPERS.md', () => {
  const list = listOf(JSON.parse(blockOf(GUIDE, 'json element-list')));
  const shown = solutionSchema.parse(JSON.parse(blockOf(GUIDE, 'json solution')));
  const solution = solutionOf(list, shown.frequency);

  it('has the solution that is printed under it, digit for digit', () => {
    const figures = (of: (name: string) => { re: number; im: number } | undefined, names: readonly string[]) =>
      Object.fromEntries(
        names.map((name) => {
          const value = of(name);
          if (!value) throw new Error(`${name} is not determined`);
          const size = Math.hypot(value.re, value.im);
          return [name, [printed(value.re, size), printed(value.im, size)]];
        }),
      );
    const ids = list.elements.map(({ id }) => id);
    const nodes = [...new Set(list.elements.flatMap((element) => element.nodes))].filter((node) => node !== '0');
    expect(figures((node) => solution.voltage(node), nodes)).toEqual(shown.voltages);
    expect(figures((id) => solution.current(id), ids)).toEqual(shown.currents);
    expect(figures((id) => solution.power(id), ids)).toEqual(shown.powers);
    expect(solution.problems).toEqual([]);
  });

  it('agrees with the closed form 1/(1 + jωRC) to rounding', () => {
    const x = 2 * Math.PI * 1000 * 1000 * 1e-7;
    const out = solution.voltage('out');
    const [re, im] = [1 / (1 + x * x), -x / (1 + x * x)];
    expect(Math.hypot((out?.re ?? NaN) - re, (out?.im ?? NaN) - im)).toBeLessThanOrEqual(4 * Number.EPSILON);
  });

  it('knows every kind of element there is, and every kind of problem', () => {
    expect(tableOf(GUIDE, '| kind | nodes | fields |').map(([kind]) => kind)).toEqual(elementKinds());
    const kinds: Readonly<Record<ProblemKind, true>> = {
      invalid: true,
      noReference: true,
      floatingNode: true,
      voltageLoop: true,
      currentCutSet: true,
      noFeedback: true,
      noData: true,
      resonance: true,
      singular: true,
      notReliable: true,
      notFinite: true,
    };
    expect(tableOf(GUIDE, '| kind | when |').map(([kind]) => kind)).toEqual(Object.keys(kinds));
  });

  it('names the exports of the solver as they are', () => {
    const front = read('solver/index.ts');
    for (const name of ['solve', 'sweep', 'validateElementList', 'parseQuantity', 'parseRkm', 'formatQuantity', 'preferredValues', 'nearestPreferred']) {
      expect(front).toMatch(new RegExp(`export \\{[^}]*\\b${name}\\b[^}]*\\}`));
      expect(read(GUIDE)).toContain(`\`${name}`);
    }
  });
});

describe('the sheet file in DEVELOPERS.md', () => {
  it('is read, and written again to the same file', () => {
    const text = blockOf(GUIDE, 'json sheet-file');
    expect(JSON.parse(writeSheetFile(exampleSheet()))).toEqual(JSON.parse(text));
  });

  it('draws the network of the element list above it', () => {
    const { list } = buildNetwork(exampleSheet().document);
    expect(list).toEqual(JSON.parse(blockOf(GUIDE, 'json element-list')));
    const readings = readNetwork(exampleSheet().document);
    expect(readings.problems).toEqual([]);
    expect(readings.balance?.holds).toBe(true);
  });

  it('has the fields that the schema has, in tables that list them all', () => {
    expect(tableOf(GUIDE, '| field | what it is |').map(([field]) => field)).toEqual(Object.keys(sheetDocumentSchema.shape));
    const kinds = tableOf(GUIDE, '| kind | pins | values |');
    expect(kinds.map(([kind]) => kind)).toEqual(PART_KINDS);
    for (const [index, kind] of PART_KINDS.entries()) {
      const { pins, fields } = definitionOf(kind);
      const [, pinsShown = '', valuesShown = ''] = kinds[index] ?? [];
      expect(pinsShown.replace(/ \([^)]*\)/g, ''), kind).toBe(pins.map(({ name }) => name).join(', '));
      expect(valuesShown.replaceAll('`', ''), kind).toBe(fields.map(({ key }) => key).join(', ') || 'none');
    }
  });

  it('has the bounds that hold', () => {
    expect(tableOf(GUIDE, '| bound | value |')).toEqual(Object.entries(documentLimits).map(([name, value]) => [name, String(value)]));
  });
});

describe('the clipboard text in DEVELOPERS.md', () => {
  it('is what copying writes and pasting reads', () => {
    const text = blockOf(GUIDE, 'json clipboard');
    const clipping = readClipping(text);
    if (!clipping) throw new Error('the example is not read');
    expect(JSON.parse(writeClipping(clipping))).toEqual(JSON.parse(text));
    const { document } = exampleSheet();
    let count = 0;
    const pasted = paste(document, clipping, { x: 20, y: 20 }, () => `fresh-${(count += 1)}`);
    expect(pasted.parts.map(({ designator }) => designator)).toEqual(['R2', 'C2']);
    expect(clip(pasted.document, selectAll(pasted.document)).parts).toHaveLength(document.parts.length + 2);
  });
});

describe('the tables of DEVELOPERS.md', () => {
  it('give every permission the roles that it has', () => {
    const rows = tableOf(GUIDE, `| permission | ${ROLES.join(' | ')} |`);
    const wanted = Object.entries(PERMISSIONS).map(([permission, { roles }]) => {
      const holders: readonly string[] = roles;
      return [permission, ...ROLES.map((role) => (holders.includes(role) ? 'yes' : 'no'))];
    });
    expect(rows).toEqual(wanted);
  });

  it('list every action with its permission and its file', () => {
    const made = /export const (\w+) = (?:publicAction|action)\(\s*\{\s*name: '[\w.]+',(?:\s*permission: '([\w.]+)',)?/g;
    const files = allFiles.filter((file) => /^app\/.*\/actions\.ts$/.test(file));
    const actions = files.flatMap((file) =>
      [...read(file).matchAll(made)].map(([, name, permission]) => [name, permission ?? 'public', file]),
    );
    expect(files.length).toBeGreaterThan(3);
    // No exported action is written in a way that this would pass over.
    expect(actions).toHaveLength(files.flatMap((file) => [...read(file).matchAll(/^export /gm)]).length);
    const sorted = (rows: readonly (readonly (string | undefined)[])[]) => rows.map((row) => row.join(' ')).sort();
    expect(sorted(tableOf(GUIDE, '| action | permission | in |'))).toEqual(sorted(actions));
  });

  it('list every handler with its name and its permission', () => {
    const files = allFiles.filter((file) => /^app\/api\/.*route\.ts$/.test(file));
    const handlers = files.map((file) => {
      const address = file.replace(/^app/, '').replace(/\/route\.ts$/, '');
      const [, name, permission] = /oute\(\s*\{\s*name: '([\w.]+)',?(?:\s*permission: '([\w.]+)')?/.exec(read(file)) ?? [];
      return [address, name ?? 'next-auth', permission ?? 'public'].join(' ');
    });
    const rows = tableOf(GUIDE, '| address | name | permission | answers |').map((row) => row.slice(0, 3).join(' '));
    expect([...rows].sort()).toEqual(handlers.sort());
  });

  it('list every limit on guessing', () => {
    expect(tableOf(GUIDE, '| limit | most | window in seconds |')).toEqual(
      Object.entries(LIMITS).map(([name, { most, windowSeconds }]) => [name, String(most), String(windowSeconds)]),
    );
  });

  it('list every table of the database', () => {
    const migrations = allFiles.filter((file) => /^db\/migrations\/\d/.test(file)).map(read).join('\n');
    const made = [...migrations.matchAll(/CREATE TABLE (\w+)/g)].map(([, name]) => name);
    expect(tableOf(GUIDE, '| table | what it holds |').map(([name]) => name)).toEqual(made);
  });

  it('list every folder of tests', () => {
    const folders = new Set(allFiles.flatMap((file) => /^tests\/(?!support\/)[^/]+(?=\/)/.exec(file)?.[0] ?? []));
    const listed = tableOf(GUIDE, '| folder | what it checks |').map(([folder]) => folder ?? '');
    expect([...listed].sort()).toEqual([...folders].sort());
  });

  it('list every top folder, and every folder of canvas and app that is walled off', () => {
    const listed = tableOf(GUIDE, '| folder | what is in it | what it may import |').map(([folder]) => folder ?? '');
    const top = new Set(allFiles.flatMap((file) => /^(?!\.)([^/]+)\//.exec(file)?.[1] ?? []));
    const canvas = new Set(allFiles.flatMap((file) => /^canvas\/[^/]+/.exec(file)?.[0] ?? []));
    const wanted = [...top].filter((name) => !['canvas', 'fonts', 'docs'].includes(name));
    expect([...listed].sort()).toEqual([...wanted, ...canvas, 'app/_server', 'app/_shared'].sort());
  });
});

describe.each(['README.md', 'DEVELOPERS.md', 'fonts/README.md'])('%s', (file) => {
  it('names only files and folders that are there', () => {
    const there = new Set(allFiles.flatMap((path) => path.split('/').map((_, index, parts) => parts.slice(0, index + 1).join('/'))));
    const roots = [...new Set(allFiles.flatMap((path) => path.split('/')[0] ?? []))];
    const paths = quoted(file)
      .map((text) => text.replace(/\/$/, ''))
      .filter((text) => roots.includes(text.split('/')[0] ?? '') || (/^[\w./-]+\.(ts|tsx|mjs|json|md)$/.test(text) && text.includes('/')))
      // A pattern is no path.
      .filter((text) => !/[<>*{]|\s/.test(text));
    expect(paths.filter((path) => !there.has(path))).toEqual([]);
  });

  it('has links that lead somewhere', () => {
    const headings = [...read(file).matchAll(/^#+ (.*)$/gm)].map(([, text]) =>
      (text ?? '').toLowerCase().replace(/[^\p{L}\p{N} -]/gu, '').replace(/ /g, '-'),
    );
    const folder = file.includes('/') ? file.slice(0, file.lastIndexOf('/') + 1) : '';
    const broken = links(file).filter((target) =>
      target.startsWith('#') ? !headings.includes(target.slice(1)) : !allFiles.includes(`${folder}${target}`),
    );
    expect(broken).toEqual([]);
  });

  it('names only commands that there are', () => {
    const scripts = z.object({ scripts: z.record(z.string(), z.string()) }).parse(JSON.parse(read('package.json'))).scripts;
    const named = [...read(file).matchAll(/npm (?:run )?(start|test|[a-z]+)\b/g)].map(([whole, name]) => ({ whole, name: name ?? '' }));
    const ours = named.filter(({ whole, name }) => whole.startsWith('npm run') || name === 'start' || name === 'test');
    expect(ours.filter(({ name }) => !Object.hasOwn(scripts, name))).toEqual([]);
  });
});

describe('README.md', () => {
  it('prints the demonstration accounts as they are laid', () => {
    expect(tableOf('README.md', '| address | name | role | may |').map((row) => row.slice(0, 3))).toEqual(
      accounts.accounts.map(({ email, name, role }) => [email, name, role]),
    );
    expect(read('README.md')).toContain(`\`${accounts.password}\``);
  });

  it('says what it is in its first paragraph, and how to start it before everything else', () => {
    const text = read('README.md');
    expect(text).toMatch(/^# Ohmstead\n\nOhmstead is [\s\S]{200,1200}?\n\n(?:!\[[^\n]*\n\n)*## Starting it\n/);
    expect(text).toMatch(/```\nnpm start\nnpm test\n```/);
  });

  it('says what to look out for', () => {
    expect(read('README.md')).toMatch(/## Cautions\n\n[\s\S]*substitute[\s\S]*local codes[\s\S]*licensed/);
  });
});
