import { EvaluateRequestSchema } from '#shared/schemas/spring'
import { evaluateSpring } from '../../../services/springs/evaluate'

export default defineRoute({ access: 'public', body: EvaluateRequestSchema, limit: { name: 'v1-evaluate', max: 240, windowS: 60 } }, ({ body }) => evaluateSpring(body))
