import { previewBodySchema } from '#shared/schemas/enquiry'
import { previewOrder } from '../../services/orders/preview'

export default defineRoute(
  { access: 'public', body: previewBodySchema, limit: { name: 'order-preview', max: 120, windowS: 60 } },
  ({ context, body }) => previewOrder(context, body),
)
