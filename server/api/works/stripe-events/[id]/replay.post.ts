import { z } from 'zod'
import { replayEvent } from '../../../../services/stripe-events/stuck'

export default defineRoute({ access: ['admin'], params: z.strictObject({ id: z.string().regex(/^evt_[A-Za-z0-9_]{1,240}$/) }) }, async ({ context, params }) => {
  await replayEvent(context, params.id)
  stripeEventWorker.wake()
  return {}
})
