import { wireQuerySchema } from '#shared/schemas/works'
import { listWireStock } from '../../services/catalogue/list-stock'

export default defineRoute({ access: ['admin', 'supervisor'], query: wireQuerySchema }, ({ context, query }) => listWireStock(context, query))
