import { pageQuerySchema } from '#shared/schemas/shared-fields'
import { getLedger } from '../../services/ledger/view'

export default defineRoute({ access: ['bookkeeper', 'admin'], query: pageQuerySchema }, ({ context, query }) => getLedger(context, query))
