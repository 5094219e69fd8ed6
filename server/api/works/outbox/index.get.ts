import { outboxQuerySchema } from '#shared/schemas/mail'
import { listOutbox } from '../../../services/mail/list'

export default defineRoute({ access: ['admin'], query: outboxQuerySchema }, ({ context, query }) => listOutbox(context, query))
