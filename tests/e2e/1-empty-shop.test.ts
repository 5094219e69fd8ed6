import { look } from './support/look'
import { expect, test } from './support/test'

/** The first day of the shop: no order yet. These run before anything is ordered. */
const EMPTY: readonly { role: 'estimator' | 'supervisor' | 'operator' | 'bookkeeper' | 'admin' | 'customer', path: string, name: string, says: RegExp }[] = [
  { role: 'estimator', path: '/estimating', name: 'estimating-empty', says: /Nothing waits/ },
  { role: 'supervisor', path: '/loading', name: 'loading-empty', says: /Nothing waits: every paid job has its place/ },
  { role: 'operator', path: '/bench/C2', name: 'bench-empty', says: /Nothing is planned here/ },
  { role: 'bookkeeper', path: '/ledger', name: 'ledger-empty', says: /No job yet/ },
  { role: 'admin', path: '/works/mail', name: 'works-mail-empty', says: /No e-mail yet/ },
  { role: 'admin', path: '/works/payments', name: 'works-payments-empty', says: /Every message came to its end/ },
  { role: 'customer', path: '/account', name: 'account-empty', says: /Nothing ordered yet/ },
]

for (const { role, path, name, says } of EMPTY) {
  test(`${path} says what will be there`, async ({ openAs }) => {
    const page = await openAs(role)
    await page.goto(path)
    await expect(page.getByRole('main')).toContainText(says)
    await look(page, name)
  })
}
