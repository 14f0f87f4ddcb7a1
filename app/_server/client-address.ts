import 'server-only';
import { isIPv4, isIPv6 } from 'node:net';
import { env } from './env';

/** Set from the socket by `instrumentation.ts` on every request, over whatever a client sent under that name. */
export const PEER_HEADER = 'x-ohmstead-peer';

/**
 * The address that limits count by. `x-forwarded-for` is what any client likes to write, so it is read only as far as
 * TRUST_PROXY says that our own proxies wrote it: with 1, its last entry; with 2, the one before, and so on.
 * An IPv6 client has a whole /64 to itself, so that is what is counted.
 */
export function clientAddress(headers: { get(name: string): string | null }): string {
  const hops = env().trustedProxies;
  if (hops > 0) {
    const forwarded = (headers.get('x-forwarded-for') ?? '').split(',').map((entry) => entry.trim());
    const entry = forwarded.at(-hops);
    if (entry !== undefined && (isIPv4(entry) || isIPv6(entry))) return canonical(entry);
  }
  const peer = headers.get(PEER_HEADER) ?? '';
  return isIPv4(peer) || isIPv6(peer) ? canonical(peer) : 'unknown';
}

function canonical(address: string): string {
  if (isIPv4(address)) return address;
  const mapped = /^::ffff:(\d+\.\d+\.\d+\.\d+)$/i.exec(address)?.[1];
  if (mapped !== undefined) return mapped;
  const [head = '', tail] = address.toLowerCase().split('%')[0]?.split('::') ?? [];
  const before = head === '' ? [] : head.split(':');
  const after = tail === undefined || tail === '' ? [] : tail.split(':');
  const zeros = Array.from({ length: Math.max(0, 8 - before.length - after.length) }, () => '0');
  const groups = [...before, ...(tail === undefined ? [] : zeros), ...after];
  return `${groups.slice(0, 4).map((group) => group.replace(/^0+(?=.)/, '')).join(':')}::/64`;
}
