import { homeOf } from '~/utils/staff-places'

/** People who work here have no orders of their own: they are led to their place. */
export default defineNuxtRouteMiddleware(() => {
  const roles: readonly string[] = useAuth().data.value?.roles ?? []
  if (roles.length > 0 && !roles.includes('customer')) return navigateTo(homeOf(roles))
})
