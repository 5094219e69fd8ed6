import { z } from 'zod'
import { endSessionsOfPerson } from '../../../../services/people/end-sessions'

export default defineRoute({ access: ['admin'], params: z.strictObject({ id: z.uuid() }) }, ({ context, params }) => endSessionsOfPerson(context, params.id))
