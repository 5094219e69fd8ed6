import type { Role } from '#shared/schemas/roles'

const PLACES: readonly { name: string, to: string, roles: readonly Role[] }[] = [
  { name: 'Estimating', to: '/estimating', roles: ['estimator', 'admin'] },
  { name: 'Loading', to: '/loading', roles: ['supervisor', 'operator', 'admin'] },
  { name: 'Bench', to: '/bench', roles: ['operator', 'supervisor', 'admin'] },
  { name: 'Ledger', to: '/ledger', roles: ['bookkeeper', 'admin'] },
  { name: 'Works', to: '/works', roles: ['admin', 'supervisor'] },
]

/** The places that a person with these roles works in, the first of them being where they start. */
export function placesOf(roles: readonly string[]): readonly { name: string, to: string }[] {
  return PLACES.filter(place => place.roles.some(role => roles.includes(role)))
}

/** The staff places of whoever is signed in. These only steer; the server decides. */
export function useStaffPlaces() {
  const { data } = useAuth()
  return { places: computed(() => placesOf(data.value?.roles ?? [])) }
}
