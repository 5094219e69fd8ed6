import { z } from 'zod'
import { versionBodySchema } from '#shared/schemas/shop'
import { orderRefSchema } from '#shared/schemas/shared-fields'
import { reviseQuote } from '../../../services/estimating/revise'

export default defineRoute(
  { access: ['estimator', 'admin'], params: z.object({ ref: orderRefSchema }), body: versionBodySchema },
  ({ context, params, body }) => reviseQuote(context, { ref: params.ref, ...body }),
)
