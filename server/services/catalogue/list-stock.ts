import { asc, sql } from 'drizzle-orm'
import { getMaterial, isMaterialCode } from '#shared/spring/materials'
import type { WireStockList } from '#shared/schemas/works'
import { wireProducts } from '../../database/schema'
import { assertRole, type ServiceContext } from '../context'
import { decodeCursor, encodeCursor } from '../cursor'
import { invalid } from '../errors'
import { reservedKg } from '../wire/free-kg'

/** Wire products by material and diameter with what is in the rack and what is set aside, a page at a time. */
export async function listWireStock(context: ServiceContext, { cursor, limit }: { cursor?: string | undefined, limit: number }): Promise<WireStockList> {
  assertRole(context, 'admin', 'supervisor')
  const after = cursor ? readCursor(cursor) : null
  const rows = await context.db.select({
    id: wireProducts.id, material: wireProducts.material, wireDiameterMm: wireProducts.wireDiameterMm, pricePerKg: wireProducts.pricePerKg, currency: wireProducts.currency,
    stockKg: wireProducts.stockKg, reserved: reservedKg, smallestPurchaseKg: wireProducts.smallestPurchaseKg, leadDays: wireProducts.leadDays, isActive: wireProducts.isActive,
  }).from(wireProducts)
    .where(after ? sql`(${wireProducts.material}, ${wireProducts.wireDiameterMm}) > (${after.material}, ${after.wireDiameterMm}::double precision)` : undefined)
    .orderBy(asc(wireProducts.material), asc(wireProducts.wireDiameterMm)).limit(limit + 1)
  const page = rows.slice(0, limit)
  const last = page.at(-1)
  return {
    rows: page.map(row => ({ ...row, materialName: isMaterialCode(row.material) ? getMaterial(row.material).name : row.material })),
    nextCursor: rows.length > limit && last ? encodeCursor(last.material, String(last.wireDiameterMm)) : null,
  }
}

function readCursor(cursor: string): { material: string, wireDiameterMm: number } {
  const [material = '', diameter = ''] = decodeCursor(cursor, 2)
  const wireDiameterMm = Number(diameter)
  if (diameter === '' || !Number.isFinite(wireDiameterMm) || material.includes('\0')) throw invalid('cursor', 'This page of the list does not exist. Start at the first one.')
  return { material, wireDiameterMm }
}
