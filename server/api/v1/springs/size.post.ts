import { SizeRequestSchema } from '#shared/schemas/spring'
import { sizeSpring } from '../../../services/springs/size'

export default defineRoute({ access: 'public', body: SizeRequestSchema, limit: { name: 'v1-size', max: 60, windowS: 60 } }, ({ context, body }) => sizeSpring(context, body))
