import { and, eq, ne, sql } from 'drizzle-orm'
import type { JobView } from '#shared/schemas/shop'
import { OPERATION_NAMES } from '#shared/schemas/shop'
import { addWorkingMinutes, earliestSlot, nextWorkingInstant, PlanningError, takesWire, type PlanCentre } from '../../engine/planning'
import { jobs, operations } from '../../database/schema'
import { assertRole, databaseErrorCode, inTransaction, type Queryable, type ServiceContext, type Transaction } from '../context'
import { conflict, invalid, notFound, stale } from '../errors'
import { jobRefOf } from '../jobs/refs'
import type { OperationRow } from '../jobs/operation-columns'
import { planCentresOf, readPlan } from '../orders/shop-plan'
import { lockJob, spanOf, type LockedJob } from './lock-job'
import { readJobs } from './read-jobs'
import { settlePlan } from './settle-plan'

const EXCLUSION_VIOLATION = '23P01'
/** A plan further ahead than two years is a slip of the hand; the database counts no further than the year 9999 anyhow. */
const FURTHEST_MS = 2 * 366 * 86_400_000

const minutesOf = (operation: OperationRow) => Math.max(1, Number(operation.setUpMinutes) + Number(operation.runMinutes))

const momentWords = (ms: number, timeZone: string) =>
  new Intl.DateTimeFormat('en-GB', { timeZone, weekday: 'short', day: 'numeric', month: 'short', hour: '2-digit', minute: '2-digit' }).format(ms)

/** The job of an operation. @throws DomainError not-found */
async function jobOf(db: Queryable, operationId: string): Promise<string> {
  const [row] = await db.select({ jobId: operations.jobId }).from(operations).where(eq(operations.id, operationId))
  if (!row) throw notFound('operation')
  return row.jobId
}

/**
 * Places one operation on a work centre from a time on. Its end follows from its minutes and the shifts. That no two
 * operations overlap is refused by the database itself; the refusal names the other job and the first free time.
 * @throws DomainError conflict, invalid, stale, not-found
 */
export async function placeOperation(context: ServiceContext, operationId: string, input: { centreId: string, startsAt: string, version: number }): Promise<JobView> {
  assertRole(context, 'supervisor', 'admin')
  const jobId = await jobOf(context.db, operationId)
  const centres = planCentresOf(await readPlan(context.db), context.timeZone)
  await inTransaction(context.db, async (tx) => {
    const locked = await lockJob(tx, jobId)
    const operation = assertMovable(locked, operationId, input.version)
    const centre = assertAble(centres, operation, locked.wireDiameterMm, input.centreId)
    const startMs = Date.parse(input.startsAt)
    const endMs = timeOrRefusal(() => assertTime(context, locked, operation, centre, startMs))
    await writeSpan(tx, context, { operation, centre, startMs, endMs })
    await settlePlan(tx, context, jobId)
  })
  return readOneJob(context, jobId)
}

function assertMovable(locked: LockedJob, operationId: string, version: number): OperationRow {
  const operation = locked.operations.find(row => row.id === operationId)
  if (!operation) throw notFound('operation')
  if (operation.version !== version) throw stale('operation')
  if (operation.state !== 'waiting' && operation.state !== 'planned') throw conflict('This operation has started, so it can no longer be moved.')
  return operation
}

function assertAble(centres: readonly PlanCentre[], operation: OperationRow, wireDiameterMm: number, centreId: string): PlanCentre {
  const centre = centres.find(row => row.id === centreId)
  if (!centre) throw invalid('centreId', 'Choose a work centre from the list.')
  if (centre.kind !== operation.kind) throw invalid('centreId', `${OPERATION_NAMES[operation.kind]} is not done at this work centre.`)
  if (!takesWire(centre, wireDiameterMm)) throw invalid('centreId', `This work centre takes wire of ${centre.wireFromMm} to ${centre.wireToMm} mm; this job's is ${wireDiameterMm} mm.`)
  return centre
}

/** A work centre that never opens is a refusal in the plan's own words. */
function timeOrRefusal(find: () => number): number {
  try {
    return find()
  }
  catch (error) {
    throw error instanceof PlanningError ? conflict(error.message) : error
  }
}

function assertTime(context: ServiceContext, locked: LockedJob, operation: OperationRow, centre: PlanCentre, startMs: number): number {
  if (startMs < context.now.getTime() - 60_000) throw invalid('startsAt', 'This time has passed.')
  if (startMs > context.now.getTime() + FURTHEST_MS) throw invalid('startsAt', 'This is more than two years ahead.')
  const opensMs = nextWorkingInstant(centre.calendar, startMs)
  if (opensMs !== startMs) throw invalid('startsAt', `The work centre is closed then. It opens ${momentWords(opensMs, context.timeZone)}.`)
  const endMs = addWorkingMinutes(centre.calendar, startMs, minutesOf(operation))
  for (const other of locked.operations) {
    if (other.position < operation.position && other.endsAt && other.endsAt.getTime() > startMs)
      throw invalid('startsAt', `${OPERATION_NAMES[other.kind]} of this job is done only ${momentWords(other.endsAt.getTime(), context.timeZone)}. Start then or later.`)
    if (other.position > operation.position && other.startsAt && other.startsAt.getTime() < endMs)
      throw invalid('startsAt', `It would be done ${momentWords(endMs, context.timeZone)}, after ${OPERATION_NAMES[other.kind].toLowerCase()} of this job starts. Move that first.`)
  }
  return endMs
}

async function writeSpan(tx: Transaction, context: ServiceContext, { operation, centre, startMs, endMs }: { operation: OperationRow, centre: PlanCentre, startMs: number, endMs: number }): Promise<void> {
  try {
    await tx.transaction(inner => inner.update(operations)
      .set({ workCentreId: centre.id, plannedSpan: spanOf(startMs, endMs), state: 'planned', version: operation.version + 1 }).where(eq(operations.id, operation.id)))
  }
  catch (error) {
    if (databaseErrorCode(error) !== EXCLUSION_VIOLATION) throw error
    throw conflict(await clashWords(tx, context, { operation, centre, startMs, endMs }))
  }
}

/** Who is in the way, and when the work centre is first free for this operation. */
async function clashWords(tx: Transaction, context: ServiceContext, { operation, centre, startMs, endMs }: { operation: OperationRow, centre: PlanCentre, startMs: number, endMs: number }): Promise<string> {
  const [other] = await tx.select({ number: jobs.number }).from(operations).innerJoin(jobs, eq(jobs.id, operations.jobId))
    .where(and(eq(operations.workCentreId, centre.id), ne(operations.id, operation.id), sql`${operations.plannedSpan} && ${spanOf(startMs, endMs)}::tstzrange`)).orderBy(sql`lower(${operations.plannedSpan})`).limit(1)
  const { busyByCentre } = await readPlan(tx)
  const free = earliestSlot({ calendar: centre.calendar, busy: busyByCentre[centre.id] ?? [], durationMinutes: minutesOf(operation), notBeforeMs: startMs })
  const who = other ? jobRefOf(other.number) : 'Another job'
  return `${who} has this work centre at that time. It is free for this operation from ${momentWords(free.startMs, context.timeZone)}.`
}

/** Takes an operation out of the plan. @throws DomainError conflict, stale, not-found */
export async function unplaceOperation(context: ServiceContext, operationId: string, version: number): Promise<JobView> {
  assertRole(context, 'supervisor', 'admin')
  const jobId = await jobOf(context.db, operationId)
  await inTransaction(context.db, async (tx) => {
    const locked = await lockJob(tx, jobId)
    const operation = assertMovable(locked, operationId, version)
    if (locked.job.state === 'in-work') throw conflict('This job is in work. Move the operation to another time instead of taking it out.')
    await tx.update(operations).set({ workCentreId: null, plannedSpan: null, state: 'waiting', version: operation.version + 1 }).where(eq(operations.id, operation.id))
    await settlePlan(tx, context, jobId)
  })
  return readOneJob(context, jobId)
}

/** The job as Loading shows it. */
export async function readOneJob(context: ServiceContext, jobId: string): Promise<JobView> {
  const [job] = await readJobs(context.db, eq(jobs.id, jobId), { limit: 1, timeZone: context.timeZone })
  if (!job) throw notFound('job')
  return job
}
