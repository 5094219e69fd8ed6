import { pageQuerySchema } from '#shared/schemas/shared-fields'
import { listPeople } from '../../../services/people/list'

export default defineRoute({ access: ['admin'], query: pageQuerySchema }, ({ context, query }) => listPeople(context, query))
