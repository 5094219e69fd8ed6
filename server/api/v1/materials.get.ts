import { listSpringMaterials } from '../../services/springs/list-materials'

export default defineRoute({ access: 'public', limit: { name: 'v1-materials', max: 120, windowS: 60 } }, ({ context }) => listSpringMaterials(context))
