import { z } from 'zod'
import { sendQuoteBodySchema } from '#shared/schemas/quote'
import { orderRefSchema } from '#shared/schemas/shared-fields'
import { sendQuote } from '../../../services/estimating/send'

export default defineRoute(
  { access: ['estimator', 'admin'], params: z.object({ ref: orderRefSchema }), body: sendQuoteBodySchema },
  ({ context, params, body }) => sendQuote(context, { ref: params.ref, ...body }),
)
