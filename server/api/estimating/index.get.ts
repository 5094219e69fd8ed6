import { estimatingQuerySchema } from '#shared/schemas/quote'
import { listEstimating } from '../../services/estimating/list'

export default defineRoute({ access: ['estimator', 'admin'], query: estimatingQuerySchema }, ({ context, query }) => listEstimating(context, query))
