import { z } from 'zod'
import { orderRefSchema } from '#shared/schemas/shared-fields'
import { readPayment } from '../../../services/payments/status'

/** What cannot be the id of a session is passed over, just as a foreign one. */
const querySchema = z.strictObject({ session_id: z.string().regex(/^cs_[A-Za-z0-9_]{1,250}$/).optional().catch(undefined) })

export default defineRoute({
  access: 'signed-in', params: z.strictObject({ ref: orderRefSchema }), query: querySchema, limit: { name: 'payment', max: 300, windowS: 600 },
}, ({ context, params, query }) => readPayment(context, usePaymentDesk(), { ref: params.ref, sessionId: query.session_id }))
