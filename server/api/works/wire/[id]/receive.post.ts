import { z } from 'zod'
import { receiveWireBodySchema } from '#shared/schemas/works'
import { receiveWire } from '../../../../services/wire/receive'

export default defineRoute(
  { access: ['supervisor', 'admin'], params: z.object({ id: z.uuid() }), body: receiveWireBodySchema },
  ({ context, params, body }) => receiveWire(context, params.id, body),
)
