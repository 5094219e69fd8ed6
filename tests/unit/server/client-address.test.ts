import { afterEach, beforeAll, describe, expect, it, vi } from 'vitest'
import { clientAddress, networkOf } from '#server/utils/client-address'

type Asked = Parameters<typeof clientAddress>[0]
const ask = (remoteAddress: string | undefined, forwarded?: string) => clientAddress({ node: { req: { socket: { remoteAddress }, headers: { 'x-forwarded-for': forwarded } } } } as unknown as Asked)
const proxies: string[] = []

beforeAll(() => {
  vi.stubGlobal('useSettings', () => ({ trustedProxies: proxies }))
  vi.stubGlobal('getRequestHeader', (event: Asked, name: string) => event.node.req.headers[name])
})
afterEach(() => {
  proxies.length = 0
})

describe('the address that limits are counted by (S-27)', () => {
  it('is the socket\'s; a forged header changes nothing', () => {
    expect(ask('192.0.2.7', '203.0.113.9')).toBe('192.0.2.7')
    expect(ask('::ffff:192.0.2.7', '203.0.113.9')).toBe('192.0.2.7')
    expect(ask(undefined, '203.0.113.9')).toBe('unknown')
  })

  it('is the last one a configured proxy added, whatever the client put before it', () => {
    proxies.push('192.0.2.1')
    expect(ask('192.0.2.1', '198.51.100.1, 203.0.113.9')).toBe('203.0.113.9')
    expect(ask('::ffff:192.0.2.1', '203.0.113.9')).toBe('203.0.113.9')
    expect(ask('192.0.2.1')).toBe('192.0.2.1')
    expect(ask('192.0.2.2', '203.0.113.9')).toBe('192.0.2.2')
  })

  it('is one for a whole network of IPv6, so that changing the last half escapes no limit', () => {
    expect(ask('2001:db8:0:1:aaaa::1')).toBe(ask('2001:0DB8:0000:0001:bbbb:1:2:3'))
    expect(ask('2001:db8:0:1::1')).not.toBe(ask('2001:db8:0:2::1'))
    expect([networkOf('2001:db8::1'), networkOf('::1'), networkOf('fe80::1%eth0'), networkOf('no address')]).toEqual(['2001:db8:0:0::/64', '0:0:0:0::/64', 'fe80:0:0:0::/64', 'no address'])
  })
})
