import { z } from 'zod'
import { jobRefSchema } from '#shared/schemas/shared-fields'
import { versionBodySchema } from '#shared/schemas/shop'
import { dispatchJob } from '../../../../services/loading/dispatch'

export default defineRoute(
  { access: ['supervisor', 'admin'], params: z.object({ ref: jobRefSchema }), body: versionBodySchema },
  ({ context, params, body }) => dispatchJob(context, params.ref, body.version),
)
