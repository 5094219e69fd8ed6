import type { Role } from '#shared/schemas/roles'

const PLACES: readonly { name: string, to: string, roles: readonly Role[] }[] = [
  { name: 'Estimating', to: '/estimating', roles: ['estimator', 'admin'] },
  { name: 'Loading', to: '/loading', roles: ['supervisor', 'operator', 'admin'] },
  { name: 'Bench', to: '/bench', roles: ['operator', 'supervisor', 'admin'] },
  { name: 'Ledger', to: '/ledger', roles: ['bookkeeper', 'admin'] },
  { name: 'Works', to: '/works', roles: ['admin', 'supervisor'] },
]

/** The places that a person with these roles works in. */
export function placesOf(roles: readonly string[]): readonly { name: string, to: string }[] {
  return PLACES.filter(place => place.roles.some(role => roles.includes(role)))
}

/** Where a person starts after signing in. An operator starts at the Bench, though Loading may be read. */
export function homeOf(roles: readonly string[]): string {
  if (roles.includes('operator') && !roles.includes('supervisor') && !roles.includes('admin')) return '/bench'
  return placesOf(roles)[0]?.to ?? '/account'
}
