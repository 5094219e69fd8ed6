import { z } from 'zod'
import { getBench } from '../../services/bench/view'

export default defineRoute(
  { access: ['operator', 'supervisor', 'admin'], params: z.object({ code: z.string().regex(/^[A-Z]\d{1,2}$/) }) },
  ({ context, params }) => getBench(context, params.code),
)
