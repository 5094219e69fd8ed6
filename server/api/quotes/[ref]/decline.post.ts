import { z } from 'zod'
import { declineQuoteBodySchema } from '#shared/schemas/quote'
import { orderRefSchema } from '#shared/schemas/shared-fields'
import { declineQuote } from '../../../services/quotes/decline'

export default defineRoute(
  { access: 'public', params: z.object({ ref: orderRefSchema }), body: declineQuoteBodySchema, limit: { name: 'quote-decline', max: 60, windowS: 60 } },
  ({ context, params, body }) => declineQuote(context, { ref: params.ref, ...body }),
)
