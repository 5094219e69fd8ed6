import { and, asc, eq, sql } from 'drizzle-orm'
import type { z } from 'zod'
import type { receiveWireBodySchema } from '#shared/schemas/works'
import { jobs, wireProducts, wireReceipts, wireReservations } from '../../database/schema'
import { recordAudit } from '../audit/record'
import { assertRole, inTransaction, type ServiceContext, type Transaction } from '../context'
import { notFound } from '../errors'
import { jobRefOf } from '../jobs/refs'

/**
 * Takes wire into the rack and tells the jobs that waited for it, oldest first, as far as it goes. The same receipt sent
 * twice counts once.
 * @throws DomainError not-found
 */
export async function receiveWire(context: ServiceContext, wireProductId: string, receipt: z.output<typeof receiveWireBodySchema>): Promise<{ stockKg: string, jobsCovered: string[] }> {
  const actor = assertRole(context, 'supervisor', 'admin')
  return inTransaction(context.db, async (tx) => {
    const [product] = await tx.select().from(wireProducts).where(eq(wireProducts.id, wireProductId)).for('update')
    if (!product) throw notFound('wire')
    const inserted = await tx.insert(wireReceipts).values({ id: receipt.id, wireProductId, massKg: String(receipt.massKg), personId: actor.personId, note: receipt.note }).onConflictDoNothing().returning({ id: wireReceipts.id })
    if (inserted.length === 0) return { stockKg: product.stockKg, jobsCovered: [] }
    const [stocked] = await tx.update(wireProducts).set({ stockKg: sql`${wireProducts.stockKg} + ${String(receipt.massKg)}::numeric` }).where(eq(wireProducts.id, wireProductId)).returning({ stockKg: wireProducts.stockKg })
    await recordAudit(tx, { personId: actor.personId, action: 'wire.receive', object: wireProductId, detail: `${receipt.massKg} kg${receipt.note ? `, ${receipt.note}` : ''}` })
    return { stockKg: stocked!.stockKg, jobsCovered: await coverJobs(tx, wireProductId, Number(stocked!.stockKg)) }
  })
}

/** Marks waiting jobs as covered while the rack holds enough for all that is set aside up to them. */
async function coverJobs(tx: Transaction, wireProductId: string, stockKg: number): Promise<string[]> {
  const waiting = await tx.select({ jobId: jobs.id, number: jobs.number, massKg: wireReservations.massKg, waitsForWire: jobs.waitsForWire })
    .from(wireReservations).innerJoin(jobs, eq(jobs.id, wireReservations.jobId))
    .where(and(eq(wireReservations.wireProductId, wireProductId), sql`${wireReservations.usedKg} is null and ${jobs.state} <> 'cancelled'`))
    .orderBy(asc(jobs.waitsForWire), asc(jobs.createdAt)).limit(1_000)
  let leftKg = stockKg
  const covered: string[] = []
  for (const job of waiting) {
    leftKg -= Number(job.massKg)
    if (!job.waitsForWire || leftKg < 0) continue
    await tx.update(jobs).set({ waitsForWire: false }).where(eq(jobs.id, job.jobId))
    covered.push(jobRefOf(job.number))
  }
  return covered
}
