import { z } from 'zod'
import { orderRefSchema } from '#shared/schemas/shared-fields'
import { readPayment } from '../../../services/payments/status'

export default defineRoute({
  access: 'signed-in', params: z.strictObject({ ref: orderRefSchema }), query: z.strictObject({ session_id: z.string().max(255).optional() }), limit: { name: 'payment', max: 300, windowS: 600 },
}, ({ context, params, query }) => readPayment(context, usePaymentDesk(), { ref: params.ref, sessionId: query.session_id }))
