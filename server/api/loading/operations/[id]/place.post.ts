import { z } from 'zod'
import { placeOperationBodySchema } from '#shared/schemas/shop'
import { placeOperation } from '../../../../services/loading/place'

export default defineRoute(
  { access: ['supervisor', 'admin'], params: z.object({ id: z.uuid() }), body: placeOperationBodySchema },
  ({ context, params, body }) => placeOperation(context, params.id, body),
)
