import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, beforeEach, describe, expect, inject, it } from 'vitest'
import type { MailPreview, OutboxView } from '#shared/schemas/mail'
import { createDatabase, createPool } from '#server/database/client'
import { MailFailure, type OutgoingMail } from '#server/integrations/mailer'
import { enqueueMail } from '#server/services/mail/enqueue'
import { claimMails, workOnMails, type MailDesk } from '#server/services/mail/work'
import { MAIL_KINDS } from '../../emails/payloads'
import { query } from './support/database'
import { mailsTo, rawMail, waitForMail } from './support/mailbox'
import { acceptOrder, newAddress, placeEnquiry, usualRequirement } from './support/orders'
import { useServices } from './support/services'
import { signInAsRole, Visitor } from './support/visitor'

const pool = createPool(inject('databaseUrl'), () => undefined)
const db = createDatabase(pool)
afterAll(() => pool.end())

const orderUrl = 'https://oxmere.example/account/orders/OX-1'
const inWork = (recipient: string, title: string, step = '') =>
  ({ kind: 'job-in-work', objectId: `job-${recipient}`, recipient, step, payload: { contactName: 'Ilse', orderRef: 'OX-1', title, quantity: 5, leavesOn: null, orderUrl } }) as const
const rowsOf = (recipient: string) => query<{ id: string, kind: string, step: string, attempts: number, isSent: boolean, isDead: boolean, isSkipped: boolean, lastError: string | null, payload: Record<string, unknown> }>(`
  select id, kind, step, attempts, sent_at is not null as "isSent", dead_at is not null as "isDead", skipped_at is not null as "isSkipped", last_error as "lastError", payload from outbox where recipient = $1 order by created_at, id`, [recipient])

describe('a mail that arrived', () => {
  it('has its parts, headers and id as the outbox has them (MAIL-2, MAIL-6, MAIL-7)', async () => {
    const email = newAddress('raw')
    const { ref } = await placeEnquiry(new Visitor(), email, 'Größe Ø 18 — “Feder”')
    const mail = await waitForMail(email, /your quote/i)
    const raw = await rawMail(mail.id)
    const [row] = await rowsOf(email)
    const head = raw.slice(0, raw.indexOf('\r\n\r\n'))
    expect(head).toContain(`Message-ID: <${row!.id}@oxmere.invalid>`)
    for (const name of ['From', 'To', 'Date', 'Message-ID', 'Subject', 'Reply-To', 'Auto-Submitted']) expect([name, head.match(new RegExp(`^${name}: `, 'gim'))?.length]).toEqual([name, 1])
    expect(mail.subject).toContain('Größe Ø 18 — “Feder”')
    expect(mail.subject).toContain(ref)
    expect(mail.text).toMatch(new RegExp(`${inject('baseUrl')}/quotes/${ref}\\?key=[A-Za-z0-9_-]{43}`))
    expect(Math.max(...raw.split('\r\n').map(line => line.length))).toBeLessThanOrEqual(998)
  })

  it('shows what customers wrote as text (S-1), and its secret is taken out of the outbox once it is sent', async () => {
    const email = newAddress('script')
    await placeEnquiry(new Visitor(), email, '<img src=x onerror=alert(1)>')
    const mail = await waitForMail(email, /your quote/i)
    expect(mail.html).not.toContain('<img')
    expect(mail.text).toContain('<img src=x onerror=alert(1)>')
    await expect.poll(async () => (await rowsOf(email))[0]?.isSent).toBe(true)
    expect(JSON.stringify((await rowsOf(email))[0]?.payload)).not.toMatch(/key=[A-Za-z0-9_-]{20,}/)
  })

  it('goes to staff as well when an enquiry waits for a person', async () => {
    const email = newAddress('waits')
    const contact = { name: 'Ilse Varrow', firm: 'Tarnbeck', email, countryCode: 'IE', title: `Brake ${randomUUID().slice(0, 6)}` }
    const { status } = await new Visitor().post('/api/enquiries', { requirement: { ...usualRequirement, couldHurt: 'yes-or-unsure' }, contact }, { 'idempotency-key': randomUUID() })
    expect(status).toBe(201)
    expect((await waitForMail(email, /looking at your enquiry/i)).text).toMatch(/nothing is needed from you/i)
    const estimator = inject('demoSignIns').find(one => one.role === 'estimator')!
    expect((await waitForMail(estimator.email, new RegExp(contact.title))).text).toContain(`${inject('baseUrl')}/estimating/OX-`)
  })
})

describe('the outbox', () => {
  const services = useServices()
  // These tests are the only worker: the app would send the mails before them.
  let acceptedRef = ''
  beforeAll(async () => {
    acceptedRef = (await acceptOrder(newAddress('accepted'))).ref
    await services.app.stop()
  })
  afterAll(() => services.app.start())

  const sent: OutgoingMail[] = []
  let answer: (mail: OutgoingMail) => Promise<void> = () => Promise.resolve()
  const desk: MailDesk = {
    mailer: {
      async send(mail) {
        await answer(mail)
        sent.push(mail)
      },
    },
    render: (kind, payload) => Promise.resolve({ subject: `${kind} ${String((payload as { title?: string }).title)}`, html: '<p></p>', text: '' }),
    linkOf: () => undefined, origin: 'https://oxmere.example', timeZone: 'Europe/Dublin',
  }
  const goOn = () => false
  const workUntilIdle = async () => {
    while (await workOnMails(db, desk, goOn) > 0) { /* until nothing is due */ }
  }
  beforeEach(async () => {
    answer = () => Promise.resolve()
    await workUntilIdle()
    sent.length = 0
  })
  const sentTo = (recipient: string) => sent.filter(mail => mail.recipient === recipient)

  it('holds nothing of an act that was rolled back, and one row for an act that was repeated (MAIL-1)', async () => {
    const email = newAddress('outbox')
    await expect(db.transaction(async (tx) => {
      expect(await enqueueMail(tx, inWork(email, 'a'))).toBe(true)
      throw new Error('the act fails')
    })).rejects.toThrow('the act fails')
    expect(await rowsOf(email)).toEqual([])
    const results = await Promise.all(Array.from({ length: 20 }, () => enqueueMail(db, inWork(email, 'a'))))
    expect(results.filter(Boolean)).toHaveLength(1)
    expect(await rowsOf(email)).toHaveLength(1)
  })

  it.each(['a@x.example, b@y.example', 'Ilse <a@x.example>', 'a@x.example\r\nBcc: b@y.example', 'nobody', ''])('takes no recipient %j (MAIL-10)', async (recipient) => {
    await expect(enqueueMail(db, inWork(recipient, 'a'))).rejects.toThrow()
  })

  it('is emptied by four workers at once, each mail once, those of one recipient in their order (MAIL-3, JOB-10)', async () => {
    const recipients = Array.from({ length: 6 }, (_, index) => newAddress(`many${index}`))
    for (let step = 1; step <= 5; step += 1) {
      for (const recipient of recipients) await enqueueMail(db, inWork(recipient, String(step), String(step)))
    }
    answer = () => new Promise(resolve => setTimeout(resolve, 5))
    await Promise.all(Array.from({ length: 4 }, workUntilIdle))
    await workUntilIdle()
    for (const recipient of recipients) expect(sentTo(recipient).map(mail => mail.subject)).toEqual([1, 2, 3, 4, 5].map(step => `job-in-work ${step}`))
  })

  it('keeps a mail and those behind it when the server says later, and sends each once with the same id when it takes them (MAIL-2, MAIL-4)', async () => {
    const email = newAddress('later')
    await enqueueMail(db, inWork(email, 'first', '1'))
    await enqueueMail(db, inWork(email, 'second', '2'))
    const tried: string[] = []
    answer = (mail) => {
      if (mail.recipient !== email) return Promise.resolve()
      tried.push(mail.id)
      return Promise.reject(new MailFailure('delayed', '450'))
    }
    await workUntilIdle()
    expect(sentTo(email)).toEqual([])
    expect((await rowsOf(email)).map(row => row.attempts)).toEqual([1, 0])
    answer = () => Promise.resolve()
    await query('update outbox set run_at = now() where recipient = $1', [email])
    await workUntilIdle()
    expect(sentTo(email).map(mail => mail.subject)).toEqual(['job-in-work first', 'job-in-work second'])
    expect(sentTo(email)[0]!.id).toBe(tried[0])
  })

  it('gives a mail up that the server refuses for good, and goes on with the next (MAIL-4)', async () => {
    const email = newAddress('refused')
    await enqueueMail(db, inWork(email, 'bad', '1'))
    await enqueueMail(db, inWork(email, 'good', '2'))
    answer = mail => mail.subject.endsWith('bad') ? Promise.reject(new MailFailure('refused', 'EENVELOPE 550')) : Promise.resolve()
    await workUntilIdle()
    expect((await rowsOf(email)).map(row => [row.isSent, row.isDead, row.lastError])).toEqual([[false, true, 'EENVELOPE 550'], [true, false, null]])
  })

  it('touches no other mail while the server is away, and gives up only after two days (MAIL-3)', async () => {
    const [one, two] = [newAddress('away1'), newAddress('away2')]
    for (const email of [one, two]) await enqueueMail(db, inWork(email, 'a'))
    let tries = 0
    answer = () => {
      tries += 1
      return Promise.reject(new MailFailure('unreachable', 'ECONNREFUSED'))
    }
    expect(await workOnMails(db, desk, goOn)).toBe(0)
    expect(tries).toBe(1)
    const tryOnly = async (email: string, other: string, age: string) => {
      await query(`update outbox set run_at = now() + interval '1 hour' where recipient = $1`, [other])
      await query(`update outbox set run_at = now(), created_at = now() - $2::interval where recipient = $1`, [email, age])
      await workOnMails(db, desk, goOn)
    }
    await tryOnly(one, two, '47 hours')
    await tryOnly(two, one, '51 hours')
    expect((await rowsOf(one))[0]?.isDead).toBe(false)
    expect((await rowsOf(two))[0]?.isDead).toBe(true)
  })

  it('has the claim of a process that died run out, and the mail sent by another (JOB-4)', async () => {
    const email = newAddress('claimed')
    await enqueueMail(db, inWork(email, 'a'))
    expect((await claimMails(db)).map(row => row.recipient)).toContain(email)
    await workUntilIdle()
    expect(sentTo(email)).toEqual([])
    await query(`update outbox set leased_until = now() - interval '1 second' where recipient = $1`, [email])
    await workUntilIdle()
    expect(sentTo(email)).toHaveLength(1)
  })

  it('leaves a mail to the process that claimed it while the one before took too long (JOB-4)', async () => {
    const [slow, behind] = [newAddress('slow'), newAddress('behind')]
    for (const email of [slow, behind]) await enqueueMail(db, inWork(email, 'a'))
    const takenByOther: string[] = []
    answer = async (mail) => {
      if (mail.recipient !== slow) return
      await query(`update outbox set leased_until = now() - interval '1 second' where recipient = $1`, [behind])
      takenByOther.push(...(await claimMails(db)).map(row => row.recipient))
    }
    await query(`update outbox set run_at = now() - interval '1 minute' where recipient = $1`, [slow])
    await workOnMails(db, desk, goOn)
    expect(takenByOther).toContain(behind)
    expect([sentTo(slow).length, sentTo(behind).length]).toEqual([1, 0])
    await query(`update outbox set leased_until = now() - interval '1 second' where recipient = $1`, [behind])
    await workUntilIdle()
    expect(sentTo(behind)).toHaveLength(1)
  })

  it('looks at the cause again before it sends (MAIL-5)', async () => {
    const [order] = await query<{ id: string }>(`select id from orders where number = $1 and state = 'accepted'`, [Number(acceptedRef.slice(3))])
    expect(order).toBeDefined()
    const email = newAddress('cause')
    const about = { contactName: 'Ilse', orderRef: 'OX-1', title: 'a' }
    await enqueueMail(db, { kind: 'enquiry-waits', objectId: email, recipient: email, orderId: order!.id, payload: { ...about, quoteUrl: orderUrl, reasons: [], answerBy: null } })
    await enqueueMail(db, { kind: 'sign-in-link', objectId: email, recipient: email, payload: { name: 'Ilse' } })
    await query(`update outbox set created_at = now() - interval '2 hours' where recipient = $1 and kind = 'sign-in-link'`, [email])
    await enqueueMail(db, { kind: 'payment-failed', objectId: email, recipient: email, orderId: order!.id, payload: { ...about, paymentKind: 'deposit', amountMinor: 100, currency: 'eur', orderUrl } })
    await workUntilIdle()
    const rows = await rowsOf(email)
    expect(rows.map(row => [row.kind, row.isSkipped, row.isSent])).toEqual(expect.arrayContaining([['enquiry-waits', true, false], ['sign-in-link', true, false], ['payment-failed', false, true]]))
    expect(sentTo(email)).toHaveLength(1)
  })

  it('stops in the middle without losing or counting anything', async () => {
    const emails = [newAddress('stop1'), newAddress('stop2'), newAddress('stop3')]
    for (const email of emails) await enqueueMail(db, inWork(email, 'a'))
    let asked = 0
    await workOnMails(db, desk, () => (asked += 1) > 1)
    const rows = (await Promise.all(emails.map(rowsOf))).flat()
    expect(rows.filter(row => row.isSent)).toHaveLength(1)
    expect(rows.filter(row => !row.isSent).map(row => row.attempts)).toEqual([0, 0])
  })
})

describe('the mail room in Works', () => {
  it('shows administrators each kind with its preview, and nobody else (MAIL-13)', async () => {
    const admin = await signInAsRole('admin')
    for (const kind of MAIL_KINDS) {
      const { status, body } = await admin.get<MailPreview>(`/api/works/outbox/previews/${kind}`)
      expect([kind, status]).toEqual([kind, 200])
      expect(body.html).toContain('<h1')
      expect(body.text.length).toBeGreaterThan(50)
      expect(body.html).not.toContain('<!--')
    }
    expect((await admin.get('/api/works/outbox/previews/invented')).status).toBe(404)
    for (const role of ['estimator', 'supervisor', 'operator', 'bookkeeper']) {
      const staff = await signInAsRole(role)
      expect((await staff.get('/api/works/outbox')).status).toBe(403)
      expect((await staff.get('/api/works/outbox/previews/quote-ready')).status).toBe(403)
    }
    expect((await new Visitor().get('/api/works/outbox')).status).toBe(401)
  })

  it('lists mails with masked addresses page by page, and has dead ones tried again but sent ones not (JOB-13)', async () => {
    const { email, ref } = await acceptOrder(newAddress('listed'))
    await waitForMail(email, /confirm your address/i)
    const admin = await signInAsRole('admin')
    await expect.poll(async () => (await rowsOf(email)).every(row => row.isSent)).toBe(true)
    const first = (await admin.get<OutboxView>('/api/works/outbox?limit=1')).body
    expect(first.rows).toHaveLength(1)
    const second = (await admin.get<OutboxView>(`/api/works/outbox?limit=50&cursor=${first.nextCursor!}`)).body
    const all = [...first.rows, ...second.rows]
    expect(new Set(all.map(row => row.id)).size).toBe(all.length)
    const own = all.filter(row => row.orderRef === ref)
    expect(own.map(row => row.kind).sort()).toEqual(['confirm-address', 'quote-ready'])
    expect(JSON.stringify(all)).not.toContain(email)
    expect(own[0]!.recipientMasked).toBe('l…@tarnbeck.example')

    expect((await admin.post(`/api/works/outbox/${own[0]!.id}/replay`)).status).toBe(409)
    expect((await admin.post(`/api/works/outbox/${randomUUID()}/replay`)).status).toBe(404)
    const dead = newAddress('dead')
    await db.transaction(tx => enqueueMail(tx, inWork(dead, 'a')).then(() => tx.execute(`update outbox set dead_at = now(), last_error = 'EENVELOPE 550' where recipient = '${dead}'`)))
    const [row] = await rowsOf(dead)
    expect((await admin.get<OutboxView>('/api/works/outbox?state=dead')).body.rows.map(one => one.id)).toContain(row!.id)
    expect((await admin.post(`/api/works/outbox/${row!.id}/replay`)).status).toBe(200)
    await waitForMail(dead, /being made/i)
    expect(await mailsTo(dead)).toHaveLength(1)
    expect(await query(`select 1 from audit_log where action = 'mail.replay' and object = $1`, [row!.id])).toHaveLength(1)
  })

  it.each(['cursor=nonsense', 'limit=0', 'limit=1000000', 'limit=x', 'state=lost', 'limit=1&limit=2', 'unknown=1'])('refuses ?%s with words', async (search) => {
    const { status } = await (await signInAsRole('admin')).get(`/api/works/outbox?${search}`)
    expect(status).toBeGreaterThanOrEqual(400)
    expect(status).toBeLessThan(500)
  })
})
