import { and, asc, eq, sql } from 'drizzle-orm'
import type { MaterialCode } from '#shared/spring/codes'
import { getMaterial, isMaterialCode } from '#shared/spring/materials'
import type { WireStockList } from '#shared/schemas/works'
import { wireProducts } from '../../database/schema'
import { assertRole, type ServiceContext } from '../context'
import { decodeCursor, encodeCursor } from '../cursor'
import { invalid } from '../errors'
import { reservedKg } from '../wire/free-kg'

/** Wire products by material and diameter with what is in the rack, set aside and free, a page at a time; of one material if asked. */
export async function listWireStock(context: ServiceContext, { cursor, limit, material }: { cursor?: string | undefined, limit: number, material?: MaterialCode | undefined }): Promise<WireStockList> {
  assertRole(context, 'admin', 'supervisor')
  const after = cursor ? readCursor(cursor) : null
  const rows = await context.db.select({
    id: wireProducts.id, material: wireProducts.material, wireDiameterMm: wireProducts.wireDiameterMm, pricePerKg: wireProducts.pricePerKg, currency: wireProducts.currency,
    stockKg: wireProducts.stockKg, reserved: sql<string>`(${reservedKg})::text`, freeKg: sql<string>`(${wireProducts.stockKg} - ${reservedKg})::text`,
    smallestPurchaseKg: wireProducts.smallestPurchaseKg, leadDays: wireProducts.leadDays, isActive: wireProducts.isActive,
  }).from(wireProducts)
    .where(and(
      material ? eq(wireProducts.material, material) : undefined,
      after ? sql`(${wireProducts.material}, ${wireProducts.wireDiameterMm}) > (${after.material}, ${after.wireDiameterMm}::double precision)` : undefined,
    ))
    .orderBy(asc(wireProducts.material), asc(wireProducts.wireDiameterMm)).limit(limit + 1)
  const materials = await context.db.selectDistinct({ code: wireProducts.material }).from(wireProducts).orderBy(asc(wireProducts.material))
  const page = rows.slice(0, limit)
  const last = page.at(-1)
  return {
    rows: page.map(row => ({ ...row, materialName: nameOf(row.material) })),
    materials: materials.map(({ code }) => ({ code, name: nameOf(code) })),
    nextCursor: rows.length > limit && last ? encodeCursor(last.material, String(last.wireDiameterMm)) : null,
  }
}

const nameOf = (material: string): string => isMaterialCode(material) ? getMaterial(material).name : material

function readCursor(cursor: string): { material: string, wireDiameterMm: number } {
  const [material = '', diameter = ''] = decodeCursor(cursor, 2)
  const wireDiameterMm = Number(diameter)
  if (diameter === '' || !Number.isFinite(wireDiameterMm) || material.includes('\0')) throw invalid('cursor', 'This page of the list does not exist. Start at the first one.')
  return { material, wireDiameterMm }
}
