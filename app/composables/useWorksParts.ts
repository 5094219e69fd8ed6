import type { Role } from '#shared/schemas/roles'

const PARTS: readonly { name: string, to: string, roles: readonly Role[], tells: string }[] = [
  { name: 'Price books', to: '/works/price-books', roles: ['admin'], tells: 'Every rate that a quote is made from, and since when it holds.' },
  { name: 'Wire', to: '/works/wire', roles: ['admin', 'supervisor'], tells: 'What lies in the rack, what is set aside for jobs, and what a kilogram costs.' },
  { name: 'Mail', to: '/works/mail', roles: ['admin'], tells: 'Which e-mails have gone out, which wait, and which could not be sent.' },
  { name: 'Payments', to: '/works/payments', roles: ['admin'], tells: 'Messages of the payment service that could not be worked on.' },
  { name: 'People', to: '/works/people', roles: ['admin'], tells: 'Who can sign in, what they may do, and where they are signed in now.' },
]

/** The parts of Works that whoever is signed in may open. These only steer; the server decides. */
export function useWorksParts() {
  const { data } = useAuth()
  return { parts: computed(() => PARTS.filter(part => part.roles.some(role => data.value?.roles.includes(role)))) }
}
