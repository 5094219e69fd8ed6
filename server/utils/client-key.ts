import type { H3Event } from 'h3'
import { z } from 'zod'

const clientKeySchema = z.uuid()

/**
 * The key that the sender gives a request it may have to repeat (header Idempotency-Key).
 * @throws HttpProblem 400 when it is missing or no UUID
 */
export function readClientKey(event: H3Event): string {
  const key = clientKeySchema.safeParse(getRequestHeader(event, 'idempotency-key'))
  if (!key.success) throw new HttpProblem(400, 'Send a header Idempotency-Key with a new UUID for each form, so that a repeated request is done once.')
  return key.data.toLowerCase()
}
