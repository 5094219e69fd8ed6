import { useLinkBodySchema, type UsedLink } from '#shared/schemas/auth'
import { useLink } from '../../services/sessions/use-link'

export default defineRoute({
  access: 'public', body: useLinkBodySchema, maxBodyBytes: 4096, limit: { name: 'use-link', max: 60, windowS: 900 },
}, async ({ event, context, body }): Promise<UsedLink> => {
  const { secret, maxAgeS, user, orderRef } = await useLink(context, useSettings(), body.token)
  await endFormerSession(event)
  setSessionCookie(event, secret, maxAgeS)
  return { user, orderRef }
})
