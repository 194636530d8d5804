import type { FastifyRequest } from 'fastify';

/** A name, an IPv4 address or a bracketed IPv6 address, with a port or without (RFC 3986, section 3.2). */
const hostForm = /^(?:[\w.-]+|\[[\da-f:.]+\])(?::\d{1,5})?$/i;

/**
 * Scheme, host and port through which a request came, to be shown in commands that people copy into
 * a shell. A Host header that is more than a host is not shown; the address that took the
 * connection stands in.
 */
export function originOf(request: FastifyRequest): string {
  const { protocol, host } = request;
  if (hostForm.test(host ?? '')) return `${protocol}://${host}`;
  const { localAddress = '127.0.0.1', localPort, localFamily } = request.raw.socket;
  const address = localFamily === 'IPv6' ? `[${localAddress}]` : localAddress;
  return `${protocol}://${address}${localPort === undefined ? '' : `:${localPort}`}`;
}
