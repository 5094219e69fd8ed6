import type { RequirementInput } from '#shared/schemas/enquiry'
import type { JobView, LoadingView } from '#shared/schemas/shop'
import { expect } from 'vitest'
import { booksOf } from './database'
import { openDeposit, orderReadyToPay, type AcceptedOrder } from './orders'
import { endSession } from './stripe'
import type { Visitor } from './visitor'

/** An order whose deposit is paid, and its job as Loading shows it. */
export async function paidJob(name: string, supervisor: Visitor, requirement?: RequirementInput): Promise<{ order: AcceptedOrder, job: JobView }> {
  const order = await orderReadyToPay(name, undefined, requirement)
  await endSession(await openDeposit(order), 'paid')
  await expect.poll(async () => (await booksOf(order.ref)).jobs, { timeout: 20_000, interval: 200 }).toBe(1)
  return { order, job: await jobOf(order.ref, supervisor) }
}

/** The job of an order. */
export async function jobOf(orderRef: string, supervisor: Visitor): Promise<JobView> {
  const { body } = await supervisor.get<LoadingView>('/api/loading')
  const job = body.jobs.find(one => one.orderRef === orderRef)
  if (!job) throw new Error(`${orderRef} has no job in Loading`)
  return job
}
