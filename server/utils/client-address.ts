import type { H3Event } from 'h3'

/** The address of the client: the socket's, or, behind a configured proxy only, the last address that the proxy added. */
export function clientAddress(event: H3Event): string {
  const socket = event.node.req.socket.remoteAddress ?? 'unknown'
  if (!useSettings().trustedProxies.includes(socket)) return socket
  const forwarded = (getRequestHeader(event, 'x-forwarded-for') ?? '').split(',').map(part => part.trim()).filter(Boolean)
  return forwarded.at(-1) ?? socket
}
