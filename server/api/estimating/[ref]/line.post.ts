import { z } from 'zod'
import { overrideLineBodySchema } from '#shared/schemas/quote'
import { orderRefSchema } from '#shared/schemas/shared-fields'
import { overrideLine } from '../../../services/estimating/override-line'

export default defineRoute(
  { access: ['estimator', 'admin'], params: z.object({ ref: orderRefSchema }), body: overrideLineBodySchema },
  ({ context, params, body }) => overrideLine(context, { ref: params.ref, ...body }),
)
