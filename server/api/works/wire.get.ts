import { pageQuerySchema } from '#shared/schemas/shared-fields'
import { listWireStock } from '../../services/catalogue/list-stock'

export default defineRoute({ access: ['admin', 'supervisor'], query: pageQuerySchema }, ({ context, query }) => listWireStock(context, query))
