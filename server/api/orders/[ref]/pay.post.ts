import { z } from 'zod'
import { openPaymentBodySchema } from '#shared/schemas/payment'
import { orderRefSchema } from '#shared/schemas/shared-fields'
import { openPayment } from '../../../services/payments/open'

export default defineRoute({
  access: 'signed-in', params: z.strictObject({ ref: orderRefSchema }), body: openPaymentBodySchema, maxBodyBytes: 4096, limit: { name: 'pay', max: 60, windowS: 600 },
}, ({ context, params, body }) => openPayment(context, usePaymentDesk(), { ref: params.ref, kind: body.kind }))
