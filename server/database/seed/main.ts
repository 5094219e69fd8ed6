/**
 * Fills an empty database with the demonstration shop, an invented firm. Does nothing when people are there already.
 * Usage: WIREWRIGHT_MODE=demo NUXT_DATABASE_URL=... WIREWRIGHT_DEMO_SIGN_INS_FILE=... tsx server/database/seed/main.ts
 */
import { writeFile } from 'node:fs/promises'
import { sql } from 'drizzle-orm'
import { createDatabase, createPool, type Transaction } from '../client'
import { companies, holidays, people, personRoles, priceBookRates, priceBooks, wireProducts, workCentres } from '../schema'
import { buildDefaultRates } from '../../engine/pricing/rate-codes'
import { hashPassword } from '../../services/sessions/passwords'
import { standardDiametersMm } from '../../../shared/spring/materials'
import type { MaterialCode } from '../../../shared/spring/codes'
import { DEMO_COMPANIES, DEMO_PEOPLE } from './demo-people'
import { seedHistory } from './history'
import { DEMO_CENTRES, DEMO_HOLIDAYS, DEMO_WIRE_PRICES, demoPricePerKg, demoSmallestPurchaseKg, demoStockKg } from './demo-shop'

const CURRENCY = 'eur'
const SEED_LOCK = 728_115

async function seedPeople(tx: Transaction): Promise<void> {
  const rows = await tx.insert(companies).values(DEMO_COMPANIES.map(({ name, countryCode, vatNumber }) => ({ name, countryCode, vatNumber }))).returning({ id: companies.id, name: companies.name })
  const companyIds = new Map(DEMO_COMPANIES.map(company => [company.key as string, rows.find(row => row.name === company.name)!.id]))
  for (const person of DEMO_PEOPLE) {
    const [row] = await tx.insert(people).values({
      email: person.email, name: person.name, companyId: person.company ? companyIds.get(person.company)! : null, passwordHash: await hashPassword(person.password),
      emailConfirmedAt: sql`now()`, isDemo: true,
    }).returning({ id: people.id })
    await tx.insert(personRoles).values(person.roles.map(role => ({ personId: row!.id, role })))
  }
}

async function seedPriceBooks(tx: Transaction): Promise<void> {
  const current = buildDefaultRates()
  const before = { ...current, 'hourly.coiling': '52.00', 'hourly.end-grinding': '44.00', 'packing.per-order': '11.50' }
  for (const [number, inForceFrom, rates] of [[40, '2026-01-05', before], [41, '2026-11-23', current]] as const) {
    const [book] = await tx.insert(priceBooks).values({ number, currency: CURRENCY, inForceFrom }).returning({ id: priceBooks.id })
    await tx.insert(priceBookRates).values(Object.entries(rates).map(([code, value]) => ({ priceBookId: book!.id, code, value })))
  }
}

async function seedShop(tx: Transaction): Promise<void> {
  await tx.insert(workCentres).values([...DEMO_CENTRES])
  await tx.insert(holidays).values([...DEMO_HOLIDAYS])
  const wires = Object.entries(DEMO_WIRE_PRICES).flatMap(([code, { perKgAt2Mm, leadDays }]) => {
    const material = code as MaterialCode
    return standardDiametersMm(material).map(wireDiameterMm => ({
      material, wireDiameterMm, currency: CURRENCY, leadDays, pricePerKg: demoPricePerKg(perKgAt2Mm, wireDiameterMm),
      stockKg: String(demoStockKg(material, wireDiameterMm)), smallestPurchaseKg: String(demoSmallestPurchaseKg(wireDiameterMm)),
    }))
  })
  await tx.insert(wireProducts).values(wires)
}

async function main(): Promise<void> {
  if (process.env.WIREWRIGHT_MODE !== 'demo' && process.env.WIREWRIGHT_MODE !== 'test') throw new Error('The demonstration shop is for WIREWRIGHT_MODE=demo or test only.')
  const connectionString = process.env.NUXT_DATABASE_URL
  if (!connectionString) throw new Error('NUXT_DATABASE_URL is missing.')
  const pool = createPool(connectionString, error => console.error(error.message))
  try {
    const db = createDatabase(pool)
    const isNew = await db.transaction(async (tx) => {
      await tx.execute(sql`select pg_advisory_xact_lock(${SEED_LOCK})`)
      const [someone] = await tx.select({ id: people.id }).from(people).limit(1)
      if (someone) return false
      await seedPeople(tx)
      await seedPriceBooks(tx)
      await seedShop(tx)
      return true
    })
    // Tests make their own orders, so they start with none.
    if (isNew && process.env.WIREWRIGHT_MODE === 'demo') await seedHistory(db, { origin: process.env.NUXT_ORIGIN ?? 'http://127.0.0.1:3000', timeZone: process.env.NUXT_SHOP_TIME_ZONE ?? 'Europe/Dublin', now: new Date() })
    const file = process.env.WIREWRIGHT_DEMO_SIGN_INS_FILE
    if (file) await writeFile(file, `${JSON.stringify(DEMO_PEOPLE.map(({ roles, email, password }) => ({ role: roles.join(', '), email, password })), null, 2)}\n`, { mode: 0o600 })
  }
  finally {
    await pool.end()
  }
}

main().catch((error: unknown) => {
  console.error(error instanceof Error ? `Seed failed: ${error.message}${error.cause instanceof Error ? ` (${error.cause.message})` : ''}` : error)
  process.exitCode = 1
})
