import { z } from 'zod'
import { jobRefSchema } from '#shared/schemas/shared-fields'
import { versionBodySchema } from '#shared/schemas/shop'
import { placeWholeJob } from '../../../../services/loading/place-all'

export default defineRoute(
  { access: ['supervisor', 'admin'], params: z.object({ ref: jobRefSchema }), body: versionBodySchema },
  ({ context, params, body }) => placeWholeJob(context, params.ref, body.version),
)
