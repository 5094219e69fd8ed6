import { createServer, type AddressInfo } from 'node:net'
import { afterEach, describe, expect, it } from 'vitest'
import { assertPortsFree, findFreePorts, probePort, readServicePorts } from '../../../scripts/lib/ports.mjs'

describe('the ports of the demo shop', () => {
  it('follow PORT one by one', () => {
    expect(readServicePorts({ PORT: '4100' })).toEqual({ app: 4100, stripeFake: 4101, smtp: 4102, mailWeb: 4103, postgres: 4104 })
  })

  it('begin at 3000 when nothing is set', () => {
    expect(readServicePorts({ PORT: '' }).app).toBe(3000)
  })

  it('take their own settings', () => {
    expect(readServicePorts({ WIREWRIGHT_POSTGRES_PORT: '5999', WIREWRIGHT_SMTP_PORT: '2525' })).toMatchObject({ app: 3000, smtp: 2525, mailWeb: 3003, postgres: 5999 })
  })

  it.each(['0', '-1', '80.5', '65536', 'abc', '3000 ', '0x10'])('refuse PORT=%s', (text) => {
    expect(() => readServicePorts({ PORT: text })).toThrow(/is not a port/)
  })

  it('refuse a PORT whose followers would lie past the last one', () => {
    expect(() => readServicePorts({ PORT: '65533' })).toThrow(/65536 is not a port/)
  })

  it('refuse one port for two services, and name both', () => {
    expect(() => readServicePorts({ WIREWRIGHT_MAIL_PORT: '3001' })).toThrow(/the Stripe fake and for the mail inbox page/)
  })
})

describe('a port in use', () => {
  const server = createServer()
  afterEach(() => new Promise(resolve => server.close(resolve)))

  it.each(['127.0.0.1', '0.0.0.0', '::'])('is found when another program listens on %s, and named with its setting', async (host) => {
    const ports = await findFreePorts()
    await new Promise<void>(resolve => server.listen(ports.mailWeb, host, resolve))
    expect((server.address() as AddressInfo).port).toBe(ports.mailWeb)
    expect(await probePort(ports.mailWeb)).toBe('taken')
    await expect(assertPortsFree(ports)).rejects.toThrow(new RegExp(`Port ${ports.mailWeb}, wanted for the mail inbox page, is taken.*WIREWRIGHT_MAIL_PORT`))
  })
})

it('free ports are five different ones that can be used', async () => {
  const ports = await findFreePorts()
  expect(new Set(Object.values(ports)).size).toBe(5)
  await expect(assertPortsFree(ports)).resolves.toBeUndefined()
})
