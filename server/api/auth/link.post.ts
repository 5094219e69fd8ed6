import { signInLinkBodySchema } from '#shared/schemas/auth'
import { requestSignInLink } from '../../services/sessions/request-sign-in-link'

export default defineRoute({
  access: 'public', body: signInLinkBodySchema, maxBodyBytes: 4096, limit: { name: 'sign-in-link-address', max: 20, windowS: 3600 },
}, async ({ context, body }) => {
  const settings = useSettings()
  await requestSignInLink(context, settings, { email: body.email, hasLimits: settings.limits === 'on' })
  return { sent: true }
})
