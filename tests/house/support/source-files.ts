import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';

/** The project's root folder, with a slash at its end in nothing that is made from it. */
export const ROOT = path.resolve(import.meta.dirname, '../../..');

/** A line of `.gitignore` as a test of one file or folder name. Only names, with `*` in them, are written there. */
function asPattern(line: string): RegExp {
  const name = line.replace(/^\/|\/$/g, '');
  if (name.includes('/')) throw new Error(`.gitignore has "${line}"; this reads names alone`);
  return new RegExp(`^${name.replace(/[.+?^${}()|[\]\\]/g, '\\$&').replace(/\*/g, '.*')}$`);
}

function ignoredNames(): readonly RegExp[] {
  const lines = readFileSync(path.join(ROOT, '.gitignore'), 'utf8').split('\n').map((line) => line.trim());
  return ['.git', ...lines.filter((line) => line !== '' && !line.startsWith('#'))].map(asPattern);
}

function walk(folder: string, ignored: readonly RegExp[]): string[] {
  return readdirSync(path.join(ROOT, folder), { withFileTypes: true }).flatMap((entry) => {
    if (ignored.some((pattern) => pattern.test(entry.name))) return [];
    const file = folder === '' ? entry.name : `${folder}/${entry.name}`;
    if (entry.isDirectory()) return walk(file, ignored);
    return entry.isFile() ? [file] : [];
  });
}

/** Every file that belongs to the project, by its path from the root: all but what `.gitignore` leaves out. */
export const allFiles: readonly string[] = walk('', ignoredNames()).sort();

const BINARY = /\.(woff2|png|ico|jpg)$/;

/** The files that hold text. */
export const textFiles: readonly string[] = allFiles.filter((file) => !BINARY.test(file));

/** The files that hold code, tests and scripts among them. */
export const codeFiles: readonly string[] = allFiles.filter((file) => /\.(ts|tsx|mts|mjs)$/.test(file));

export function read(file: string): string {
  return readFileSync(path.join(ROOT, file), 'utf8');
}

/** Where in the files a pattern stands, as `file:line: match`, so that a failing test shows what to mend. */
export function find(files: readonly string[], pattern: RegExp): readonly string[] {
  const everywhere = new RegExp(pattern.source, pattern.flags.includes('g') ? pattern.flags : `${pattern.flags}g`);
  return files.flatMap((file) =>
    read(file)
      .split('\n')
      .flatMap((line, index) => [...line.matchAll(everywhere)].map(([match]) => `${file}:${index + 1}: ${match}`)),
  );
}
