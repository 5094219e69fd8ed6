import { listBenches } from '../../services/bench/list'

export default defineRoute({ access: ['operator', 'supervisor', 'admin'] }, ({ context }) => listBenches(context))
