import { z } from 'zod'
import { orderRefSchema } from '#shared/schemas/shared-fields'
import { getEstimatingView } from '../../../services/estimating/get-view'

export default defineRoute({ access: ['estimator', 'admin'], params: z.object({ ref: orderRefSchema }) }, ({ context, params }) => getEstimatingView(context, params))
