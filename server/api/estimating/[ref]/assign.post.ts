import { z } from 'zod'
import { versionBodySchema } from '#shared/schemas/shop'
import { orderRefSchema } from '#shared/schemas/shared-fields'
import { assignToMe } from '../../../services/estimating/assign'

export default defineRoute(
  { access: ['estimator', 'admin'], params: z.object({ ref: orderRefSchema }), body: versionBodySchema },
  ({ context, params, body }) => assignToMe(context, { ref: params.ref, ...body }),
)
