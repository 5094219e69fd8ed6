import { randomBytes, randomUUID } from 'node:crypto'
import { afterAll, describe, expect, inject, it } from 'vitest'
import { createDatabase, createPool } from '#server/database/client'
import { sweep } from '#server/services/housekeeping/sweep'
import { claimRun } from '#server/services/limits/count'
import { takeFromLimit } from '#server/services/limits/take'
import { query } from './support/database'

const pool = createPool(inject('databaseUrl'), () => undefined)
const db = createDatabase(pool)
afterAll(() => pool.end())

describe('work on a timer', () => {
  it('is taken by one of ten processes at each turn (JOB-15)', async () => {
    const task = `test-${randomUUID()}`
    const claims = await Promise.all(Array.from({ length: 10 }, () => claimRun(db, task, 3_600)))
    expect(claims.filter(Boolean)).toHaveLength(1)
    await query(`update rate_counters set window_start = window_start - interval '1 hour' where key = $1`, [`run:${task}`])
    expect(await claimRun(db, task, 3_600)).toBe(true)
  })

  it('deletes what nobody can use any more, and nothing else; twice does no harm (JOB-14)', async () => {
    const [old, young] = [randomBytes(32), randomBytes(32)]
    await query(`insert into email_tokens (token_hash, purpose, email, expires_at) values ($1, 'sign-in', 'a@x.example', now() - interval '8 days'), ($2, 'sign-in', 'a@x.example', now() - interval '1 day')`, [old, young])
    await query(`insert into rate_counters (key, window_start, hits) values ($1, now() - interval '3 days', 1), ($1, now(), 1)`, [`test:${old.toString('hex')}`])
    await sweep(db)
    await sweep(db)
    expect(await query(`select 1 from email_tokens where token_hash = $1`, [old])).toEqual([])
    expect(await query(`select 1 from email_tokens where token_hash = $1`, [young])).toHaveLength(1)
    expect(await query(`select 1 from rate_counters where key = $1`, [`test:${old.toString('hex')}`])).toHaveLength(1)
  })
})

describe('a limit', () => {
  it('lets through exactly its number, however many come at once, and says when to come back (S-14)', async () => {
    const limit = { name: `test-${randomUUID()}`, max: 5, windowS: 3_600 }
    const results = await Promise.allSettled(Array.from({ length: 20 }, () => takeFromLimit(db, limit, '192.0.2.1')))
    expect(results.filter(result => result.status === 'fulfilled')).toHaveLength(5)
    const refused = results.find(result => result.status === 'rejected')
    expect(refused?.reason).toMatchObject({ code: 'too-many', retryAfterS: expect.any(Number) })
    await expect(takeFromLimit(db, limit, '192.0.2.2')).resolves.toBeUndefined()
    expect(await query(`select 1 from rate_counters where key like '%192.0.2%'`)).toEqual([])
  })
})
