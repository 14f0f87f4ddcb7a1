import net from 'node:net';
import { afterEach, describe, expect, it } from 'vitest';
import { freePort, portState, requirePort, takenPortSentence } from '@/scripts/lib/ports.mjs';

const open: net.Server[] = [];

function listen(host: string, port: number): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = net.createServer();
    server.once('error', reject);
    server.listen({ host, port }, () => {
      open.push(server);
      const address = server.address();
      resolve(typeof address === 'object' && address !== null ? address.port : 0);
    });
  });
}

afterEach(async () => {
  await Promise.all(open.splice(0).map((server) => new Promise((resolve) => server.close(resolve))));
});

describe('a port', () => {
  it('is said to be taken in one sentence that names it and the way to another', () => {
    expect(takenPortSentence(3000, 3001, 'npm start')).toBe(
      'Port 3000 is taken by another program; stop that one, or choose another port: PORT=3001 npm start',
    );
  });

  it('is found taken before anything else is done', async () => {
    const port = await listen('127.0.0.1', 0);
    expect(await portState('127.0.0.1', port)).toBe('taken');
    await expect(requirePort('127.0.0.1', port, 'npm start')).rejects.toThrow(`Port ${port} is taken`);
  });

  it('is found taken when another program has it for every address', async () => {
    const port = await listen('0.0.0.0', 0);
    await expect(requirePort('127.0.0.1', port, 'npm start')).rejects.toThrow(`Port ${port} is taken`);
  });

  it('is passed over when a free one is looked for, and so is one that proved taken', async () => {
    const port = await listen('127.0.0.1', 0);
    const next = await freePort('127.0.0.1', port);
    expect(next).not.toBe(port);
    expect(await portState('127.0.0.1', next)).toBe('free');
    expect(await freePort('127.0.0.1', next, new Set([next]))).not.toBe(next);
  });

  it('is asked for on an address that this machine has', async () => {
    // 192.0.2.0/24 is set aside for documentation (RFC 5737), so no machine has it.
    await expect(requirePort('192.0.2.1', 3000, 'npm start')).rejects.toThrow(/HOST=192\.0\.2\.1 is no address of this machine/);
  });
});
