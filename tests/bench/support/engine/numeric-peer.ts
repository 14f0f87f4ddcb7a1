import { spawn } from 'node:child_process';
import path from 'node:path';
import readline from 'node:readline';
import type { Equations } from './networks';

/** Numpy and scipy in a process of their own; on one thread, and with memory that is not given back in between. */
export interface NumericPeer {
  readonly versions: string;
  load(equations: Equations): Promise<void>;
  run(request: object): Promise<{ readonly ms: number; readonly check: number }>;
  close(): void;
}

/** The pythons that may have them: the one on the path, and Debian's. */
const PYTHONS = ['python3', '/usr/bin/python3'];

const SCRIPT = path.join(import.meta.dirname, 'numeric_peer.py');

const ENVIRONMENT = {
  OPENBLAS_NUM_THREADS: '1',
  OMP_NUM_THREADS: '1',
  MALLOC_TRIM_THRESHOLD_: '1073741824',
  MALLOC_MMAP_THRESHOLD_: '1073741824',
};

/** The peer; undefined where no python3 has both. */
export async function numericPeer(): Promise<NumericPeer | undefined> {
  for (const python of PYTHONS) {
    const peer = await startedWith(python);
    if (peer !== undefined) return peer;
  }
  return undefined;
}

async function startedWith(python: string): Promise<NumericPeer | undefined> {
  const child = spawn(python, [SCRIPT], { stdio: ['pipe', 'pipe', 'ignore'], env: { ...process.env, ...ENVIRONMENT } });
  const lines = readline.createInterface({ input: child.stdout })[Symbol.asyncIterator]();
  const answer = async (): Promise<Readonly<Record<string, unknown>> | undefined> => {
    const { value, done } = await lines.next();
    return done === true ? undefined : (JSON.parse(value) as Readonly<Record<string, unknown>>);
  };
  const failed = new Promise<undefined>((resolve) => child.once('error', () => resolve(undefined)));
  const versions = await Promise.race([answer(), failed]);
  if (versions === undefined) return undefined;
  const ask = async (request: object): Promise<Readonly<Record<string, unknown>>> => {
    child.stdin.write(`${JSON.stringify(request)}\n`);
    const found = await answer();
    if (found === undefined) throw new Error('numpy and scipy ended in the middle of their work');
    return found;
  };
  return {
    versions: `numpy ${String(versions['numpy'])}, scipy ${String(versions['scipy'])}`,
    load: async (equations) => void (await ask({ do: 'load', equations })),
    run: async (request) => {
      const { ms, check } = await ask(request);
      return { ms: Number(ms), check: Number(check) };
    },
    close: () => child.stdin.end(),
  };
}
