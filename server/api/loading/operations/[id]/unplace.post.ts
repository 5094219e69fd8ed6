import { z } from 'zod'
import { versionBodySchema } from '#shared/schemas/shop'
import { unplaceOperation } from '../../../../services/loading/place'

export default defineRoute(
  { access: ['supervisor', 'admin'], params: z.object({ id: z.uuid() }), body: versionBodySchema },
  ({ context, params, body }) => unplaceOperation(context, params.id, body.version),
)
