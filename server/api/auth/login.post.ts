import { signInBodySchema } from '#shared/schemas/auth'
import { signIn } from '../../services/sessions/sign-in'

export default defineRoute({ access: 'public', body: signInBodySchema, maxBodyBytes: 4096 }, async ({ event, context, body }) => {
  const settings = useSettings()
  const { secret, maxAgeS, user } = await signIn(context, settings, { ...body, address: clientAddress(event), hasLimits: settings.limits === 'on' })
  await endFormerSession(event)
  setSessionCookie(event, secret, maxAgeS)
  return { token: 'cookie', user }
})
