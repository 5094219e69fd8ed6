import { afterAll, describe, expect, inject, it } from 'vitest'
import type { PeopleView, SessionRow, SessionUser, UsedLink } from '#shared/schemas/auth'
import type { Problem } from '#shared/schemas/problem'
import { createDatabase, createPool } from '#server/database/client'
import { DomainError } from '#server/services/errors'
import { hasDemoPeople } from '#server/services/people/demo-people'
import { requestSignInLink } from '#server/services/sessions/request-sign-in-link'
import { signIn } from '#server/services/sessions/sign-in'
import { startSession } from '#server/services/sessions/start'
import { query } from './support/database'
import { linkTokenIn, mailsTo, waitForMail } from './support/mailbox'
import { acceptOrder, newAddress, orderReadyToPay } from './support/orders'
import { useServices } from './support/services'
import { signInAs, signInAsRole, Visitor } from './support/visitor'

const estimator = inject('demoSignIns').find(one => one.role === 'estimator')!

describe('signing in with a password', () => {
  it('sets a session cookie that scripts and other sites do not see, and a marker without secrecy (S-18)', async () => {
    const visitor = new Visitor()
    const { status, headers, body } = await visitor.post<{ token: string, user: SessionUser }>('/api/auth/login', { email: estimator.email, password: estimator.password })
    expect(status).toBe(200)
    expect(body).toMatchObject({ token: 'cookie', user: { email: estimator.email, roles: expect.arrayContaining(['estimator']) } })
    const cookie = headers.getSetCookie().find(line => line.startsWith('__Host-sid='))
    expect(cookie).toMatch(/^__Host-sid=[A-Za-z0-9_-]{43};/)
    for (const attribute of ['HttpOnly', 'Secure', 'SameSite=Lax', 'Path=/']) expect(cookie).toContain(attribute)
    expect(cookie).not.toMatch(/domain=/i)
    expect(headers.getSetCookie().find(line => line.startsWith('auth.token='))).toMatch(/^auth\.token=cookie;/)
    expect((await visitor.get<{ user: SessionUser }>('/api/auth/session')).body.user.email).toBe(estimator.email)
  })

  it('stores the hash of the session and Argon2id of the password, with at least 19 MiB and two passes (S-41, S-49)', async () => {
    const visitor = await signInAs(estimator.email, estimator.password)
    const secret = visitor.cookies.get('__Host-sid')!
    const [row] = await query<{ passwordHash: string, sessions: number }>(`
      select p.password_hash as "passwordHash", (select count(*)::int from sessions s where s.token_hash = sha256($2::bytea)) as sessions from people p where p.email = $1`, [estimator.email, Buffer.from(secret)])
    expect(row?.sessions).toBe(1)
    const parameters = /^\$argon2id\$v=19\$m=(\d+),t=(\d+),p=(\d+)\$/.exec(row!.passwordHash)?.slice(1).map(Number)
    expect(parameters?.[0]).toBeGreaterThanOrEqual(19 * 1024)
    expect(parameters?.[1]).toBeGreaterThanOrEqual(2)
  })

  it('never takes over a session id that was there before (S-41)', async () => {
    const planted = 'A'.repeat(43)
    const visitor = new Visitor()
    visitor.cookies.set('__Host-sid', planted)
    await visitor.post('/api/auth/login', { email: estimator.email, password: estimator.password })
    const first = visitor.cookies.get('__Host-sid')
    expect(first).not.toBe(planted)
    await visitor.post('/api/auth/login', { email: estimator.email, password: estimator.password })
    expect(visitor.cookies.get('__Host-sid')).not.toBe(first)
    // The session of before is over: who signs in anew leaves none behind.
    const former = new Visitor()
    former.cookies.set('__Host-sid', first!)
    expect((await former.get('/api/auth/session')).status).toBe(401)
    expect((await visitor.get('/api/auth/session')).status).toBe(200)
  })

  it('answers a wrong password and an unknown address in the same words', async () => {
    const wrong = await new Visitor().post<Problem>('/api/auth/login', { email: estimator.email, password: 'not this one' })
    const unknown = await new Visitor().post<Problem>('/api/auth/login', { email: newAddress('nobody'), password: 'not this one' })
    expect([wrong.status, unknown.status]).toEqual([401, 401])
    expect({ ...wrong.body, requestId: '' }).toEqual({ ...unknown.body, requestId: '' })
    expect(wrong.headers.getSetCookie()).toEqual([])
  })

  it.each([{}, { email: estimator.email }, { email: ['a@b.example'], password: 'x' }, { email: 'a@b.example, c@d.example', password: 'x' }, { email: estimator.email, password: 'x'.repeat(300) }, { email: estimator.email, password: 'x', role: 'admin' }])(
    'refuses %j with a message and no session', async (body) => {
      const answer = await new Visitor().post<Problem>('/api/auth/login', body)
      expect(answer.status).toBe(422)
      expect(answer.body.errors?.length).toBeGreaterThan(0)
      expect(answer.headers.getSetCookie()).toEqual([])
    })

  it('refuses what another site sends (S-24)', async () => {
    const body = { email: estimator.email, password: estimator.password }
    const foreign: Record<string, string>[] = [{ origin: 'https://evil.example' }, { 'sec-fetch-site': 'cross-site' }]
    for (const headers of foreign) {
      expect((await new Visitor().post('/api/auth/login', body, headers)).status).toBe(403)
    }
    expect((await new Visitor().post('/api/auth/login', body, { 'content-type': 'text/plain' })).status).toBe(415)
  })
})

describe('guessing', () => {
  const services = useServices()

  it('is stopped by address after ten tries, while the owner gets in from another address (S-37)', async () => {
    // The second app believes the proxy that this test plays, so that each request has an address of its own.
    await services.secondApp.start({ NUXT_LIMITS: 'on', NUXT_TRUSTED_PROXIES: '127.0.0.1,::1,::ffff:127.0.0.1' })
    try {
      const visitor = new Visitor(inject('secondAppUrl'))
      const tryFrom = (address: string, password: string) => visitor.post<Problem>('/api/auth/login', { email: estimator.email, password }, { 'x-forwarded-for': address })
      const statuses: number[] = []
      for (let attempt = 0; attempt < 12; attempt += 1) statuses.push((await tryFrom('203.0.113.9', `guess ${attempt}`)).status)
      expect(statuses.slice(0, 10)).toEqual(Array.from({ length: 10 }, () => 401))
      expect(statuses.slice(10)).toEqual([429, 429])
      const refused = await tryFrom('203.0.113.9', estimator.password)
      expect(refused.status).toBe(429)
      expect(Number(refused.headers.get('retry-after'))).toBeGreaterThan(0)
      for (let host = 1; host <= 15; host += 1) await tryFrom(`198.51.100.${host}`, 'a guess from elsewhere')
      const startMs = performance.now()
      expect((await tryFrom('192.0.2.77', estimator.password)).status).toBe(200)
      expect(performance.now() - startMs).toBeLessThan(6_000)
    }
    finally {
      await services.secondApp.stop()
    }
  })

  it('does not believe a forwarded address that no proxy of ours has sent (S-27)', async () => {
    await services.secondApp.start({ NUXT_LIMITS: 'on' })
    try {
      const visitor = new Visitor(inject('secondAppUrl'))
      const email = newAddress('guessed')
      const statuses: number[] = []
      for (let host = 1; host <= 12; host += 1) statuses.push((await visitor.post('/api/auth/login', { email, password: 'guess' }, { 'x-forwarded-for': `198.51.100.${host}` })).status)
      expect(statuses).toContain(429)
    }
    finally {
      await services.secondApp.stop()
    }
  })
})

describe('a session', () => {
  it('ends at once when its owner signs out, whoever still holds the cookie (S-43)', async () => {
    const visitor = await signInAs(estimator.email, estimator.password)
    const secret = visitor.cookies.get('__Host-sid')!
    expect((await visitor.post('/api/auth/logout')).status).toBe(200)
    expect(visitor.cookies.has('__Host-sid')).toBe(false)
    const thief = new Visitor()
    thief.cookies.set('__Host-sid', secret)
    expect((await thief.get('/api/auth/session')).status).toBe(401)
  })

  it('ends after its time and after idleness, by the database’s clock (S-42)', async () => {
    const visitor = await signInAs(estimator.email, estimator.password)
    const hash = [Buffer.from(visitor.cookies.get('__Host-sid')!)]
    await query(`update sessions set last_seen_at = now() - make_interval(mins => idle_minutes) - interval '1 second' where token_hash = sha256($1::bytea)`, hash)
    expect((await visitor.get('/api/auth/session')).status).toBe(401)
    await query(`update sessions set last_seen_at = now() where token_hash = sha256($1::bytea)`, hash)
    expect((await visitor.get('/api/auth/session')).status).toBe(200)
    await query(`update sessions set expires_at = now() where token_hash = sha256($1::bytea)`, hash)
    expect((await visitor.get('/api/auth/session')).status).toBe(401)
  })

  it('lasts a shift for staff and thirty days for customers', async () => {
    const minutes = async (email: string) => (await query<{ absolute: number, idle: number }>(`
      select round(extract(epoch from s.expires_at - s.created_at) / 60)::int as absolute, s.idle_minutes as idle from sessions s join people p on p.id = s.person_id where p.email = $1 order by s.created_at desc limit 1`, [email]))[0]
    await signInAs(estimator.email, estimator.password)
    expect(await minutes(estimator.email)).toEqual({ absolute: 720, idle: 240 })
    const { email } = await orderReadyToPay('session')
    expect(await minutes(email)).toEqual({ absolute: 30 * 1440, idle: 7 * 1440 })
  })

  it('is listed, and one or all others can be ended by its owner, but not by somebody else', async () => {
    const order = await orderReadyToPay('sessions')
    const [here, there] = [order.customer, new Visitor()]
    await here.post('/api/auth/link', { email: order.email })
    expect((await there.post('/api/auth/use-link', { token: linkTokenIn(await waitForMail(order.email, /sign-in link/i)) })).status).toBe(200)
    const { rows } = (await here.get<{ rows: SessionRow[] }>('/api/auth/sessions')).body
    expect(rows).toHaveLength(2)
    expect(rows.filter(row => row.isThisOne)).toHaveLength(1)
    const other = rows.find(row => !row.isThisOne)!
    const stranger = await signInAs(estimator.email, estimator.password)
    expect((await stranger.delete(`/api/auth/sessions/${other.id}`)).status).toBe(404)
    expect((await there.get('/api/auth/session')).status).toBe(200)
    expect((await here.delete(`/api/auth/sessions/${other.id}`)).status).toBe(200)
    expect((await there.get('/api/auth/session')).status).toBe(401)
    expect((await here.get('/api/auth/session')).status).toBe(200)
  })

  it('of anybody can be ended by an administrator only, with a line in the audit trail', async () => {
    const order = await orderReadyToPay('ended')
    const admin = await signInAsRole('admin')
    const people: PeopleView['rows'] = []
    for (let cursor: string | null = ''; cursor !== null;) {
      const page: PeopleView = (await admin.get<PeopleView>(`/api/works/people?limit=100${cursor ? `&cursor=${cursor}` : ''}`)).body
      people.push(...page.rows)
      cursor = page.nextCursor
    }
    const person = people.find(one => one.email === order.email)!
    expect(person).toMatchObject({ roles: ['customer'], liveSessions: 1, companyName: 'Tarnbeck', isDemo: false })
    expect((await (await signInAsRole('supervisor')).post(`/api/works/people/${person.id}/end-sessions`)).status).toBe(403)
    expect((await admin.post<{ ended: number }>(`/api/works/people/${person.id}/end-sessions`)).body).toEqual({ ended: 1 })
    expect((await order.customer.get('/api/auth/session')).status).toBe(401)
    expect(await query(`select 1 from audit_log where action = 'session.end-all' and object = $1`, [person.id])).toHaveLength(1)
  })
})

describe('a link by e-mail', () => {
  it('makes the account of the address with its company, and puts all its orders under it', async () => {
    const first = await acceptOrder(newAddress('account'))
    const second = await acceptOrder(first.email)
    const used = await first.customer.post<UsedLink>('/api/auth/use-link', { token: linkTokenIn(await waitForMail(first.email, new RegExp(`confirm your address.*${first.ref}`, 'i'))) })
    expect(used.status).toBe(200)
    expect(used.body).toMatchObject({ orderRef: first.ref, user: { email: first.email, roles: ['customer'], companyName: 'Tarnbeck' } })
    const rows = (await first.customer.get<{ rows: { ref: string }[] }>('/api/orders')).body.rows.map(row => row.ref)
    expect(rows).toEqual(expect.arrayContaining([first.ref, second.ref]))
    const [person] = await query<{ confirmed: boolean }>(`select email_confirmed_at is not null as confirmed from people where email = $1`, [first.email])
    expect(person?.confirmed).toBe(true)
  })

  it('is not used up by opening it, works once by POST, and not again (S-40, MAIL-12)', async () => {
    const { email } = await orderReadyToPay('once')
    await new Visitor().post('/api/auth/link', { email })
    const token = linkTokenIn(await waitForMail(email, /sign-in link/i))
    for (let scan = 0; scan < 3; scan += 1) expect((await new Visitor().get(`/link/${token}`)).status).toBeLessThan(500)
    const visitor = new Visitor()
    expect((await visitor.post('/api/auth/use-link', { token })).status).toBe(200)
    expect((await visitor.get('/api/auth/session')).status).toBe(200)
    const again = await new Visitor().post<Problem>('/api/auth/use-link', { token })
    expect(again.status).toBe(410)
    expect(again.headers.getSetCookie()).toEqual([])
  })

  it('lets in one of twenty who use it at once', async () => {
    const { email } = await orderReadyToPay('race')
    await new Visitor().post('/api/auth/link', { email })
    const token = linkTokenIn(await waitForMail(email, /sign-in link/i))
    const statuses = await Promise.all(Array.from({ length: 20 }, async () => (await new Visitor().post('/api/auth/use-link', { token })).status))
    expect(statuses.filter(status => status === 200)).toHaveLength(1)
    expect(statuses.filter(status => status === 410)).toHaveLength(19)
  })

  it('stands in the database only as a hash, lasts ten minutes, and is void after them', async () => {
    const { email } = await orderReadyToPay('expiry')
    await new Visitor().post('/api/auth/link', { email })
    const token = linkTokenIn(await waitForMail(email, /sign-in link/i))
    const [row] = await query<{ minutes: number }>(`select round(extract(epoch from expires_at - created_at) / 60)::int as minutes from email_tokens where token_hash = sha256($1::bytea)`, [Buffer.from(token)])
    expect(row?.minutes).toBe(10)
    expect(await query(`select 1 from outbox where payload::text like '%' || $1 || '%'`, [token])).toHaveLength(0)
    await query(`update email_tokens set expires_at = now() where token_hash = sha256($1::bytea)`, [Buffer.from(token)])
    expect((await new Visitor().post('/api/auth/use-link', { token })).status).toBe(410)
  })

  it('is asked for with the same answer, in about the same time, for an unknown address, which gets nothing', async () => {
    const { email } = await orderReadyToPay('timing')
    const stranger = newAddress('stranger')
    const ask = async (address: string) => {
      const startMs = performance.now()
      const { status, body } = await new Visitor().post('/api/auth/link', { email: address }, { 'host': new URL(inject('baseUrl')).host, 'x-forwarded-host': 'evil.example' })
      return { status, body, ms: performance.now() - startMs }
    }
    const [known, unknown] = [await ask(email), await ask(stranger)]
    expect([known.status, known.body]).toEqual([unknown.status, unknown.body])
    expect(known.body).toEqual({ sent: true })
    expect(Math.min(known.ms, unknown.ms)).toBeGreaterThan(190)
    const mail = await waitForMail(email, /sign-in link/i)
    expect(mail.text).toContain(`${inject('baseUrl')}/link/`)
    expect(mail.text).not.toContain('evil.example')
    expect(await mailsTo(stranger)).toEqual([])
  })
})

describe('changing the password', () => {
  it('takes one without the old password in a session that began with a link, ends all other sessions, and asks for the old one from then on (S-35, S-36, S-43)', async () => {
    const { email, customer } = await orderReadyToPay('password')
    const other = new Visitor()
    await other.post('/api/auth/link', { email })
    await other.post('/api/auth/use-link', { token: linkTokenIn(await waitForMail(email, /sign-in link/i)) })
    const change = (newPassword: string, oldPassword?: string) => customer.post<Problem>('/api/auth/password', { newPassword, ...(oldPassword === undefined ? {} : { oldPassword }) })

    for (const weak of ['password123', 'Tarnbeck!2026', 'oxmere springs', '12345678', 'aaaaaaaaaa', 'short']) {
      const { status, body } = await change(weak)
      expect([weak, status]).toEqual([weak, 422])
      expect(body.errors?.[0]?.path).toBe('newPassword')
    }
    const before = customer.cookies.get('__Host-sid')
    expect((await change('heron lintel forty')).status).toBe(200)
    expect(customer.cookies.get('__Host-sid')).not.toBe(before)
    expect((await customer.get('/api/auth/session')).status).toBe(200)
    expect((await other.get('/api/auth/session')).status).toBe(401)

    expect((await change('tapir cobalt ninety')).body.errors?.[0]?.path).toBe('oldPassword')
    expect((await change('tapir cobalt ninety', 'wrong one')).body.errors?.[0]?.path).toBe('oldPassword')
    expect((await change('tapir cobalt ninety', 'heron lintel forty')).status).toBe(200)
    await signInAs(email, 'tapir cobalt ninety')
    expect((await new Visitor().post('/api/auth/login', { email, password: 'heron lintel forty' })).status).toBe(401)
  })

  it('takes 64 characters of any kind as they are, without trimming (S-34)', async () => {
    const { email, customer } = await orderReadyToPay('long')
    const password = ` ${'żółw'.repeat(16)}`
    expect((await customer.post('/api/auth/password', { newPassword: password })).status).toBe(200)
    await signInAs(email, password)
    expect((await new Visitor().post('/api/auth/login', { email, password: password.trim() })).status).toBe(401)
  })
})

describe('accounts of the demonstration in production', () => {
  const pool = createPool(inject('databaseUrl'), () => undefined)
  const db = createDatabase(pool)
  afterAll(() => pool.end())
  const production = { mode: 'production' } as const

  it('are seen, so that the start is refused (S-38)', async () => {
    expect(await hasDemoPeople(db)).toBe(true)
  })

  it('sign in by no way, with the right password either', async () => {
    const attempt = { email: estimator.email, password: estimator.password, address: '192.0.2.1', hasLimits: false }
    expect((await signIn({ db }, { mode: 'demo' }, attempt)).user.email).toBe(estimator.email)
    await expect(signIn({ db }, production, attempt)).rejects.toThrow(DomainError)
    const [person] = await query<{ id: string }>('select id from people where email = $1', [estimator.email])
    await expect(startSession(db, person!.id, production)).rejects.toThrow(/demonstration/)
    await requestSignInLink({ db, now: new Date() }, production, { email: estimator.email, hasLimits: false })
    expect(await query(`select 1 from outbox where kind = 'sign-in-link' and recipient = $1`, [estimator.email])).toEqual([])
  })

  it('of nobody in particular stop the process at its start; so does a missing secret of the webhook (PAY-25)', async () => {
    const { secondApp } = useServices()
    await expect(secondApp.start({ NUXT_STRIPE_WEBHOOK_SECRETS: '' })).rejects.toThrow()
    const realLooking = {
      NUXT_MODE: 'production', NUXT_LIMITS: 'on', NUXT_ORIGIN: 'https://springs.example', NUXT_STRIPE_HOST: '', NUXT_STRIPE_PORT: '', NUXT_STRIPE_PROTOCOL: 'https', NUXT_STRIPE_SECRET_KEY: 'sk_test_x',
      NUXT_MAIL_FROM: 'Springs <orders@springs.example>',
    }
    await secondApp.start(realLooking).catch(() => undefined)
    await expect.poll(async () => fetch(`${inject('secondAppUrl')}/api/live`).then(answer => answer.status, () => 'gone'), { timeout: 20_000 }).toBe('gone')
    await secondApp.stop()
  })
})
