import { z } from 'zod'
import { acceptQuoteBodySchema } from '#shared/schemas/quote'
import { orderRefSchema } from '#shared/schemas/shared-fields'
import { acceptQuote } from '../../../services/quotes/accept'

export default defineRoute(
  { access: 'public', params: z.object({ ref: orderRefSchema }), body: acceptQuoteBodySchema, limit: { name: 'quote-accept', max: 60, windowS: 60 } },
  ({ context, params, body }) => acceptQuote(context, { ref: params.ref, ...body }),
)
