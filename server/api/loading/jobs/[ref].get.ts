import { z } from 'zod'
import { jobRefSchema } from '#shared/schemas/shared-fields'
import { getJob } from '../../../services/loading/job'

export default defineRoute({ access: ['supervisor', 'operator', 'admin'], params: z.object({ ref: jobRefSchema }) }, ({ context, params }) => getJob(context, params.ref))
