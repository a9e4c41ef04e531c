import { networkInterfaces } from 'node:os';

/** By which names and port this server is called. */
export interface HostRule {
  /** Whether a Host header is one of ours. */
  knows: (host: string | undefined) => boolean;
  /** Origins for sockets, for browsers that do not count them as 'self'. */
  socketOrigins: () => string[];
}

/** Addresses by which other machines on the network reach this one (IPv4, not loopback). */
export const networkAddresses = (): string[] =>
  Object.values(networkInterfaces()).flatMap((list) =>
    (list ?? []).filter((one) => one.family === 'IPv4' && !one.internal).map((one) => one.address),
  );

/** Addresses of this machine, as they stand in a URL. */
const ownAddresses = (): string[] =>
  Object.values(networkInterfaces()).flatMap((list) =>
    (list ?? []).map(({ address, family }) => (family === 'IPv6' ? `[${address.split('%')[0]}]` : address)),
  );

/**
 * Names that a server on `port` answers to: this machine's addresses and `localhost`, and the public address if told.
 * @param port asked for late: a port of 0 is known only once the server listens
 */
export function hostRule(port: () => number, publicUrl: string | null): HostRule {
  const published = publicUrl ? new URL(publicUrl).host : null;
  const names = () => new Set(['localhost', '127.0.0.1', '[::1]', ...ownAddresses()]);
  return {
    knows: (host) => {
      if (!host) return false;
      const asked = host.toLowerCase();
      if (asked === published) return true;
      const at = asked.lastIndexOf(':');
      const hasPort = at > asked.lastIndexOf(']');
      const name = hasPort ? asked.slice(0, at) : asked;
      const given = hasPort ? Number(asked.slice(at + 1)) : 80;
      return given === port() && names().has(name);
    },
    socketOrigins: () => (publicUrl ? [publicUrl.replace(/^http/, 'ws').replace(/\/$/, '')] : []),
  };
}

/** Whether an Origin header names a page of ours. Missing is refused: every browser sends it with a write. */
export function originAllowed(hosts: HostRule, origin: string | undefined): boolean {
  if (!origin || origin === 'null') return false;
  try {
    const { protocol, host, origin: whole } = new URL(origin);
    return whole === origin && ['http:', 'https:'].includes(protocol) && hosts.knows(host);
  } catch {
    return false;
  }
}
