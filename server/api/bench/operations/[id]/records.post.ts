import { z } from 'zod'
import { benchRecordBodySchema } from '#shared/schemas/shop'
import { recordBench } from '../../../../services/bench/record'

export default defineRoute(
  { access: ['operator', 'supervisor', 'admin'], params: z.object({ id: z.uuid() }), body: benchRecordBodySchema },
  ({ context, params, body }) => recordBench(context, params.id, body),
)
