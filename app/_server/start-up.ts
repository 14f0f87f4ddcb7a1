import 'server-only';
import { subscribe } from 'node:diagnostics_channel';
import { IncomingMessage } from 'node:http';
import { PEER_HEADER } from './client-address';
import { ConfigurationError, env } from './env';

/** Ends the process on a wrong configuration, with what is wrong: better now than at somebody's first request. */
export function checkConfiguration(): void {
  try {
    env();
  } catch (error) {
    if (!(error instanceof ConfigurationError)) throw error;
    process.stderr.write(`${error.message}\n`);
    process.exit(1);
  }
}

/**
 * Writes each request's peer, as the socket has it, into a header that the application can read. The framework shows
 * no socket, and by itself believes the `x-forwarded-for` that a client sends.
 */
export function markPeers(): void {
  subscribe('http.server.request.start', (message) => {
    if (typeof message !== 'object' || message === null || !('request' in message)) return;
    const { request } = message;
    if (request instanceof IncomingMessage) request.headers[PEER_HEADER] = request.socket.remoteAddress ?? '';
  });
}
