import { mkdirSync, mkdtempSync, rmSync, utimesSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { buildEnvironment } from '@/scripts/lib/build.mjs';
import { layoutOf } from '@/scripts/lib/paths.mjs';
import { hashOf, readStamp } from '@/scripts/lib/stamps.mjs';

describe('the hash of sources', () => {
  let dir: string;
  beforeEach(() => {
    dir = mkdtempSync(path.join(os.tmpdir(), 'stamps-'));
    mkdirSync(path.join(dir, 'app/deep'), { recursive: true });
    writeFileSync(path.join(dir, 'app/a.ts'), 'one');
    writeFileSync(path.join(dir, 'app/deep/b.ts'), 'two');
    writeFileSync(path.join(dir, 'config'), 'three');
  });
  afterEach(() => rmSync(dir, { recursive: true, force: true }));

  const hash = (): string => hashOf(dir, ['config', 'app', 'absent']);

  it('does not change with the time at which a file was written, nor the order of the entries', () => {
    const before = hash();
    utimesSync(path.join(dir, 'config'), 1, 1);
    expect(hash()).toBe(before);
    expect(hashOf(dir, ['app', 'config'])).toBe(before);
  });

  it('changes with a content, a name, a new and a lost file', () => {
    const hashes = [hash()];
    writeFileSync(path.join(dir, 'app/deep/b.ts'), 'twO');
    hashes.push(hash());
    writeFileSync(path.join(dir, 'app/deep/c.ts'), '');
    hashes.push(hash());
    rmSync(path.join(dir, 'app/a.ts'));
    hashes.push(hash());
    writeFileSync(path.join(dir, 'app/z.ts'), 'one');
    hashes.push(hash());
    expect(new Set(hashes).size).toBe(hashes.length);
  });

  it('tells apart what moves from one file into the next', () => {
    writeFileSync(path.join(dir, 'app/a.ts'), 'ab');
    writeFileSync(path.join(dir, 'app/deep/b.ts'), 'c');
    const before = hash();
    writeFileSync(path.join(dir, 'app/a.ts'), 'a');
    writeFileSync(path.join(dir, 'app/deep/b.ts'), 'bc');
    expect(hash()).not.toBe(before);
  });

  it('leaves out what it is told to', () => {
    const leaveOut = (file: string): boolean => file === 'app/deep';
    const before = hashOf(dir, ['app'], leaveOut);
    writeFileSync(path.join(dir, 'app/deep/b.ts'), 'other');
    expect(hashOf(dir, ['app'], leaveOut)).toBe(before);
  });

  it('reads a stamp without its line end, and an absent one as none', () => {
    writeFileSync(path.join(dir, 'stamp'), 'abc\n');
    expect(readStamp(path.join(dir, 'stamp'))).toBe('abc');
    expect(readStamp(path.join(dir, 'other'))).toBeNull();
  });
});

describe('a build', () => {
  it('is not shown the database or a secret, and is always one for production', () => {
    const env = buildEnvironment({ PATH: '/bin', NODE_ENV: 'test', DATABASE_URL: 'x', NEXTAUTH_SECRET: 'y', NEXTAUTH_URL: 'z' });
    expect(env).toEqual({ PATH: '/bin', NODE_ENV: 'production', NEXT_TELEMETRY_DISABLED: '1' });
  });
});

describe('the state folder', () => {
  it('holds its socket', () => {
    expect(layoutOf('/srv/ohmstead/.local', '/tmp').socket).toBe('/srv/ohmstead/.local/db.sock');
  });

  it('has it elsewhere when the kernel would not take so long a name, one for each folder', () => {
    const longest = `/${'d'.repeat(98)}`;
    expect(layoutOf(longest, '/tmp').socket).toBe(`${longest}/db.sock`);
    expect(Buffer.byteLength(layoutOf(longest, '/tmp').socket)).toBe(107);
    const one = layoutOf(`${longest}d`, '/tmp').socket;
    const other = layoutOf(`${longest}e`, '/tmp').socket;
    expect(one).toMatch(/^\/tmp\/ohmstead-[0-9a-f]{24}\.sock$/);
    expect(other).not.toBe(one);
  });

  it('counts bytes and not letters', () => {
    expect(layoutOf(`/${'ü'.repeat(60)}`, '/tmp').socket).toMatch(/^\/tmp\//);
  });
});
