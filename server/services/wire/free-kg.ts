import { and, eq, isNull, ne, sql } from 'drizzle-orm'
import type { Queryable } from '../../database/client'
import { jobs, wireProducts, wireReservations } from '../../database/schema'

/** Mass of a wire product that is set aside for jobs and not yet used, in kg. */
export const reservedKg = sql<string>`coalesce((
  select sum(${wireReservations.massKg}) from ${wireReservations} join ${jobs} on ${jobs.id} = ${wireReservations.jobId}
  where ${wireReservations.wireProductId} = ${wireProducts.id} and ${wireReservations.usedKg} is null and ${jobs.state} <> 'cancelled'), 0)`

/** Locks a wire product and tells what of it is free for another job: stock less what is set aside, in kg. May be negative. */
export async function lockFreeKg(tx: Queryable, wireProductId: string): Promise<number> {
  const [product] = await tx.select({ stockKg: wireProducts.stockKg }).from(wireProducts).where(eq(wireProducts.id, wireProductId)).for('update')
  if (!product) throw new Error(`wire product ${wireProductId} is gone`)
  const [sum] = await tx.select({ kg: sql<string>`coalesce(sum(${wireReservations.massKg}), 0)` }).from(wireReservations)
    .innerJoin(jobs, eq(jobs.id, wireReservations.jobId))
    .where(and(eq(wireReservations.wireProductId, wireProductId), isNull(wireReservations.usedKg), ne(jobs.state, 'cancelled')))
  return Number(product.stockKg) - Number(sum?.kg ?? 0)
}
