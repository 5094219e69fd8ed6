import { isIPv4, isIPv6 } from 'node:net'
import type { H3Event } from 'h3'

/**
 * The address of the client, for counting: the socket's, or, behind a configured proxy only, the last address that the proxy
 * added. Of IPv6 it is the network of 64 bits, since one customer of a provider has all addresses of it.
 */
export function clientAddress(event: H3Event): string {
  const socket = withoutMapping(event.node.req.socket.remoteAddress ?? 'unknown')
  if (!useSettings().trustedProxies.map(withoutMapping).includes(socket)) return networkOf(socket)
  const forwarded = (getRequestHeader(event, 'x-forwarded-for') ?? '').split(',').map(part => part.trim()).filter(Boolean)
  return networkOf(withoutMapping(forwarded.at(-1) ?? socket))
}

/** IPv4 as a socket for both kinds tells it (`::ffff:192.0.2.1`), plain. */
function withoutMapping(address: string): string {
  const plain = address.replace(/^::ffff:(?=\d+\.)/i, '')
  return isIPv4(plain) ? plain : address
}

/** The first four groups of an IPv6 address, such as `2001:db8:0:1::/64`; anything else as it is. */
export function networkOf(address: string): string {
  const [plain = ''] = address.split('%')
  if (!isIPv6(plain) || plain.includes('.')) return address
  const [before = '', after] = plain.toLowerCase().split('::')
  const groups = (text: string | undefined) => text ? text.split(':') : []
  const [first, last] = [groups(before), groups(after)]
  const all = after === undefined ? first : [...first, ...Array<string>(8 - first.length - last.length).fill('0'), ...last]
  return `${all.slice(0, 4).map(group => group.replace(/^0+(?=.)/, '')).join(':')}::/64`
}
