import { z } from 'zod'
import { withdrawBodySchema } from '#shared/schemas/quote'
import { orderRefSchema } from '#shared/schemas/shared-fields'
import { withdrawEnquiry } from '../../../services/estimating/withdraw'

export default defineRoute(
  { access: ['estimator', 'admin'], params: z.object({ ref: orderRefSchema }), body: withdrawBodySchema },
  ({ context, params, body }) => withdrawEnquiry(context, { ref: params.ref, ...body }),
)
