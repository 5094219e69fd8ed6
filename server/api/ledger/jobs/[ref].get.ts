import { z } from 'zod'
import { jobRefSchema } from '#shared/schemas/shared-fields'
import { getJobCost } from '../../../services/ledger/job'

export default defineRoute({ access: ['bookkeeper', 'admin'], params: z.object({ ref: jobRefSchema }) }, ({ context, params }) => getJobCost(context, params.ref))
