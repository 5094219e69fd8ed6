import { readFileSync } from 'node:fs'
import pg from 'pg'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import type { StoredDesign } from '#shared/schemas/quote'
import { evaluateSpring } from '#shared/spring/mechanics/evaluate-spring'
import { RATE_CODES } from '#server/engine/pricing'
import { newAddress, placeEnquiry } from './support/orders'
import { Visitor } from './support/visitor'

const statementsOf = (migration: string): string[] => readFileSync(new URL(`../../drizzle/${migration}.sql`, import.meta.url), 'utf8').split('--> statement-breakpoint')
const THREE_KINDS = statementsOf('0007_three_kinds')
const HOOKS_AND_LEGS = statementsOf('0008_hooks_and_legs')
const KEPT_BEFORE = statementsOf('0009_springs_kept_before')

/** What a database of before the three kinds holds is laid back into one transaction, brought forward again, and never committed. */
describe('a database of before the three kinds', () => {
  let owner: pg.Client
  let quoteId: string
  let kept: StoredDesign & { kind: 'compression' }
  beforeAll(async () => {
    const { ref } = await placeEnquiry(new Visitor(), newAddress('kept-before'))
    owner = new pg.Client({ connectionString: inject('databaseOwnerUrl') })
    await owner.connect()
    const { rows: [row] } = await owner.query<{ id: string, design: typeof kept }>('select q.id, q.design from quotes q join orders o on o.id = q.order_id where o.number = $1', [Number(ref.slice(3))])
    quoteId = row!.id
    kept = row!.design
    await owner.query('begin')
    await owner.query('alter table quotes disable trigger quotes_frozen')
    // As it was kept then: ends and seating beside the measures, and no spring.
    await owner.query(`
      update quotes set design = (design - 'spring') || jsonb_build_object('ends', design->'spring'->'ends', 'seatingCoefficient', 0.5, 'evaluation', (design->'evaluation') - 'kind') where id = $1`, [quoteId])
    await owner.query('alter table quotes enable trigger quotes_frozen')
    await owner.query(`delete from price_book_rates where code like 'coiling.setup-factor.%' and code not like '%.grade-%' or code like 'coiling.end-%' or code like 'coiling.index-%' or code like 'inspection.measurements-per-spring.%' or code in ('gate.energy-max-j', 'gate.caution.hook')`)
  })
  afterAll(async () => {
    await owner.query('rollback')
    await owner.end()
  })
  const designNow = async () => (await owner.query<{ design: StoredDesign }>('select design from quotes where id = $1', [quoteId])).rows[0]!.design

  it('has no spring in a sent quote, as laid back, and lacks the rates', async () => {
    expect(await designNow()).not.toHaveProperty('spring')
    expect(await designNow()).toHaveProperty('ends', 'closed-ground')
    const { rows } = await owner.query<{ least: number }>('select min(count)::int as least from (select count(*) from price_book_rates group by price_book_id) as counts')
    expect(rows[0]!.least).toBeLessThan(RATE_CODES.length)
  })

  it('gets the whole spring back, from which the very same values come', async () => {
    for (const statement of [...THREE_KINDS, ...HOOKS_AND_LEGS, ...KEPT_BEFORE]) await owner.query(statement)
    const design = await designNow()
    expect(design).toEqual({ ...kept, spring: { ...kept.spring, seatingCoefficient: 0.5 } })
    const evaluation = evaluateSpring(design.spring)
    if (evaluation.kind !== 'compression' || design.kind !== 'compression') throw new Error('no compression spring')
    for (const value of ['points', 'solid', 'tolerances', 'buckling', 'rateAtTemperatureNPerMm', 'massG'] as const) expect(evaluation[value]).toEqual(kept.evaluation[value])
  })

  it('has every rate in every book, none of which changes a price made by it', async () => {
    const { rows } = await owner.query<{ code: string, books: number, value: string }>('select code, count(*)::int as books, max(value) as value from price_book_rates group by code')
    const { rows: [{ books } = { books: 0 }] } = await owner.query<{ books: number }>('select count(*)::int as books from price_books')
    expect(books).toBeGreaterThan(0)
    expect(rows.map(row => row.code).sort()).toEqual(RATE_CODES.map(rate => rate.code).sort())
    expect(rows.filter(row => row.books !== books)).toEqual([])
    expect(Number(rows.find(row => row.code === 'coiling.index-slowing-percent')!.value)).toBe(0)
  })

  it('holds sent quotes frozen again afterwards', async () => {
    await owner.query('savepoint before')
    await expect(owner.query(`update quotes set note_to_customer = 'Changed' where id = $1`, [quoteId])).rejects.toThrow(/was sent/)
    await owner.query('rollback to savepoint before')
  })
})
