import { changePasswordBodySchema } from '#shared/schemas/auth'
import { changePassword } from '../../services/sessions/change-password'

export default defineRoute({
  access: 'signed-in', body: changePasswordBodySchema, maxBodyBytes: 4096, limit: { name: 'password', max: 20, windowS: 900 },
}, async ({ event, context, body }) => {
  const { secret, maxAgeS } = await changePassword(context, useSettings(), body)
  setSessionCookie(event, secret, maxAgeS)
  return {}
})
