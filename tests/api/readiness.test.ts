import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { afterAll, describe, expect, inject, it } from 'vitest'
import { query } from './support/database'
import { newAddress, placeEnquiry } from './support/orders'
import { useServices } from './support/services'
import { Visitor } from './support/visitor'

const status = async (path: string): Promise<number> => (await fetch(`${inject('baseUrl')}${path}`)).status
const untilReady = () => expect.poll(() => status('/api/health').catch(() => 0), { timeout: 30_000, interval: 200 }).toBe(200)

describe('the process', () => {
  const services = useServices()
  afterAll(async () => {
    await services.database.start().catch(() => undefined)
    await services.app.start().catch(() => undefined)
  })

  it('lives but is not ready without its database, refuses in words, and is back within seconds (REL-2, REL-11)', async () => {
    await services.database.stop()
    expect([await status('/api/live'), await status('/api/health')]).toEqual([200, 503])
    const refused = await new Visitor().post<{ status: number }>('/api/auth/link', { email: newAddress('down') })
    expect(refused.status).toBe(503)
    expect(Number(refused.headers.get('retry-after'))).toBeGreaterThan(0)
    await services.database.start()
    await untilReady()
    expect((await placeEnquiry(new Visitor(), newAddress('back'))).outcome).toBe('quoted')
  })

  it('is not ready while migrations are pending (REL-11)', async () => {
    const [last] = await query<{ id: number, hash: string, created_at: string }>(`delete from drizzle.__drizzle_migrations where id = (select max(id) from drizzle.__drizzle_migrations) returning *`)
    expect(await status('/api/health')).toBe(503)
    await query(`insert into drizzle.__drizzle_migrations (id, hash, created_at) values ($1, $2, $3)`, [last!.id, last!.hash, last!.created_at])
    expect(await status('/api/health')).toBe(200)
  })

  it('migrates once when three start together (REL-13)', async () => {
    const before = await query(`select count(*)::int as count from drizzle.__drizzle_migrations`)
    const runs = Array.from({ length: 3 }, () => spawn(process.execPath, ['--import', 'tsx', 'server/database/migrate.ts'], { env: { ...process.env, NUXT_DATABASE_OWNER_URL: inject('databaseOwnerUrl') }, stdio: 'ignore' }))
    expect((await Promise.all(runs.map(run => once(run, 'exit')))).map(([code]) => code)).toEqual([0, 0, 0])
    expect(await query(`select count(*)::int as count from drizzle.__drizzle_migrations`)).toEqual(before)
  })

  it('loses no acknowledged order and shows no half of one when it is killed (REL-1)', async () => {
    const email = newAddress('killed')
    const acknowledged: string[] = []
    for (let round = 0; round < 3; round += 1) {
      const sending = Array.from({ length: 8 }, () => placeEnquiry(new Visitor(), email).then(({ ref }) => { acknowledged.push(ref) }, () => undefined))
      await new Promise(resolve => setTimeout(resolve, 40 + round * 60))
      await services.app.kill()
      await Promise.all(sending)
      await services.app.start()
      await untilReady()
    }
    const stored = await query<{ number: string, whole: boolean }>(`
      select o.number::text, exists (select 1 from quotes q join quote_prices p on p.quote_id = q.id where q.order_id = o.id and q.state = 'sent')
        and exists (select 1 from order_events e where e.order_id = o.id and e.to_state = 'quoted') and exists (select 1 from outbox m where m.order_id = o.id) as whole
      from orders o where contact_email = $1`, [email])
    expect(stored.every(row => row.whole)).toBe(true)
    expect(stored.map(row => `OX-${row.number}`)).toEqual(expect.arrayContaining(acknowledged))
  })
})
