import { eq } from 'drizzle-orm'
import type { JobView } from '#shared/schemas/shop'
import { placeJob, PlanningError } from '../../engine/planning'
import { jobs, operations } from '../../database/schema'
import { assertRole, databaseErrorCode, inTransaction, type ServiceContext } from '../context'
import { conflict, DomainError, notFound, stale } from '../errors'
import { jobNumberOf } from '../jobs/refs'
import { planCentresOf, readPlan } from '../orders/shop-plan'
import { lockJob, spanOf } from './lock-job'
import { readOneJob } from './place'
import { settlePlan } from './settle-plan'

/**
 * Places every operation of a job that has not started at the first time its work centres are free, one after another.
 * @throws DomainError stale, conflict when another hand took a place meanwhile, not-found
 */
export async function placeWholeJob(context: ServiceContext, ref: string, version: number): Promise<JobView> {
  assertRole(context, 'supervisor', 'admin')
  const [head] = await context.db.select({ id: jobs.id }).from(jobs).where(eq(jobs.number, jobNumberOf(ref)))
  if (!head) throw notFound('job')
  try {
    await inTransaction(context.db, async (tx) => {
      const locked = await lockJob(tx, head.id)
      if (locked.job.version !== version) throw stale('job')
      if (locked.job.state !== 'to-plan' && locked.job.state !== 'planned') throw conflict('This job has started. Move its operations one by one.')
      const shop = await readPlan(tx, { from: context.now, exceptJobId: head.id })
      const plan = placeJob({
        operations: locked.operations.map(row => ({ position: row.position, kind: row.kind, setUpMinutes: Number(row.setUpMinutes), runMinutes: Number(row.runMinutes) })),
        centres: planCentresOf(shop, context.timeZone), busyByCentre: shop.busyByCentre, wireDiameterMm: locked.wireDiameterMm, notBeforeMs: Math.ceil(context.now.getTime() / 300_000) * 300_000,
      })
      for (const row of locked.operations) await tx.update(operations).set({ workCentreId: null, plannedSpan: null }).where(eq(operations.id, row.id))
      for (const placed of plan.operations) {
        const row = locked.operations.find(step => step.position === placed.position)!
        await tx.update(operations).set({ workCentreId: placed.centreId, plannedSpan: spanOf(placed.startMs, placed.endMs), state: 'planned', version: row.version + 1 }).where(eq(operations.id, row.id))
      }
      await settlePlan(tx, context, head.id)
    })
  }
  catch (error) {
    if (error instanceof PlanningError) throw new DomainError('conflict', error.message)
    if (databaseErrorCode(error) === '23P01') throw conflict('Somebody has just placed another job there. Try again.')
    throw error
  }
  return readOneJob(context, head.id)
}
