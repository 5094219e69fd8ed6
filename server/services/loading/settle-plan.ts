import { eq, sql } from 'drizzle-orm'
import { jobs } from '../../database/schema'
import type { ServiceContext, Transaction } from '../context'
import { readJobMailFacts } from '../jobs/mail-facts'
import { enqueueMail } from '../mail/enqueue'
import { moveOrder } from '../orders/move'
import { lockJob } from './lock-job'

/**
 * Draws the consequences of a changed plan: a job whose every operation is placed is planned and its customer is told the
 * day; one that lost an operation waits again; a day that moved is told anew. Called in the transaction of the change.
 */
export async function settlePlan(tx: Transaction, context: ServiceContext, jobId: string): Promise<void> {
  const { job, orderId, operations } = await lockJob(tx, jobId)
  const isPlanned = operations.every(operation => operation.startsAt !== null)
  const facts = await readJobMailFacts(tx, jobId, context)
  const personId = context.actor?.personId ?? null
  const state = job.state === 'to-plan' && isPlanned ? 'planned' : job.state === 'planned' && !isPlanned ? 'to-plan' : job.state
  await tx.update(jobs).set({ state, version: sql`${jobs.version} + 1`, toldOn: facts.leavesOn ?? job.toldOn }).where(eq(jobs.id, jobId))
  if (state !== job.state) {
    await moveOrder(tx, state === 'planned'
      ? { orderId, from: ['deposit-paid'], to: 'planned', why: 'Every operation has its place in the plan', personId, now: context.now }
      : { orderId, from: ['planned'], to: 'deposit-paid', why: 'An operation was taken out of the plan', personId, now: context.now })
  }
  if (!facts.leavesOn || facts.leavesOn === job.toldOn) return
  const about = { ...facts.about, leavesOn: facts.leavesOn, orderUrl: facts.orderUrl }
  if (job.toldOn === null) await enqueueMail(tx, { kind: 'job-planned', objectId: jobId, recipient: facts.recipient, orderId, payload: about })
  // The job's version makes a return to an earlier day a mail of its own.
  else await enqueueMail(tx, { kind: 'job-date-changed', objectId: jobId, recipient: facts.recipient, orderId, step: `${facts.leavesOn}#${job.version}`, payload: { ...about, previouslyOn: job.toldOn } })
}
