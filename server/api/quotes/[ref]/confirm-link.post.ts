import { z } from 'zod'
import { quoteAccessQuerySchema } from '#shared/schemas/quote'
import { orderRefSchema } from '#shared/schemas/shared-fields'
import { sendConfirmLink } from '../../../services/quotes/confirm-link'

export default defineRoute(
  { access: 'public', params: z.object({ ref: orderRefSchema }), body: quoteAccessQuerySchema, limit: { name: 'confirm-link', max: 10, windowS: 600 } },
  ({ context, params, body }) => sendConfirmLink(context, { ref: params.ref, key: body.key }),
)
