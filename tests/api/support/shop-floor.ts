import { randomUUID } from 'node:crypto'
import type { JobView, LoadingView } from '#shared/schemas/shop'
import { query } from './database'
import type { Visitor } from './visitor'

const expectStatus = (what: string, answer: { status: number, body: unknown }): void => {
  if (answer.status !== 200) throw new Error(`${what} was answered ${answer.status}: ${JSON.stringify(answer.body)}`)
}

/** Plans a paid order's job and makes it, every operation at its first free time, until it is finished. */
export async function makeJob(orderRef: string, supervisor: Visitor, operator: Visitor): Promise<JobView> {
  const loading = await supervisor.get<LoadingView>('/api/loading')
  const job = loading.body.jobs.find(one => one.orderRef === orderRef)
  if (!job) throw new Error(`${orderRef} has no job in Loading`)
  const placed = await supervisor.post<JobView>(`/api/loading/jobs/${job.ref}/place-all`, { version: job.version })
  expectStatus('placing', placed)
  for (const operation of placed.body.operations) {
    // What the demonstration left running at the work centre goes on later.
    for (const { id } of await query<{ id: string }>(`select id from operations where work_centre_id = $1 and state in ('setting-up', 'running')`, [operation.centreId])) {
      expectStatus('pausing', await operator.post(`/api/bench/operations/${id}/records`, { id: randomUUID(), act: 'pause' }))
    }
    const record = async (act: string, more: object = {}) => expectStatus(`${operation.kind} ${act}`, await operator.post(`/api/bench/operations/${operation.id}/records`, { id: randomUUID(), act, ...more }))
    await record('start')
    await record('run')
    await record('finish', { good: job.quantity, scrap: 0, ...(operation.kind === 'coiling' ? { wireKg: job.wireKg } : {}) })
  }
  return placed.body
}
