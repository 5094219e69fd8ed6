import { afterAll, beforeAll, expect, it, vi } from 'vitest'
import { log } from '#server/utils/log'

const before = console.error
const lines: string[] = []
const key = 'Zk3vYt0qJ8mPz1xW5rB7nC2dF4gH6jK9lQ0sT1uV3wY'

beforeAll(async () => {
  vi.stubGlobal('log', log)
  vi.stubGlobal('defineNitroPlugin', (plugin: () => void) => plugin())
  vi.spyOn(process.stdout, 'write').mockImplementation((text) => {
    lines.push(String(text))
    return true
  })
  await import('#server/plugins/console-to-log')
})
afterAll(() => {
  vi.restoreAllMocks()
  console.error = before
})

it('logs a fault of the framework as one line, without the secrets in its address (S-59)', () => {
  console.error(`[request error] [fatal] [GET] http://127.0.0.1:3000/quotes/OX-2401?key=${key}\n`, new Error('There is no quote here'))
  console.error(`[request error] [unhandled] [GET] http://127.0.0.1:3000/link/${key}\n`, new Error('out of order'))
  console.error('[unhandledRejection]', new Error(`[GET] "/api/quotes/OX-2401?key=${key}": 503 Service Unavailable`))
  console.error({ not: 'an error' })
  expect(lines.every(line => line.endsWith('}\n') && !line.slice(0, -1).includes('\n') && !line.includes(key.slice(0, 22)))).toBe(true)
  expect(lines.map(line => JSON.parse(line) as Record<string, unknown>)).toMatchObject([
    { level: 'error', event: 'console', words: '[request error] [fatal] [GET] http://127.0.0.1:3000/quotes/OX-2401', error: 'Error', message: 'There is no quote here' },
    { level: 'error', event: 'console', words: '[request error] [unhandled] [GET] http://127.0.0.1:3000/link/:secret', message: 'out of order' },
    { level: 'error', event: 'console', words: '[unhandledRejection]', message: '[GET] "/api/quotes/OX-2401?key=:secret": 503 Service Unavailable' },
    { level: 'error', event: 'console', words: '', error: 'undefined' },
  ])
})
