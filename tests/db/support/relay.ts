import net from 'node:net';

/** A relay in front of a database, which can be cut off and restored as if the database were killed and started. */
export class Relay {
  #server: net.Server | undefined;
  readonly #sockets = new Set<net.Socket>();
  #frozen = false;
  #port = 0;

  constructor(
    private readonly host: string,
    private readonly target: number,
  ) {}

  get port(): number {
    return this.#port;
  }

  async start(): Promise<void> {
    this.#frozen = false;
    const server = net.createServer((near) => {
      if (this.#frozen) return void this.#keep(near);
      const far = net.connect(this.target, this.host);
      this.#keep(near, far);
      near.pipe(far).pipe(near);
    });
    await new Promise<void>((resolve, reject) => {
      server.once('error', reject);
      server.listen(this.#port, '127.0.0.1', resolve);
    });
    const address = server.address();
    if (typeof address === 'object' && address) this.#port = address.port;
    this.#server = server;
  }

  /** Cuts every connection and takes no more, as a killed server does. */
  async kill(): Promise<void> {
    const closed = new Promise<void>((resolve) => this.#server?.close(() => resolve()) ?? resolve());
    for (const socket of this.#sockets) socket.destroy();
    this.#sockets.clear();
    await closed;
  }

  /** Leaves every connection open and says nothing more, as a server that is stopped does. */
  freeze(): void {
    this.#frozen = true;
    for (const socket of this.#sockets) socket.unpipe();
  }

  #keep(...sockets: readonly net.Socket[]): void {
    for (const socket of sockets) {
      this.#sockets.add(socket);
      socket.on('error', () => socket.destroy());
      socket.on('close', () => {
        this.#sockets.delete(socket);
        for (const other of sockets) other.destroy();
      });
    }
  }
}
