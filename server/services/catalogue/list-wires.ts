import { asc, eq, sql } from 'drizzle-orm'
import { isMaterialCode } from '#shared/spring/materials'
import type { SizingWire } from '#shared/spring/sizing/types'
import { wireProducts } from '../../database/schema'
import type { PricedWireProduct } from '../../engine/pricing'
import type { Database } from '../../database/client'
import { rememberFor } from '../remember'
import { reservedKg } from '../wire/free-kg'

/** A wire product as sizing and pricing see it. `stockKg` is what is free: in the rack and not set aside for a job. */
export type CatalogueWire = SizingWire & PricedWireProduct & { currency: string }

/**
 * Every wire that may be bought. Kept for two seconds, since typing in the order form asks for it many times a minute: stock
 * only decides what is charged for, and the wire of a job is set aside under a lock when the deposit is paid.
 */
export const listCatalogueWires: (db: Database) => Promise<readonly CatalogueWire[]> = rememberFor(2_000, async db => sameIfEqual(db, await readWires(db)))

const last = new WeakMap<Database, { text: string, wires: readonly CatalogueWire[] }>()

/** Gives the list of before while nothing in it has changed, so that what was found in it is still known. */
function sameIfEqual(db: Database, wires: readonly CatalogueWire[]): readonly CatalogueWire[] {
  const text = JSON.stringify(wires)
  const before = last.get(db)
  if (before?.text === text) return before.wires
  last.set(db, { text, wires })
  return wires
}

async function readWires(db: Database): Promise<CatalogueWire[]> {
  const rows = await db.select({
    id: wireProducts.id, material: wireProducts.material, wireDiameterMm: wireProducts.wireDiameterMm, currency: wireProducts.currency, pricePerKg: wireProducts.pricePerKg,
    stockKg: sql<string>`greatest(${wireProducts.stockKg} - ${reservedKg}, 0)`, smallestPurchaseKg: wireProducts.smallestPurchaseKg, leadDays: wireProducts.leadDays,
  }).from(wireProducts).where(eq(wireProducts.isActive, true)).orderBy(asc(wireProducts.material), asc(wireProducts.wireDiameterMm))
  return rows.flatMap(row => isMaterialCode(row.material)
    ? [{ ...row, material: row.material, currency: row.currency.toLowerCase(), stocked: Number(row.stockKg) > 0 }]
    : [])
}
