import { loadingQuerySchema } from '#shared/schemas/shop'
import { getLoading } from '../../services/loading/view'

export default defineRoute({ access: ['supervisor', 'operator', 'admin'], query: loadingQuerySchema }, ({ context, query }) => getLoading(context, query))
