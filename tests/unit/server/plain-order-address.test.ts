import { beforeAll, expect, it, vi } from 'vitest'

let middleware: (event: { method: string, path: string }) => unknown
beforeAll(async () => {
  vi.stubGlobal('defineEventHandler', (handler: typeof middleware) => handler)
  vi.stubGlobal('sendRedirect', (_event: unknown, to: string, status: number) => `${status} ${to}`)
  middleware = (await import('#server/middleware/plain-order-address')).default as unknown as typeof middleware
})

it('keeps one copy of the order form, whatever query is made up (S-63)', () => {
  for (const path of ['/order?x=1', '/order/?x=1', '/order?', '/order?/order?a']) expect(middleware({ method: 'GET', path }), path).toBe('302 /order')
  expect(middleware({ method: 'HEAD', path: '/order?x' })).toBe('302 /order')
  for (const [method, path] of [['GET', '/order'], ['GET', '/order/'], ['POST', '/order?x'], ['GET', '/orders?x'], ['GET', '/account/orders/OX-1?session_id=cs_1'], ['GET', '/?to=/order?x']] as const)
    expect(middleware({ method, path }), path).toBeUndefined()
})
