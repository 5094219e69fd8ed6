import { listStuckEvents } from '../../../services/stripe-events/stuck'

export default defineRoute({ access: ['admin'] }, ({ context }) => listStuckEvents(context))
