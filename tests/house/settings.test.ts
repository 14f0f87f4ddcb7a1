import { describe, expect, it } from 'vitest';
import { parseEnv } from '../../scripts/lib/settings.mjs';
import { codeFiles, find, read } from './support/source-files';

const example = read('.env.example');
const code = codeFiles.filter((file) => !file.startsWith('tests/'));

/** Variables that are not a person's to set: who sets each. */
const SET_BY_OTHERS: Readonly<Record<string, string>> = {
  NODE_ENV: 'the command: production for npm start, development for npm run dev',
  NEXT_RUNTIME: 'the framework',
  NEXT_PHASE: 'the framework',
  PATH: 'the system',
  BASE_URL: 'npm test and npm run bench, for the browser tests',
  PLAYWRIGHT_JSON_OUTPUT_NAME: 'npm test, for its report',
};

/** Names read off an environment, by any of the names that the code gives one; npm's own are in small letters. */
function readVariables(): ReadonlySet<string> {
  const reads = find(code, /(?:\benv|\benvironment|\bvariables)(?:\.|\[['"])[A-Z][A-Z0-9_]+/)
    // What is only written, for a process that is started, is not read.
    .map((place) => /[A-Z][A-Z0-9_]+$/.exec(place)?.[0] ?? '');
  // The application's own part is read by one schema, whose keys are the names.
  const schema = /const schema = z\.object\(\{([\s\S]*?)\n\}\);/.exec(read('app/_server/env.ts'))?.[1] ?? '';
  const keys = [...schema.matchAll(/^ {2}([A-Z][A-Z0-9_]+):/gm)].map(([, name]) => name ?? '');
  if (keys.length === 0) throw new Error('the schema in app/_server/env.ts was not found');
  return new Set([...reads, ...keys]);
}

describe('.env.example', () => {
  const offered = Object.keys(parseEnv(example, '.env.example'));

  it('offers every variable that the code reads, and no other', () => {
    const wanted = [...readVariables()].filter((name) => !Object.hasOwn(SET_BY_OTHERS, name));
    expect(wanted.length).toBeGreaterThan(5);
    expect([...offered].sort()).toEqual(wanted.sort());
  });

  it('lists no variable as set by others that nobody reads', () => {
    const all = new Set([...readVariables(), ...find(codeFiles, /process\.env\.[A-Z_]+/).map((place) => place.split('.').at(-1) ?? '')]);
    expect(Object.keys(SET_BY_OTHERS).filter((name) => !all.has(name))).toEqual([]);
  });

  it('says above each what it does, and sets none', () => {
    for (const name of offered) {
      expect(example).toMatch(new RegExp(`# [^\\n]{20,}\\n${name}=\\n`));
    }
    expect(Object.values(parseEnv(example)).filter((value) => value !== '')).toEqual([]);
  });

  it('is the place where a person is sent for the settings', () => {
    expect(read('README.md')).toContain('.env.example');
  });
});
