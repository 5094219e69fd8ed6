import { z } from 'zod'
import { endOwnSession } from '../../../services/sessions/own-sessions'

export default defineRoute({ access: 'signed-in', params: z.strictObject({ id: z.uuid() }) }, async ({ event, context, params }) => {
  await endOwnSession(context, params.id)
  if (params.id === context.actor?.sessionId) clearSessionCookie(event)
  return {}
})
