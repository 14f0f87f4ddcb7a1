import { describe, expect, it } from 'vitest';
import { buildGraph, cycles, importsOf } from './support/import-graph';
import { codeFiles } from './support/source-files';

const sources = codeFiles.filter((file) => /^(solver|canvas|components|db|app|scripts)\/|^(proxy|instrumentation)\.ts$/.test(file));
const graph = buildGraph(sources);

/** The rooms of the house. `app/_shared` crosses the wire and `app/_server` serves the pages, so each is a room of its own. */
const ROOMS = [
  'solver',
  'canvas/geometry',
  'canvas/react',
  'canvas/store',
  'canvas',
  'components',
  'app/_shared',
  'db',
  'app/_server',
  'app',
  'scripts',
] as const;

/** The pure folders of `canvas` are one room: the registry of parts and the document need each other's types. */
function roomOf(file: string): string {
  const found = ROOMS.find((room) => file.startsWith(`${room}/`) && !(room === 'app' && /^app\/_(shared|server)\//.test(file)));
  return found ?? 'root';
}

/** What each room may import: everything that stands below it, and nothing else. */
const MAY_IMPORT: Readonly<Record<string, readonly string[]>> = {
  solver: [],
  'canvas/geometry': [],
  canvas: ['solver', 'canvas/geometry'],
  'canvas/store': ['solver', 'canvas/geometry', 'canvas'],
  components: [],
  'canvas/react': ['solver', 'canvas/geometry', 'canvas', 'canvas/store', 'components'],
  'app/_shared': ['canvas'],
  db: ['app/_shared', 'canvas'],
  'app/_server': ['app/_shared', 'canvas', 'db'],
  app: ['app/_server', 'app/_shared', 'canvas', 'canvas/geometry', 'canvas/store', 'canvas/react', 'components', 'db', 'solver'],
  scripts: ['db'],
  root: ['app/_server'],
};

describe('imports', () => {
  it('reads every form of import, and tells types from values', () => {
    const text = [
      "import 'a';",
      "import type { B } from 'b';",
      "import { type C } from 'c';",
      "export { d } from 'd';",
      "export type { E } from 'e';",
      "const f = async () => import('f');",
      "const not = 'import x from \"y\"';",
    ].join('\n');
    expect(importsOf('example.ts', text)).toEqual([
      { specifier: 'a', type: false },
      { specifier: 'b', type: true },
      { specifier: 'c', type: false },
      { specifier: 'd', type: false },
      { specifier: 'e', type: true },
      { specifier: 'f', type: false },
    ]);
  });

  it('finds cycles', () => {
    const edges = new Map([
      ['a', ['b']],
      ['b', ['c']],
      ['c', ['a', 'd']],
      ['d', []],
      ['e', ['e']],
    ]);
    expect(cycles(edges)).toEqual([['a', 'b', 'c'], ['e']]);
  });

  it('form no cycle between files, so that each file can be read, tested and loaded without what is above it', () => {
    expect(graph.size).toBeGreaterThan(200);
    expect(cycles(new Map([...graph].map(([file, { values }]) => [file, values])))).toEqual([]);
  });

  it('go one way between the rooms of the house, types too', () => {
    const wrong = [...graph].flatMap(([file, { values, types }]) => {
      const from = roomOf(file);
      return [...values, ...types].flatMap((target) => {
        const to = roomOf(target);
        return from === to || MAY_IMPORT[from]?.includes(to) === true ? [] : [`${file} (${from}) imports ${target} (${to})`];
      });
    });
    expect(wrong).toEqual([]);
    expect(cycles(new Map(Object.entries(MAY_IMPORT)))).toEqual([]);
  });

  it('leave no source file unused', () => {
    const imported = new Set(
      [...buildGraph(codeFiles)].flatMap(([, { values, types }]) => [...values, ...types]),
    );
    // What is started by the framework, by a tool or by a person is imported by nothing.
    const entry =
      /^app\/.*\/?(page|layout|loading|error|global-error|not-found|route|template|default)\.tsx?$|^(proxy|instrumentation)\.ts$|^scripts\/[^/]+$/;
    expect(sources.filter((file) => !entry.test(file) && !imported.has(file))).toEqual([]);
  });
});
