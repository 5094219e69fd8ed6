import type { Role } from '../../../shared/schemas/roles'

/** Invented people of the invented shop and its invented customers. Their passwords work in demo and test mode only. */
export const DEMO_COMPANIES = [
  { key: 'tarnbeck', name: 'Tarnbeck Valve Co.', countryCode: 'IE', vatNumber: null },
  { key: 'hessary', name: 'Hessary Looms', countryCode: 'BE', vatNumber: 'BE0999999922' },
] as const

export const DEMO_PEOPLE: readonly { email: string, name: string, password: string, roles: readonly Role[], company: string | null }[] = [
  { email: 'ilse.varrow@tarnbeck.example', name: 'Ilse Varrow', password: 'kettle-orchard-31', roles: ['customer'], company: 'tarnbeck' },
  { email: 'joost.hale@hessary.example', name: 'Joost Hale', password: 'shuttle-meadow-58', roles: ['customer'], company: 'hessary' },
  { email: 'estimator@oxmere.example', name: 'Rhona Amsel', password: 'straw-ladder-204', roles: ['estimator'], company: null },
  { email: 'supervisor@oxmere.example', name: 'Dafydd Okonre', password: 'bronze-window-77', roles: ['supervisor'], company: null },
  { email: 'operator@oxmere.example', name: 'Nela Brandt', password: 'purple-hammer-19', roles: ['operator'], company: null },
  { email: 'bookkeeper@oxmere.example', name: 'Fenn Ashgrove', password: 'ledger-heron-650', roles: ['bookkeeper'], company: null },
  { email: 'admin@oxmere.example', name: 'Maren Thole', password: 'anvil-harbour-902', roles: ['admin'], company: null },
]
