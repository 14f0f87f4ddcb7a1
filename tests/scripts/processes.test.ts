import { spawn } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { pathToFileURL } from 'node:url';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { root } from '@/scripts/lib/paths.mjs';
import { ended, launch, livePidIn, processAt, stopChild } from '@/scripts/lib/processes.mjs';
import { endsTooOften } from '@/scripts/lib/supervise.mjs';

const patience = 30_000;
let dir: string;
beforeEach(() => {
  dir = mkdtempSync(path.join(os.tmpdir(), 'processes-'));
});
afterEach(() => rmSync(dir, { recursive: true, force: true }));

async function until(holds: () => boolean): Promise<void> {
  const end = performance.now() + patience;
  while (!holds()) {
    if (performance.now() > end) throw new Error('It did not come to pass.');
    await wait(20);
  }
}

describe('a process number in a file', () => {
  const sleeper = { name: 'sleep', commandIncludes: '1000' };

  it('is believed while that program runs under it', async () => {
    const child = spawn('sleep', ['1000']);
    const file = path.join(dir, 'pid');
    writeFileSync(file, `${child.pid}\n`);
    await until(() => processAt(child.pid ?? 0)?.name === 'sleep');
    expect(livePidIn(file, sleeper)).toBe(child.pid);
    expect(livePidIn(file, { ...sleeper, commandIncludes: '--datadir=/elsewhere' })).toBeNull();
    child.kill('SIGKILL');
    await ended(child);
    expect(livePidIn(file, sleeper)).toBeNull();
  });

  it('is not believed when another program has the number now', () => {
    const file = path.join(dir, 'pid');
    writeFileSync(file, String(process.pid));
    expect(livePidIn(file, { name: 'mariadbd', commandIncludes: '' })).toBeNull();
  });

  it.each(['', 'abc', '0', '-1', '99999999'])('is none when it is %j', (text) => {
    const file = path.join(dir, 'pid');
    writeFileSync(file, text);
    expect(livePidIn(file, { name: '', commandIncludes: '' })).toBeNull();
  });

  it('is none in a file that is not there', () => {
    expect(livePidIn(path.join(dir, 'none'), { name: '', commandIncludes: '' })).toBeNull();
  });
});

describe('a program that was started', () => {
  const options = { cwd: '/', env: process.env, stdio: 'ignore' } as const;

  it('is stopped together with what it started itself', async () => {
    const inner = path.join(dir, 'inner');
    const child = launch('sh', ['-c', `sleep 1000 & echo $! > '${inner}'; wait`], options);
    const innerPid = (): number => Number.parseInt(readIf(inner), 10);
    await until(() => innerPid() > 0);
    await stopChild(child, 5000);
    await until(() => processAt(innerPid()) === null);
    expect(processAt(child.pid ?? 0)).toBeNull();
  });

  it('is killed when it will not end', async () => {
    const ready = path.join(dir, 'ready');
    const child = launch('sh', ['-c', `trap '' TERM; echo yes > '${ready}'; while :; do sleep 1; done`], options);
    await until(() => readIf(ready) !== '');
    await stopChild(child, 200);
    expect((await ended(child)).signal).toBe('SIGKILL');
  });

  it('ends with code 127 when there is no such program', async () => {
    expect((await ended(launch('no-such-program', [], options))).code).toBe(127);
  });

  it('dies with its starter, even one that is killed hard', async () => {
    const file = path.join(dir, 'pid');
    const script = `
      import { writeFileSync } from 'node:fs';
      import { launch } from ${JSON.stringify(pathToFileURL(path.join(root, 'scripts/lib/processes.mjs')).href)};
      const child = launch('sleep', ['1000'], { cwd: '/', env: process.env, stdio: 'ignore' });
      writeFileSync(${JSON.stringify(file)}, String(child.pid));
      setInterval(() => {}, 1000);`;
    const starter = spawn(process.execPath, ['--input-type=module', '-e', script], { stdio: 'inherit' });
    const pid = (): number => Number.parseInt(readIf(file), 10);
    await until(() => processAt(pid())?.name === 'sleep');
    starter.kill('SIGKILL');
    await until(() => processAt(pid()) === null);
  });
});

describe('a server that ends by itself', () => {
  it('is given up after the sixth time within a minute, and not for a fault now and then', () => {
    expect(endsTooOften([0, 1000, 2000, 3000, 4000])).toBe(false);
    expect(endsTooOften([0, 1000, 2000, 3000, 4000, 5000])).toBe(true);
    expect(endsTooOften([0, 20_000, 40_000, 60_000, 80_000, 100_000, 120_000])).toBe(false);
  });
});

function readIf(file: string): string {
  try {
    return readFileSync(file, 'utf8');
  } catch {
    return '';
  }
}
