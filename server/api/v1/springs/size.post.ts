import { SizeRequestSchema } from '#shared/schemas/spring'
import { sizeFromCatalogue } from '../../../services/springs/size'

export default defineRoute({ access: 'public', body: SizeRequestSchema, limit: { name: 'v1-size', max: 60, windowS: 60 } }, ({ context, body }) => sizeFromCatalogue(context, body))
