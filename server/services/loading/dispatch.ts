import { eq } from 'drizzle-orm'
import type { JobView } from '#shared/schemas/shop'
import { formatMoney, toCurrency } from '#shared/money'
import { jobs } from '../../database/schema'
import { assertRole, inTransaction, type ServiceContext } from '../context'
import { conflict, notFound, stale } from '../errors'
import { readJobMailFacts } from '../jobs/mail-facts'
import { jobNumberOf } from '../jobs/refs'
import { enqueueMail } from '../mail/enqueue'
import { moveOrder } from '../orders/move'
import { lockJob } from './lock-job'
import { readOneJob } from './place'

/**
 * Records that a finished and paid job has left. The order is dispatched and, as all is paid, settled.
 * @throws DomainError conflict while the job is not finished or the balance is open
 */
export async function dispatchJob(context: ServiceContext, ref: string, version: number): Promise<JobView> {
  const actor = assertRole(context, 'supervisor', 'admin')
  const [head] = await context.db.select({ id: jobs.id }).from(jobs).where(eq(jobs.number, jobNumberOf(ref)))
  if (!head) throw notFound('job')
  await inTransaction(context.db, async (tx) => {
    const { job, orderId } = await lockJob(tx, head.id)
    if (job.version !== version) throw stale('job')
    if (job.state !== 'finished') throw conflict('Only a finished job can be dispatched.')
    const facts = await readJobMailFacts(tx, job.id, context)
    if (facts.balanceMinor > 0) throw conflict(`The balance of ${formatMoney(facts.balanceMinor, toCurrency(facts.currency))} is not paid yet. The customer was asked for it by e-mail.`)
    await tx.update(jobs).set({ state: 'dispatched', version: job.version + 1 }).where(eq(jobs.id, job.id))
    await moveOrder(tx, { orderId, from: ['finished'], to: 'dispatched', why: `${ref} left the shop`, personId: actor.personId, now: context.now })
    await moveOrder(tx, { orderId, from: ['dispatched'], to: 'settled', why: 'All is paid', personId: actor.personId, now: context.now })
    await enqueueMail(tx, { kind: 'job-dispatched', objectId: job.id, recipient: facts.recipient, orderId, payload: { ...facts.about, quantity: facts.quantity, balanceMinor: 0, currency: facts.currency as 'EUR', orderUrl: facts.orderUrl } })
  })
  return readOneJob(context, head.id)
}
