import { describe, expect, it } from 'vitest';
import { find, read, textFiles } from './support/source-files';

/*
 * The project speaks of itself alone, and would read the same on any machine. The patterns below are written so that
 * none finds itself.
 */

/** The lock file is npm's: hashes of packages, and names of packages that are not ours to choose. */
const ours = textFiles.filter((file) => file !== 'package-lock.json');

/** The licences of the fonts are others' words, to be left as they are. */
const written = ours.filter((file) => !/^fonts\/.*LICENSE\.txt$/.test(file));

describe('what the files say', () => {
  it('is read at all', () => {
    expect(written.length).toBeGreaterThan(300);
    expect(find(['package.json'], /"name": "[a-z]+"/)).toEqual(['package.json:2: "name": "ohmstead"']);
  });

  it('names no place on somebody’s machine', () => {
    const machine = [
      /(?<![\w.@-])\/(?:work|root|home|Users)\/[\w.-]+/,
      /\b[A-Z]:\\\\?[A-Za-z]/,
      /(?<!\w)\.\.\/share[d]\b/,
      // A temporary folder is asked of the system, which may have it elsewhere.
      /(?<![\w.@-])\/tm[p]\//,
    ];
    expect(machine.flatMap((pattern) => find(written, pattern))).toEqual([]);
  });

  it('names no host of a package registry, the lock file included, so that it installs from whichever is configured', () => {
    const hosts = [/\b[\w-]*regist[r]y\.[\w-]+\.\w+/i, /\bnpm[j]s\.(?:org|com)/i, /"resolve[d]":/, /_auth[T]oken/];
    expect(hosts.flatMap((pattern) => find([...ours, 'package-lock.json'], pattern))).toEqual([]);
  });

  it('speaks of the project, not of how the work on it was given out', () => {
    const work = [
      /\bissu[e]s?\s*(?:no\.?|number)?\s*#?\d+/i,
      /\bdesig[n] (?:doc|brief|spec)/i,
      /\b(?:produc[t]|architectur[e]|loo[k]|styl[e]|stac[k]|canva[s]|spee[d]|starter[s]|publishe[d]|practic[e])\.md\b/i,
      /\b(?:as|per|in|see) the (?:tas[k]|brie[f]|promp[t])\b/i,
      /\blanguag[e] model|\bchat ?bo[t]\b|\bA[I] (?:assistant|agent)/i,
      /\b(?:TOD[O]|FIXM[E]|XX[X]|HAC[K])\b/,
    ];
    expect(work.flatMap((pattern) => find(written, pattern))).toEqual([]);
  });

  it('makes no exception from the compiler or the linter', () => {
    const exceptions = [/@ts-(?:ignor[e]|nochec[k]|expect-erro[r])/, /eslint-disabl[e]/, /\bas an[y]\b/];
    expect(exceptions.flatMap((pattern) => find(written, pattern))).toEqual([]);
  });

  it('skips no test and runs none alone', () => {
    const tests = written.filter((file) => /^tests\/.*\.test\.tsx?$/.test(file));
    expect(tests.length).toBeGreaterThan(60);
    expect(find(tests, /\b(?:it|test|describe)\.(?:ski[p]|onl[y]|tod[o]|fixm[e]|fail[s])\b/)).toEqual([]);
  });

  it('asks no other host for anything: the only addresses are this machine’s, names of standards, and links in prose', () => {
    const code = written.filter((file) => /\.(?:ts|tsx|mts|mjs|css|json|svg|html)$/.test(file) && !file.startsWith('tests/'));
    expect(code.length).toBeGreaterThan(200);
    const allowed = [
      /:\/\/(?:localhost|127\.0\.0\.1|\[::1\])/,
      // Put together at run time out of what this machine is called.
      /:\/\/\$\{/,
      // A namespace is a name; nothing is fetched from it.
      /:\/\/www\.w3\.org\/(?:2000\/svg|1999\/xlink|1999\/xhtml)$/,
      // The scheme alone, to be compared with.
      /^https?:\/\/$/,
    ];
    const addresses = code.flatMap((file) =>
      // What a comment names for the reader is not asked for.
      [...withoutComments(file, read(file)).matchAll(/\b(?:https?|wss?):\/\/[^\s"'`)<>\\]*/g)].map(([address]) => ({ file, address })),
    );
    expect(addresses.length).toBeGreaterThan(0);
    expect(addresses.filter(({ address }) => !allowed.some((pattern) => pattern.test(address)))).toEqual([]);
    // An address may also leave its scheme to the page.
    expect(find(code, /(?:src|href|url)\s*[=(]\s*["'`{]*\/\/\w/)).toEqual([]);
  });

  it('has British spelling in what people read', () => {
    const prose = ['README.md', 'DEVELOPERS.md', '.env.example', 'fonts/README.md'];
    expect(find(prose, /\b(?:colo[r]|behavio[r]|center|analyz[e]d?|organiz[e]d?|gra[y]|licens[e] file)s?\b/i)).toEqual([]);
  });
});

/** The text without block comments and without line comments; an address's own `//` is no comment. */
function withoutComments(file: string, text: string): string {
  if (/\.(?:json|svg|html)$/.test(file)) return text;
  return text.replace(/\/\*[\s\S]*?\*\//g, '').replace(/(^|\s)\/\/.*$/gm, '$1');
}
