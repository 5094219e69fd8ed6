import { and, asc, eq, isNull, sql } from 'drizzle-orm'
import type { z } from 'zod'
import type { BenchAct, benchRecordBodySchema, BenchView, OperationState } from '#shared/schemas/shop'
import { OPERATION_NAMES } from '#shared/schemas/shop'
import { benchRecords, jobs, operations, orders, wireProducts, wireReservations, workCentres } from '../../database/schema'
import { assertRole, brokenConstraint, inTransaction, type Actor, type ServiceContext, type Transaction } from '../context'
import { conflict, DomainError, invalid, notFound } from '../errors'
import { enqueueMail } from '../mail/enqueue'
import { readJobMailFacts } from '../jobs/mail-facts'
import { moveOrder } from '../orders/move'
import { readClock } from './clock'
import { readBench } from './view'

export type BenchRecord = z.output<typeof benchRecordBodySchema>

/** Where each act is possible, and what it makes of the operation. */
const ACTS: Readonly<Record<BenchAct, { from: readonly OperationState[], to: OperationState | 'before-pause' | null, words: string }>> = {
  start: { from: ['planned'], to: 'setting-up', words: 'started' },
  run: { from: ['setting-up'], to: 'running', words: 'run' },
  pause: { from: ['setting-up', 'running'], to: 'paused', words: 'paused' },
  resume: { from: ['paused'], to: 'before-pause', words: 'taken up again' },
  count: { from: ['setting-up', 'running', 'paused'], to: null, words: 'counted' },
  finish: { from: ['setting-up', 'running', 'paused'], to: 'finished', words: 'finished' },
}

/**
 * Records what an operator did. The record's id comes from the device: the same one twice counts once. The first start of
 * a job puts its order in work, the last finish finishes it; both in the same transaction as the record.
 * @throws DomainError conflict when the act does not fit the operation's state, invalid for counts that cannot be
 */
export async function recordBench(context: ServiceContext, operationId: string, record: BenchRecord): Promise<BenchView> {
  const actor = assertRole(context, 'operator', 'supervisor', 'admin')
  const code = await inTransaction(context.db, tx => writeRecord(tx, context, actor, operationId, record))
  return readBench(context, code)
}

async function writeRecord(tx: Transaction, context: ServiceContext, actor: Actor, operationId: string, record: BenchRecord): Promise<string> {
  const [found] = await tx.select({ jobId: operations.jobId }).from(operations).where(eq(operations.id, operationId))
  if (!found) throw notFound('operation')
  // One lock order everywhere: order, job, operation.
  const [head] = await tx.select({ orderId: orders.id })
    .from(orders).innerJoin(jobs, eq(jobs.orderId, orders.id)).where(eq(jobs.id, found.jobId)).for('update', { of: orders })
  const [job] = await tx.select().from(jobs).where(eq(jobs.id, found.jobId)).for('update')
  const [operation] = await tx.select().from(operations).where(eq(operations.id, operationId)).for('update')
  if (!head || !job || !operation) throw notFound('operation')
  const [centre] = operation.workCentreId ? await tx.select({ code: workCentres.code }).from(workCentres).where(eq(workCentres.id, operation.workCentreId)) : []
  if (!centre) throw conflict('This operation is not planned. The supervisor places it first.')

  const [existing] = await tx.select({ operationId: benchRecords.operationId }).from(benchRecords).where(eq(benchRecords.id, record.id))
  if (existing && existing.operationId !== operationId) throw conflict('This record was made for another operation. Load the page again.')
  if (existing) return centre.code
  const act = ACTS[record.act]
  if (!act.from.includes(operation.state)) throw conflict(`This operation is ${operation.state.replace('-', ' ')}, so it cannot be ${act.words} now.`)
  if (record.act === 'start') await assertTurn(tx, operation, job)
  if (record.act === 'start' || record.act === 'resume') await assertCentreFree(tx, operation)

  const past = await tx.select({ act: benchRecords.act, at: benchRecords.at, good: benchRecords.good, scrap: benchRecords.scrap })
    .from(benchRecords).where(eq(benchRecords.operationId, operationId)).orderBy(asc(benchRecords.at))
  await tx.insert(benchRecords).values({
    id: record.id, operationId, act: record.act, at: context.now, personId: actor.personId, good: record.good, scrap: record.scrap,
    wireKg: record.wireKg === undefined ? null : String(record.wireKg), note: record.note,
  })
  const good = past.reduce((sum, row) => sum + row.good, record.good)
  const scrap = past.reduce((sum, row) => sum + row.scrap, record.scrap)
  if (good < 0 || scrap < 0) throw invalid(good < 0 ? 'good' : 'scrap', 'More is taken away than was counted.')
  const clock = readClock([...past, { act: record.act, at: context.now }], context.now)

  if (record.act === 'finish') await finishOperation(tx, context, { operation, job, record, good, scrap, clock })
  else {
    const to = act.to === 'before-pause' ? (clock.phase === 'run' ? 'running' : 'setting-up') : act.to ?? operation.state
    await tx.update(operations).set({ state: to, version: operation.version + 1, startedAt: operation.startedAt ?? context.now }).where(eq(operations.id, operationId))
  }

  if (record.act === 'start' && job.state === 'planned') {
    await tx.update(jobs).set({ state: 'in-work', version: job.version + 1 }).where(eq(jobs.id, job.id))
    await moveOrder(tx, { orderId: head.orderId, from: ['planned'], to: 'in-work', why: `${OPERATION_NAMES[operation.kind]} started`, personId: actor.personId, now: context.now })
    const facts = await readJobMailFacts(tx, job.id, context)
    await enqueueMail(tx, { kind: 'job-in-work', objectId: job.id, recipient: facts.recipient, orderId: facts.orderId, payload: { ...facts.about, quantity: facts.quantity, leavesOn: facts.leavesOn, orderUrl: facts.orderUrl } })
  }
  if (record.act === 'finish') await finishJobIfLast(tx, context, actor, job, head)
  return centre.code
}

async function assertTurn(tx: Transaction, operation: typeof operations.$inferSelect, job: typeof jobs.$inferSelect): Promise<void> {
  // Started sooner, the job could be planned anew over work that is being done.
  if (job.state !== 'planned' && job.state !== 'in-work') throw conflict('Not every operation of this job has its place yet. The supervisor plans the rest first.')
  const [open] = await tx.select({ kind: operations.kind }).from(operations)
    .where(and(eq(operations.jobId, operation.jobId), sql`${operations.position} < ${operation.position}`, sql`${operations.state} <> 'finished'`)).limit(1)
  if (open) throw conflict(`${OPERATION_NAMES[open.kind]} of this job is not finished yet.`)
}

/** Of two jobs begun at one work centre in the same moment, the second waits here and then sees the first. */
async function assertCentreFree(tx: Transaction, operation: typeof operations.$inferSelect): Promise<void> {
  await tx.select({ id: workCentres.id }).from(workCentres).where(eq(workCentres.id, operation.workCentreId!)).for('no key update')
  const [busy] = await tx.select({ id: operations.id }).from(operations)
    .where(and(eq(operations.workCentreId, operation.workCentreId!), sql`${operations.state} in ('setting-up', 'running')`)).limit(1)
  if (busy) throw conflict('Another operation runs at this work centre. Pause or finish it first.')
}

type Finish = {
  operation: typeof operations.$inferSelect, job: typeof jobs.$inferSelect, record: BenchRecord, good: number, scrap: number, clock: { setUpMinutes: number, runMinutes: number }
}

async function finishOperation(tx: Transaction, context: ServiceContext, { operation, job, record, good, scrap, clock }: Finish): Promise<void> {
  const [previous] = await tx.select({ goodCount: operations.goodCount }).from(operations)
    .where(and(eq(operations.jobId, operation.jobId), eq(operations.position, operation.position - 1)))
  if (previous?.goodCount !== undefined && previous.goodCount !== null && good + scrap > previous.goodCount)
    throw invalid('good', `${good + scrap} springs are more than the ${previous.goodCount} that came from the operation before.`)
  if (operation.kind === 'coiling') {
    if (good < 1) throw invalid('good', 'Give how many good springs were coiled.')
    if (record.wireKg === undefined || record.wireKg <= 0) throw invalid('wireKg', 'Give the mass of wire used, in kg: weigh the coil before and after.')
    await useWire(tx, job.id, record.wireKg)
  }
  await tx.update(operations).set({
    state: 'finished', version: operation.version + 1, finishedAt: context.now, startedAt: operation.startedAt ?? context.now, goodCount: good, scrapCount: scrap,
    actualSetUpMinutes: (record.setUpMinutes ?? clock.setUpMinutes).toFixed(2), actualRunMinutes: (record.runMinutes ?? clock.runMinutes).toFixed(2),
    wireUsedKg: operation.kind === 'coiling' ? String(record.wireKg) : null,
  }).where(eq(operations.id, operation.id))
}

/** Takes the wire off the rack. The rack cannot go below nought. */
async function useWire(tx: Transaction, jobId: string, wireKg: number): Promise<void> {
  const [reservation] = await tx.update(wireReservations).set({ usedKg: String(wireKg) })
    .where(and(eq(wireReservations.jobId, jobId), isNull(wireReservations.usedKg))).returning({ wireProductId: wireReservations.wireProductId })
  if (!reservation) return
  try {
    await tx.transaction(inner => inner.update(wireProducts).set({ stockKg: sql`${wireProducts.stockKg} - ${String(wireKg)}::numeric` }).where(eq(wireProducts.id, reservation.wireProductId)))
  }
  catch (error) {
    if (brokenConstraint(error) !== 'wire_products_positive') throw error
    throw new DomainError('invalid', 'The rack holds less than that.', [{ path: 'wireKg', message: 'The rack holds less of this wire than that. Check the mass, or have the stock corrected first.' }])
  }
}

async function finishJobIfLast(tx: Transaction, context: ServiceContext, actor: Actor, job: typeof jobs.$inferSelect, head: { orderId: string }): Promise<void> {
  const [open] = await tx.select({ id: operations.id }).from(operations).where(and(eq(operations.jobId, job.id), sql`${operations.state} <> 'finished'`)).limit(1)
  if (open) return
  await tx.update(jobs).set({ state: 'finished', finishedAt: context.now, version: sql`${jobs.version} + 1` }).where(eq(jobs.id, job.id))
  await moveOrder(tx, { orderId: head.orderId, from: ['in-work'], to: 'finished', why: 'The last operation is finished', personId: actor.personId, now: context.now })
  const facts = await readJobMailFacts(tx, job.id, context)
  await enqueueMail(tx, {
    kind: 'job-finished', objectId: job.id, recipient: facts.recipient, orderId: facts.orderId,
    payload: { ...facts.about, quantity: facts.quantity, balanceMinor: facts.balanceMinor, currency: facts.currency, orderUrl: facts.orderUrl },
  })
}
