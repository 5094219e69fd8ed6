import { fileURLToPath } from 'node:url'
import { beforeAll, describe, expect, inject, it } from 'vitest'
import type { Role } from '#shared/schemas/roles'
import { listApiRoutes } from '../../vite/api-routes'
import { orderReadyToPay, type AcceptedOrder } from './support/orders'
import { signInAsRole, Visitor } from './support/visitor'

const UUID = '00000000-0000-4000-8000-000000000000'
const ROOT = fileURLToPath(new URL('../../server/api', import.meta.url))
type Who = Role | 'guest'
const EVERYBODY: readonly Who[] = ['guest', 'customer', 'estimator', 'supervisor', 'operator', 'bookkeeper', 'admin']
const SIGNED_IN: readonly Who[] = EVERYBODY.slice(1)
const ESTIMATING: readonly Who[] = ['estimator', 'admin']
const PLANNING: readonly Who[] = ['supervisor', 'admin']
const FLOOR: readonly Who[] = ['supervisor', 'operator', 'admin']
const BOOKS: readonly Who[] = ['bookkeeper', 'admin']
const ADMIN: readonly Who[] = ['admin']

/** Who may use each route (S-45). Where a route also asks for ownership, a stranger finds nothing: 404, tried below. */
const RIGHTS: Readonly<Record<string, readonly Who[]>> = {
  'GET /api/live': EVERYBODY, 'GET /api/health': EVERYBODY,
  'POST /api/order/preview': EVERYBODY, 'POST /api/enquiries': EVERYBODY,
  'GET /api/quotes/:ref': EVERYBODY, 'POST /api/quotes/:ref/accept': EVERYBODY, 'POST /api/quotes/:ref/decline': EVERYBODY, 'POST /api/quotes/:ref/confirm-link': EVERYBODY,
  'GET /api/orders': SIGNED_IN, 'GET /api/orders/:ref': SIGNED_IN, 'POST /api/orders/:ref/pay': SIGNED_IN, 'GET /api/orders/:ref/payment': SIGNED_IN,
  'POST /api/auth/login': EVERYBODY, 'POST /api/auth/logout': EVERYBODY, 'GET /api/auth/session': SIGNED_IN, 'POST /api/auth/link': EVERYBODY, 'POST /api/auth/use-link': EVERYBODY, 'POST /api/auth/password': SIGNED_IN,
  'GET /api/auth/sessions': SIGNED_IN, 'DELETE /api/auth/sessions': SIGNED_IN, 'DELETE /api/auth/sessions/:id': SIGNED_IN,
  'POST /api/webhooks/stripe': EVERYBODY,
  'GET /api/springs/sheet.pdf': EVERYBODY,
  'POST /api/v1/springs/evaluate': EVERYBODY, 'POST /api/v1/springs/size': EVERYBODY, 'GET /api/v1/materials': EVERYBODY, 'GET /api/v1/openapi.json': EVERYBODY,
  'GET /api/estimating': ESTIMATING, 'GET /api/estimating/:ref': ESTIMATING, 'POST /api/estimating/:ref/line': ESTIMATING, 'POST /api/estimating/:ref/margin': ESTIMATING, 'POST /api/estimating/:ref/send': ESTIMATING,
  'POST /api/estimating/:ref/revise': ESTIMATING, 'POST /api/estimating/:ref/withdraw': ESTIMATING, 'POST /api/estimating/:ref/assign': ESTIMATING,
  'GET /api/loading': FLOOR, 'GET /api/loading/jobs/:ref': FLOOR, 'POST /api/loading/jobs/:ref/place-all': PLANNING, 'POST /api/loading/jobs/:ref/dispatch': PLANNING,
  'POST /api/loading/operations/:id/place': PLANNING, 'POST /api/loading/operations/:id/unplace': PLANNING,
  'GET /api/bench': FLOOR, 'GET /api/bench/:code': FLOOR, 'POST /api/bench/operations/:id/records': FLOOR,
  'GET /api/ledger': BOOKS, 'GET /api/ledger/jobs/:ref': BOOKS,
  'GET /api/works/price-books': ADMIN, 'GET /api/works/wire': PLANNING, 'POST /api/works/wire/:id/receive': PLANNING, 'GET /api/works/outbox': ADMIN, 'POST /api/works/outbox/:id/replay': ADMIN, 'GET /api/works/outbox/previews/:kind': ADMIN,
  'GET /api/works/people': ADMIN, 'POST /api/works/people/:id/end-sessions': ADMIN, 'GET /api/works/stripe-events': ADMIN, 'POST /api/works/stripe-events/:id/replay': ADMIN,
}

const routesOfTree = () => listApiRoutes(ROOT).map(route => `${route.method} ${route.path}`).sort()

const PARAMETERS: Readonly<Record<string, string>> = { ':id': UUID, ':code': 'C1', ':kind': 'quote-ready' }
// Signing out, or ending the sessions, would take the visitor's own rights away in the middle of the matrix.
const ENDS_SESSION = new Set(['POST /api/auth/logout', 'DELETE /api/auth/sessions'])

describe('every route', () => {
  it('has its row in the table of rights: a new one without an entry fails (S-45, S-65)', () => {
    expect(routesOfTree()).toEqual(Object.keys(RIGHTS).sort())
  })

  describe.each(EVERYBODY)('for %s', (who) => {
    let visitor: Visitor
    beforeAll(async () => { visitor = who === 'guest' ? new Visitor() : await signInAsRole(who) })
    it.each(Object.entries(RIGHTS).filter(([route]) => !ENDS_SESSION.has(route)))('%s', async (route, allowed) => {
      const [method = '', pattern = ''] = route.split(' ')
      const path = pattern.replace(/:\w+/g, name => PARAMETERS[name] ?? (pattern.includes('jobs') ? 'J-999999' : 'OX-999999'))
      const { status } = method === 'GET' ? await visitor.get(path) : method === 'DELETE' ? await visitor.delete(path) : await visitor.post(path, {})
      if (!allowed.includes(who)) expect(status).toBe(who === 'guest' ? 401 : 403)
      else if (pattern !== '/api/auth/login') expect([401, 403, 405]).not.toContain(status)
      expect(status).toBeLessThan(500)
    })
  })
})

describe('another customer’s order', () => {
  let mine: AcceptedOrder
  let other: AcceptedOrder
  it('is there to begin with', async () => {
    [mine, other] = [await orderReadyToPay('mine'), await orderReadyToPay('other')]
    expect(mine.ref).not.toBe(other.ref)
  })
  it.each([['GET', ''], ['GET', '/payment'], ['POST', '/pay']])('is not found: %s /api/orders/:ref%s (S-46)', async (method, path) => {
    const ask = (order: AcceptedOrder) => method === 'GET' ? mine.customer.get(`/api/orders/${order.ref}${path}`) : mine.customer.post(`/api/orders/${order.ref}${path}`, { kind: 'deposit' })
    expect((await ask(other)).status).toBe(404)
    expect((await ask(mine)).status).toBe(200)
  })
  it('is in nobody else’s list', async () => {
    const { body } = await mine.customer.get<{ rows: { ref: string }[] }>('/api/orders')
    expect(body.rows.map(row => row.ref)).toEqual([mine.ref])
  })
  it('cannot be accepted for another with one’s own key', async () => {
    expect((await mine.customer.get(`/api/quotes/${other.ref}?key=${mine.key}`)).status).toBe(404)
  })
})

describe('HTTP', () => {
  const send = (path: string, init: RequestInit = {}) => fetch(`${inject('baseUrl')}${path}`, init)
  const json = { 'content-type': 'application/json' }

  it('takes JSON only, whole, of at most 64 KiB, and each parameter once (S-9, S-10, S-58, S-63)', async () => {
    const preview = (body: BodyInit, headers: Record<string, string> = json) => send('/api/order/preview', { method: 'POST', body, headers, ...(body instanceof ReadableStream ? { duplex: 'half' } : {}) } as RequestInit)
    expect((await preview('{}', { 'content-type': 'text/plain' })).status).toBe(415)
    expect((await preview('{')).status).toBe(400)
    expect((await preview(JSON.stringify({ a: 'x'.repeat(70_000) }))).status).toBe(413)
    const chunks = new ReadableStream({ start(controller) { for (let count = 0; count < 20; count += 1) controller.enqueue(new TextEncoder().encode('x'.repeat(5_000))); controller.close() } })
    expect((await preview(chunks)).status).toBe(413)
    expect((await send('/api/quotes/OX-1?key=a&key=b')).status).toBe(400)
    expect((await preview('{"__proto__": {"access": "public"}, "constructor": 1}')).status).toBe(422)
    expect(({} as { access?: string }).access).toBeUndefined()
  })
  it.each(['DELETE', 'PUT', 'PATCH'])('refuses %s where there is no such way', async (method) => {
    const answer = await send('/api/order/preview', { method })
    expect([answer.status, answer.headers.get('allow')]).toEqual([405, 'POST'])
  })
  it('takes state changes from our own pages only (S-24)', async () => {
    const preview = (headers: Record<string, string>) => send('/api/order/preview', { method: 'POST', body: '{}', headers: { ...json, ...headers } })
    expect((await preview({ 'origin': 'https://evil.example' })).status).toBe(403)
    expect((await preview({ 'sec-fetch-site': 'cross-site' })).status).toBe(403)
    expect((await preview({ 'sec-fetch-site': 'same-site' })).status).toBe(403)
    expect((await preview({ origin: inject('baseUrl') })).status).toBe(422)
  })
  it('gives no other site anything, and keeps no answer (S-20, S-22, S-23, S-26, S-54)', async () => {
    const answer = await send('/api/auth/session', { headers: { origin: 'https://evil.example' } })
    expect(answer.headers.get('access-control-allow-origin')).toBeNull()
    expect(answer.headers.get('cache-control')).toBe('no-store')
    expect(answer.headers.get('x-content-type-options')).toBe('nosniff')
    expect(answer.headers.get('content-type')).toBe('application/problem+json; charset=utf-8')
    expect(answer.headers.get('content-security-policy')).toContain(`frame-ancestors 'none'`)
    expect(answer.headers.get('strict-transport-security')).toBeNull()
  })
  it('serves pages whose every inline script is in the policy, also when a kept page is asked for again (S-21)', async () => {
    const { createHash } = await import('node:crypto')
    for (const path of ['/', '/order', '/sign-in']) {
      const page = await send(path)
      const policy = page.headers.get('content-security-policy') ?? ''
      expect(policy).not.toMatch(/script-src[^;]*unsafe/)
      expect(policy).toContain(`frame-ancestors 'none'`)
      for (const [, attributes = '', code = ''] of (await page.text()).matchAll(/<script(?![^>]*\ssrc=)([^>]*)>([\s\S]*?)<\/script>/g)) {
        if (code !== '' && !attributes.includes('application/json')) expect(policy, path).toContain(createHash('sha256').update(code).digest('base64'))
      }
    }
    const kept = await send('/order')
    const again = await send('/order', { headers: { 'if-none-match': kept.headers.get('etag') ?? '' } })
    // A browser puts the headers of a 304 in place of those it kept with the page.
    expect(again.status).toBe(304)
    expect(again.headers.get('content-security-policy')).toBeNull()
  })
  it('sets the session cookie for this host alone, out of reach of scripts (S-18)', async () => {
    const person = inject('demoSignIns')[0]!
    const answer = await send('/api/auth/login', { method: 'POST', body: JSON.stringify({ email: person.email, password: person.password }), headers: json })
    const cookie = answer.headers.getSetCookie().find(line => line.startsWith('__Host-sid='))!
    for (const part of ['HttpOnly', 'Secure', 'SameSite=Lax', 'Path=/']) expect(cookie).toContain(part)
    expect(cookie).not.toContain('Domain')
  })
})
