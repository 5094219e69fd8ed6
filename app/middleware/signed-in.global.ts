import { isShowingError } from '~/utils/is-showing-error'

/**
 * A page is for people who are signed in, unless it says `auth: false`; others are led to the sign-in page and back.
 * This only steers; the server decides what may be read. (The one of @sidebase/nuxt-auth turns a 403 into the sign-in page,
 * because it knows no session while the server renders an error.)
 */
export default defineNuxtRouteMiddleware((to) => {
  if (to.meta.auth === false || to.path === '/sign-in' || to.matched.length === 0 || isShowingError()) return
  if (useAuth().status.value === 'authenticated') return
  return navigateTo({ path: '/sign-in', query: { redirect: to.fullPath } })
})
