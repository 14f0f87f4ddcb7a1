import { type ChildProcess, spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdirSync, mkdtempSync, rmSync, symlinkSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { pathToFileURL } from 'node:url';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { markInUse, takeLock, usersOf } from '@/scripts/lib/lock.mjs';
import { root } from '@/scripts/lib/paths.mjs';

const lockModule = JSON.stringify(pathToFileURL(path.join(root, 'scripts/lib/lock.mjs')).href);
let dir: string;
const children: ChildProcess[] = [];

beforeEach(() => {
  dir = mkdtempSync(path.join(os.tmpdir(), 'lock-'));
});
afterEach(() => {
  for (const child of children.splice(0)) child.kill('SIGKILL');
  rmSync(dir, { recursive: true, force: true });
});

/** A process that does `statement` with the lock module, says so, and stays. */
async function other(statement: string): Promise<ChildProcess> {
  const script = `
    import { markInUse, takeLock } from ${lockModule};
    ${statement}
    console.log('done');
    setInterval(() => {}, 1000);`;
  const child = spawn(process.execPath, ['--input-type=module', '-e', script], { stdio: ['ignore', 'pipe', 'inherit'] });
  children.push(child);
  if (child.stdout === null) throw new Error('no output');
  await once(child.stdout, 'data');
  return child;
}

const takenBy = (folder: string): string =>
  `const taken = await takeLock('state', ${JSON.stringify(folder)}, { command: 'npm start', waitMs: 0 });
   if (!('lock' in taken)) throw new Error('not had');`;

describe('a lock', () => {
  it('is had by one process, and the next is told which', async () => {
    const holder = await other(takenBy(dir));
    const taken = await takeLock('state', dir, { command: 'npm start', waitMs: 0 });
    expect(taken).toEqual({ holder: { pid: holder.pid, command: 'npm start', stopping: false } });
  });

  it('is the same by another path, and not the same for another folder or purpose', async () => {
    await other(takenBy(dir));
    symlinkSync(dir, path.join(dir, 'link'));
    mkdirSync(path.join(dir, 'inner'));
    const wish = { command: 'npm start', waitMs: 0 };
    expect(await takeLock('state', path.join(dir, 'link'), wish)).toHaveProperty('holder');
    expect(await takeLock('state', path.join(dir, 'inner'), wish)).toHaveProperty('lock');
    expect(await takeLock('build', dir, wish)).toHaveProperty('lock');
  });

  it('is free again when its holder was killed hard, with nothing to clear away', async () => {
    const holder = await other(takenBy(dir));
    holder.kill('SIGKILL');
    await once(holder, 'exit');
    expect(await takeLock('state', dir, { command: 'npm start', waitMs: 0 })).toHaveProperty('lock');
  });

  it('is waited for, and the person is told once', async () => {
    const holder = await other(takenBy(dir));
    let told = 0;
    const wish = takeLock('state', dir, {
      command: 'npm start',
      waitMs: 60_000,
      onWait: () => {
        told += 1;
        holder.kill('SIGKILL');
      },
    });
    expect(await wish).toHaveProperty('lock');
    expect(told).toBe(1);
  });

  it('can be given back', async () => {
    const first = await takeLock('state', dir, { command: 'npm start', waitMs: 0 });
    if (!('lock' in first)) throw new Error('not had');
    await first.lock.release();
    expect(await takeLock('state', dir, { command: 'npm start', waitMs: 0 })).toHaveProperty('lock');
  });
});

describe('what several use at once', () => {
  it('names the others while they live', async () => {
    await markInUse('serving', dir, 'npm test');
    expect(usersOf('serving', dir)).toEqual([]);
    const user = await other(`await markInUse('serving', ${JSON.stringify(dir)}, 'npm start');`);
    expect(usersOf('serving', dir)).toEqual([user.pid]);
    expect(usersOf('serving', root)).not.toContain(user.pid);
    user.kill('SIGKILL');
    await once(user, 'exit');
    expect(usersOf('serving', dir)).toEqual([]);
  });
});
