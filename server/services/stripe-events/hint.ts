import { z } from 'zod'

const idOrObject = z.union([z.string(), z.object({ id: z.string() }).transform(object => object.id)]).nullish().catch(undefined)

/** What is kept of an event: which object it is about. The rest is only a hint, so nothing about the payer is stored. */
export const eventHintSchema = z.object({
  id: z.string().regex(/^evt_[A-Za-z0-9_]{1,240}$/),
  object: z.literal('event'),
  type: z.string().min(1).max(120),
  created: z.int(),
  livemode: z.boolean(),
  api_version: z.string().max(60).nullish(),
  data: z.object({
    object: z.object({ id: z.string().max(255).optional(), object: z.string().max(60).optional(), payment_intent: idOrObject, charge: idOrObject, status: z.string().max(60).nullish().catch(undefined) }),
  }),
})
export type EventHint = z.infer<typeof eventHintSchema>
