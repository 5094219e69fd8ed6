import { z } from 'zod'
import { quoteAccessQuerySchema } from '#shared/schemas/quote'
import { orderRefSchema } from '#shared/schemas/shared-fields'
import { getQuoteView } from '../../../services/quotes/get-view'

export default defineRoute(
  { access: 'public', params: z.object({ ref: orderRefSchema }), query: quoteAccessQuerySchema, limit: { name: 'quote-view', max: 240, windowS: 60 } },
  ({ context, params, query }) => getQuoteView(context, { ref: params.ref, key: query.key }),
)
