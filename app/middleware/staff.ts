import type { Role } from '#shared/schemas/roles'
import { isShowingError } from '~/utils/is-showing-error'

/** Steers people away from pages of other roles; the server decides what they may read. */
export default defineNuxtRouteMiddleware((to) => {
  const { data } = useAuth()
  const allowed = to.meta.roles ?? []
  if (!data.value || isShowingError()) return
  const roles: readonly Role[] = data.value.roles
  if (!roles.some(role => allowed.includes(role)))
    return abortNavigation(createError({ status: 403, fatal: true, message: 'Your account does not reach this place. If it should, ask the administrator.' }))
})
