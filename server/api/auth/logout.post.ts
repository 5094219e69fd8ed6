import { signOut } from '../../services/sessions/own-sessions'

export default defineRoute({ access: 'public' }, async ({ event, context }) => {
  const secret = readSessionCookie(event)
  if (secret) await signOut(context.db, secret)
  clearSessionCookie(event)
  setResponseHeader(event, 'clear-site-data', '"storage"')
  return {}
})
