import { safeRedirect } from '~/utils/safe-redirect'
import { homeOf } from '~/utils/staff-places'

/** Who is signed in has nothing to do on the sign-in page. */
export default defineNuxtRouteMiddleware((to) => {
  const { status, data } = useAuth()
  if (status.value === 'authenticated') return navigateTo(safeRedirect(to.query.redirect) ?? homeOf(data.value?.roles ?? []))
})
