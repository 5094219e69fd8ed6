import type { Role } from '#shared/schemas/roles'

declare module '#app' {
  interface PageMeta {
    /** Roles that work on this page. */
    roles?: readonly Role[]
  }
}
declare module 'vue-router' {
  interface RouteMeta {
    roles?: readonly Role[]
  }
}
export {}
