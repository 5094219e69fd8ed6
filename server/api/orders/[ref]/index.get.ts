import { z } from 'zod'
import { orderRefSchema } from '#shared/schemas/shared-fields'
import { getOrderStatus } from '../../../services/orders/get-status'

export default defineRoute({ access: 'signed-in', params: z.object({ ref: orderRefSchema }) }, ({ context, params }) => getOrderStatus(context, params))
