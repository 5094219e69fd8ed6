import { pageQuerySchema } from '#shared/schemas/shared-fields'
import { listOwnOrders } from '../../services/orders/list-own'

export default defineRoute({ access: 'signed-in', query: pageQuerySchema }, ({ context, query }) => listOwnOrders(context, query))
