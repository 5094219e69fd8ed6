import { describeApi } from '../../services/springs/describe-api'

export default defineRoute({ access: 'public', limit: { name: 'v1-openapi', max: 120, windowS: 60 } }, ({ context }) => describeApi(context.origin))
