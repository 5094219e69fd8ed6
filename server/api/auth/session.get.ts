import { requireSessionUser } from '../../services/sessions/session-user'

export default defineRoute({ access: 'signed-in' }, async ({ context }) => ({ user: await requireSessionUser(context) }))
