import { readdir, readFile } from 'node:fs/promises';
import path from 'node:path';
import { pathToFileURL } from 'node:url';
import { declarationOf, type Declaration } from '@/app/_server/declared';

const ROOT = path.resolve(import.meta.dirname, '../../..');
const SOURCES = ['app', 'canvas', 'components', 'db', 'solver'];

export type SourceFile = { readonly file: string; readonly text: string };
export type Door = {
  readonly file: string;
  readonly name: string;
  readonly value: unknown;
  readonly declaration: Declaration | undefined;
};

/** Every TypeScript file of the application, by its path from the root. */
export async function sourceFiles(): Promise<readonly SourceFile[]> {
  const lists = await Promise.all(
    SOURCES.map(async (folder) => {
      const entries = await readdir(path.join(ROOT, folder), { recursive: true });
      return entries.filter((entry) => /\.tsx?$/.test(entry)).map((entry) => path.join(folder, entry));
    }),
  );
  const files = lists.flat().toSorted();
  return Promise.all(files.map(async (file) => ({ file, text: await readFile(path.join(ROOT, file), 'utf8') })));
}

/** Whether the file's directive makes each of its exports callable by any client. */
export function isActionFile({ text }: SourceFile): boolean {
  return /^(?:\s|\/\*[\s\S]*?\*\/|\/\/[^\n]*\n)*['"]use server['"]/.test(text);
}

export function isRouteFile({ file }: SourceFile): boolean {
  return !file.startsWith('app/_') && /^app\/(?:.*\/)?route\.tsx?$/.test(file);
}

/** What a file exports, with the declaration that its wrapper left. */
export async function doorsOf({ file }: SourceFile): Promise<readonly Door[]> {
  const exported: Record<string, unknown> = await import(/* @vite-ignore */ pathToFileURL(path.join(ROOT, file)).href);
  return Object.entries(exported).map(([name, value]) => ({ file, name, value, declaration: declarationOf(value) }));
}
