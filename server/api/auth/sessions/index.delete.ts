import { endOtherSessions } from '../../../services/sessions/own-sessions'

export default defineRoute({ access: 'signed-in' }, ({ context }) => endOtherSessions(context))
