import { listOwnSessions } from '../../../services/sessions/own-sessions'

export default defineRoute({ access: 'signed-in' }, async ({ context }) => ({ rows: await listOwnSessions(context) }))
