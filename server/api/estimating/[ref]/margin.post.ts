import { z } from 'zod'
import { overrideMarginBodySchema } from '#shared/schemas/quote'
import { orderRefSchema } from '#shared/schemas/shared-fields'
import { overrideMargin } from '../../../services/estimating/override-margin'

export default defineRoute(
  { access: ['estimator', 'admin'], params: z.object({ ref: orderRefSchema }), body: overrideMarginBodySchema },
  ({ context, params, body }) => overrideMargin(context, { ref: params.ref, ...body }),
)
