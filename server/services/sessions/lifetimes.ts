import type { Role } from '#shared/schemas/roles'

/** How long a session lasts at most, and how long without any request. */
export type Lifetime = { absoluteMinutes: number, idleMinutes: number }

const HOUR = 60
const DAY = 24 * HOUR
/**
 * A customer comes back days later to follow an order. Staff sign in for a shift, at machines that others pass by; whoever
 * may change prices and people is asked again after an hour away.
 */
const LIFETIMES: Readonly<Record<Role, Lifetime>> = {
  customer: { absoluteMinutes: 30 * DAY, idleMinutes: 7 * DAY },
  operator: { absoluteMinutes: 12 * HOUR, idleMinutes: 4 * HOUR },
  supervisor: { absoluteMinutes: 12 * HOUR, idleMinutes: 4 * HOUR },
  estimator: { absoluteMinutes: 12 * HOUR, idleMinutes: 4 * HOUR },
  bookkeeper: { absoluteMinutes: 12 * HOUR, idleMinutes: 2 * HOUR },
  admin: { absoluteMinutes: 12 * HOUR, idleMinutes: HOUR },
}

/** The lifetime for somebody with these roles: the shortest of any of them. */
export function lifetimeOf(roles: readonly Role[]): Lifetime {
  const all = (roles.length > 0 ? roles : ['customer' as const]).map(role => LIFETIMES[role])
  return { absoluteMinutes: Math.min(...all.map(one => one.absoluteMinutes)), idleMinutes: Math.min(...all.map(one => one.idleMinutes)) }
}
