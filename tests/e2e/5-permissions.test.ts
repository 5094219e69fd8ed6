import type { Role } from '#shared/schemas/roles'
import { look } from './support/look'
import { expect, test } from './support/test'

const STAFF_PAGES = ['/estimating', '/loading', '/bench', '/ledger', '/works', '/works/price-books', '/works/wire', '/works/mail', '/works/payments', '/works/people'] as const
const MAY: Readonly<Record<Role, readonly (typeof STAFF_PAGES)[number][]>> = {
  customer: [],
  estimator: ['/estimating'],
  supervisor: ['/loading', '/bench', '/works', '/works/wire'],
  operator: ['/loading', '/bench'],
  bookkeeper: ['/ledger'],
  admin: STAFF_PAGES,
}

for (const [role, allowed] of Object.entries(MAY) as [Role, readonly string[]][]) {
  test(`the ${role} reaches ${allowed.length === STAFF_PAGES.length ? 'every place' : allowed.join(', ') || 'no place of the staff'}, and is told so elsewhere`, async ({ openAs, watch }) => {
    watch.expect(403, /./)
    const page = await openAs(role)
    for (const path of STAFF_PAGES) {
      const response = await page.goto(path)
      expect(response?.status(), `${role} at ${path}`).toBe(allowed.includes(path) ? 200 : 403)
      const refusal = page.getByRole('heading', { level: 1, name: 'This place is not yours to see' })
      await expect(refusal).toHaveCount(allowed.includes(path) ? 0 : 1)
    }
    if (role !== 'admin') {
      await page.goto('/works/people')
      await expect(page.getByText('Your account does not reach this place')).toBeVisible()
      if (role === 'operator') await look(page, 'no-permission')
    }
  })
}

test('a step inside the pages to a place of others is refused as well, and the way back works', async ({ openAs }) => {
  const page = await openAs('operator')
  await page.goto('/loading')
  await page.getByRole('link', { name: 'Bench' }).click()
  await expect(page.getByRole('heading', { level: 1, name: 'Which work centre?' })).toBeVisible()
  // As a stale link would: through the router, without a new page load.
  await page.evaluate(() => {
    const { $router } = (window as unknown as { useNuxtApp: () => { $router: { push: (path: string) => Promise<unknown> } } }).useNuxtApp()
    void $router.push('/ledger').catch(() => {})
  })
  await expect(page.getByRole('heading', { level: 1, name: 'This place is not yours to see' })).toBeVisible()
  await page.getByRole('link', { name: 'Back to your work' }).click()
  await expect(page.getByRole('heading', { level: 1, name: 'Which work centre?' })).toBeVisible()
})

test('who is not signed in is led to the sign-in page and, after it, to where they wanted to go', async ({ page, services }) => {
  for (const path of ['/ledger', '/account', '/works/wire']) {
    await page.goto(path)
    await expect(page).toHaveURL(new RegExp(`/sign-in\\?redirect=${path.replaceAll('/', '(/|%2F)')}$`))
  }
  const { email, password } = services.demoSignIns.find(({ role }) => role === 'supervisor')!
  await page.getByLabel('E-mail', { exact: true }).fill(email)
  await page.getByLabel('Password', { exact: true }).fill(password)
  await page.getByRole('button', { name: 'Sign in', exact: true }).click()
  await expect(page.getByRole('heading', { level: 1, name: 'Wire in the rack' })).toBeVisible()
  await page.getByRole('button', { name: 'Sign out' }).click()
  await expect(page).toHaveURL(/\/sign-in/)
  await page.goto('/works/wire')
  await expect(page).toHaveURL(/\/sign-in/)
})

test('one customer does not see the order of another', async ({ openAs, watch }) => {
  watch.expect(404, /./)
  const page = await openAs('customer')
  for (const path of ['/account/orders/OX-2401', '/quotes/OX-2401']) {
    const response = await page.goto(path)
    expect(response?.status(), path).toBe(404)
  }
})
