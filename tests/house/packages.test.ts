import { existsSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { allFiles, codeFiles, read, ROOT } from './support/source-files';
import { importsOf } from './support/import-graph';

const manifest = z
  .object({
    name: z.string(),
    version: z.string(),
    dependencies: z.record(z.string(), z.string()),
    devDependencies: z.record(z.string(), z.string()),
    scripts: z.record(z.string(), z.string()),
  })
  .parse(JSON.parse(read('package.json')));

const lock = z
  .object({ packages: z.record(z.string(), z.object({ version: z.string().optional(), integrity: z.string().optional(), inBundle: z.boolean().optional() })) })
  .parse(JSON.parse(read('package-lock.json')));

describe('packages', () => {
  const wanted = Object.entries({ ...manifest.dependencies, ...manifest.devDependencies });

  it('are wanted in one exact version each, the one that is locked', () => {
    expect(wanted.length).toBeGreaterThan(30);
    for (const [name, version] of wanted) {
      expect(version, name).toMatch(/^\d+\.\d+\.\d+(-[\w.]+)?$/);
      expect(lock.packages[`node_modules/${name}`]?.version, name).toBe(version);
    }
  });

  it('are all locked with the hash of what they are', () => {
    const without = Object.entries(lock.packages).filter(
      // What comes inside another package's archive is covered by that one's hash.
      ([place, { integrity, inBundle }]) => place !== '' && integrity === undefined && inBundle !== true,
    );
    expect(without.map(([place]) => place)).toEqual([]);
  });

  it('are declared where the code imports them, those of the application as its own and not as tools', () => {
    const builtIn = /^node:|^server-only$/;
    const nameOf = (specifier: string) => specifier.split('/').slice(0, specifier.startsWith('@') ? 2 : 1).join('/');
    const missing = codeFiles.flatMap((file) => {
      const isTool = /^(tests|scripts)\/|\.config\.(mjs|mts|ts)$/.test(file);
      const declared = isTool ? { ...manifest.dependencies, ...manifest.devDependencies } : manifest.dependencies;
      return importsOf(file, read(file))
        .map(({ specifier }) => specifier)
        .filter((specifier) => !/^[.@]\/|^\.\.\/|^\.{1,2}$/.test(specifier) && !builtIn.test(specifier))
        .filter((specifier) => !Object.hasOwn(declared, nameOf(specifier)))
        .map((specifier) => `${file}: ${specifier}`);
    });
    expect(missing).toEqual([]);
  });
});

describe('fonts', () => {
  const files = allFiles.filter((file) => file.startsWith('fonts/'));
  const fonts = files.filter((file) => /\.(woff2?|ttf|otf)$/.test(file));

  it('each have the licence of their family beside them', () => {
    expect(fonts.length).toBeGreaterThan(0);
    const licences = files.filter((file) => file.endsWith('-LICENSE.txt'));
    for (const licence of licences) {
      expect(read(licence), licence).toContain('SIL OPEN FONT LICENSE Version 1.1');
      expect(read(licence), licence).toMatch(/^Copyright/);
    }
    const families = licences.map((file) => file.slice(0, -'LICENSE.txt'.length));
    expect(fonts.filter((font) => !families.some((family) => font.startsWith(family)))).toEqual([]);
    expect(families.filter((family) => !fonts.some((font) => font.startsWith(family)))).toEqual([]);
  });

  it('are all listed in their own README, and in use', () => {
    const readme = read('fonts/README.md');
    const used = read('app/fonts.ts');
    for (const font of fonts) {
      const name = font.slice('fonts/'.length);
      const family = name.replace(/-(?:latin-ext|latin|greek|symbols)\.woff2$/, '');
      expect(readme, name).toContain(family);
      expect(used, name).toContain(name);
    }
  });

  it('are the only fonts: none comes out of a package or from a host', () => {
    expect(allFiles.filter((file) => /\.(woff2?|ttf|otf|eot)$/.test(file) && !file.startsWith('fonts/'))).toEqual([]);
    expect(existsSync(path.join(ROOT, 'app/fonts.ts'))).toBe(true);
    expect(read('app/fonts.ts')).not.toContain('next/font/google');
  });
});
