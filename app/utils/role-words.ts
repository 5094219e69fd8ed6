import type { Role } from '#shared/schemas/roles'

const WORDS: Readonly<Record<Role, string>> = { customer: 'own orders', estimator: 'Estimating', supervisor: 'Loading', operator: 'Bench', bookkeeper: 'Ledger', admin: 'everywhere' }

/** Where a person works, in the names of the places; a customer with the firm's name. */
export function roleWords(roles: readonly Role[], companyName: string | null): string {
  if (roles.length === 0) return 'nowhere yet'
  return roles.map(role => role === 'customer' && companyName ? `orders of ${companyName}` : WORDS[role]).join(', ')
}
