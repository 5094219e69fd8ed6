import { look } from './support/look'
import { OrderForm, USUAL_SPRING } from './support/order-form'
import { expect, test } from './support/test'

/** Pages and states that the walk of an order does not pass. */
test('the front page', async ({ page }) => {
  await page.goto('/')
  await expect(page.getByRole('heading', { level: 1 })).toBeVisible()
  await look(page, 'index')
})

test('the page for engineers before anything is typed', async ({ page }) => {
  await page.goto('/springs')
  await expect(page.getByText('Type the sizes, or begin from an example.')).toBeVisible()
  await look(page, 'springs-empty')
})

test('the order form before anything is typed', async ({ page }) => {
  await new OrderForm(page).open()
  await look(page, 'order-empty')
})

test('the order form says what is missing at its head and beside each field, and forgets an error once it is mended', async ({ page, watch }) => {
  watch.expect(422, /\/api\/order\/preview/)
  const form = new OrderForm(page)
  await form.open()
  await form.send.click()
  const summary = page.getByRole('alert')
  await expect(summary).toBeFocused()
  await expect(page).toHaveTitle(/^Error:/)
  await expect(form.field('firstForce')).toHaveAttribute('aria-invalid', 'true')
  await look(page, 'order-errors')
  await summary.getByRole('link').first().click()
  await form.fill({ ...USUAL_SPRING, secondLength: '55' })
  await expect(form.field('firstForce')).not.toHaveAttribute('aria-invalid', 'true')
  await form.send.click()
  await expect(page.getByText('The second length must be shorter than the first').first()).toBeVisible()
  await look(page, 'order-clashing')
})

test('the order form says what stands in the way when no spring fits', async ({ page }) => {
  const form = new OrderForm(page)
  await form.open()
  await form.fill({ ...USUAL_SPRING, bore: '6', rod: '5.5' })
  await expect(form.view).toContainText('No spring fits these answers yet')
  await look(page, 'order-no-spring')
})

test('the order form offers another try when the price cannot be worked out, and keeps what was typed', async ({ page, watch }) => {
  watch.expect(503, /\/api\/order\/preview/)
  let isBroken = true
  await page.route('**/api/order/preview', route => isBroken ? route.fulfill({ status: 503, contentType: 'application/problem+json', body: JSON.stringify({ type: 'about:blank', title: 'Not now', status: 503, detail: 'We cannot work this out just now.', requestId: 'x' }) }) : route.continue())
  const form = new OrderForm(page)
  await form.open()
  await form.fill(USUAL_SPRING)
  await expect(form.view).toContainText('The price could not be worked out')
  await look(page, 'order-preview-broken')
  isBroken = false
  await form.view.getByRole('button', { name: 'Try again' }).click()
  await expect(form.priceRow('200')).toContainText('€331.20')
})

test('the sign-in page, with a wrong password, and asking for a link', async ({ page, watch }) => {
  watch.expect(401, /\/api\/auth\/login/)
  await page.goto('/sign-in')
  await look(page, 'sign-in')
  await page.getByLabel('E-mail', { exact: true }).fill('nobody@nowhere.example')
  await page.getByLabel('Password', { exact: true }).fill('not the right one')
  await page.getByRole('button', { name: 'Sign in', exact: true }).click()
  await expect(page.getByRole('alert')).toContainText('You are not signed in')
  await look(page, 'sign-in-refused')
  await page.getByRole('button', { name: 'Send me a link' }).click()
  await expect(page.getByText('Look in your e-mail')).toBeVisible()
  await look(page, 'sign-in-link-sent')
})

test('the pages of a signed-in customer', async ({ openAs }) => {
  const page = await openAs('customer')
  await page.goto('/account/security')
  await expect(page.getByRole('heading', { level: 1 })).toBeVisible()
  await look(page, 'account-security')
})

test('a page that is not there', async ({ page, watch }) => {
  watch.expect(404, /\/no-such-page/)
  await page.goto('/no-such-page')
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('There is no such page')
  await look(page, 'not-found')
})

for (const { path, says } of [
  { path: '/estimating/OX-1', says: 'There is no enquiry OX-1.' }, { path: '/loading/jobs/J-1', says: 'There is no job J-1.' }, { path: '/ledger/jobs/J-1', says: 'There is no job J-1.' }, { path: '/bench/X9', says: 'There is no work centre X9.' },
]) {
  test(`${path} says that there is none`, async ({ openAs, watch }) => {
    watch.expect(404, new RegExp(path))
    const page = await openAs('admin')
    await page.goto(path)
    await expect(page.getByRole('main')).toContainText(says)
    await look(page, `not-found${path.replace(/[^a-z]+/gi, '-')}`)
  })
}

for (const part of ['price-books', 'wire', 'people', 'mail?preview=quote-ready', 'mail?preview=job-planned'] as const) {
  test(`Works: ${part}`, async ({ openAs }) => {
    const page = await openAs('admin')
    await page.goto(`/works/${part}`)
    await expect(page.getByRole('heading', { level: 1 }).first()).toBeVisible()
    await expect(page.getByRole('row').nth(1)).toBeVisible()
    if (part.includes('preview')) await expect(page.getByText('Answer this e-mail to reach a person at Oxmere Spring Works.', { exact: true })).toBeVisible()
    await look(page, `works-${part.replace(/[^a-z]+/g, '-')}`)
  })
}

test('Works leads to its parts; the wire is filtered in the address and read page by page', async ({ openAs }) => {
  const page = await openAs('supervisor')
  await page.goto('/works')
  await look(page, 'works')
  await expect(page.getByRole('main').getByRole('link')).toHaveText(['Wire'])
  await page.getByRole('main').getByRole('link', { name: 'Wire' }).click()
  await page.getByLabel('Material').selectOption({ label: 'Patented cold-drawn wire SH' })
  await page.getByRole('button', { name: 'Show' }).click()
  await expect(page).toHaveURL(/material=EN10270-1-SH/)
  await expect(page.getByRole('rowheader').filter({ hasNotText: 'cold-drawn wire SH' })).toHaveCount(0)
  const first = await page.getByRole('rowheader').first().innerText()
  await page.getByRole('link', { name: 'Further ones' }).click()
  await expect(page).toHaveURL(/cursor=/)
  await expect(page.getByRole('rowheader').first()).not.toHaveText(first)
  await page.reload()
  await page.getByRole('link', { name: 'Back to the first' }).click()
  await expect(page.getByRole('rowheader').first()).toHaveText(first)
})

test('ending somebody’s sessions asks once more in place, and signs them out', async ({ openAs }) => {
  const operator = await openAs('operator')
  await operator.goto('/bench')
  const page = await openAs('admin')
  await page.goto('/works/people')
  const row = page.getByRole('row', { name: /Nela Brandt/ })
  await row.getByRole('button', { name: 'End all sessions of Nela Brandt' }).click()
  await expect(row.getByRole('button', { name: /^End (the session|\d+ sessions)$/ })).toBeFocused()
  await look(page, 'works-people-asking')
  await row.getByRole('button', { name: /^Keep (it|them)$/ }).click()
  await expect(row.getByRole('button', { name: 'End all sessions of Nela Brandt' })).toBeFocused()
  await row.getByRole('button', { name: 'End all sessions of Nela Brandt' }).click()
  await row.getByRole('button', { name: /^End (the session|\d+ sessions)$/ }).click()
  await expect(page.getByRole('status')).toContainText('of Nela Brandt ended')
  await expect(row).toContainText('signed in nowhere')
  await operator.goto('/bench')
  await expect(operator).toHaveURL(/\/sign-in/)
})

test('a list that cannot be read says so and can be tried again', async ({ openAs, watch }) => {
  const page = await openAs('admin')
  await page.goto('/works/wire')
  watch.expect(500, /\/api\//)
  await page.route('**/api/**', route => route.request().method() === 'GET' && !route.request().url().includes('/auth/')
    ? route.fulfill({ status: 500, contentType: 'application/problem+json', body: JSON.stringify({ type: 'about:blank', title: 'Something broke', status: 500, requestId: 'x' }) }) : route.continue())
  const places: readonly [string, string][] = [['Estimating', 'The enquiries could not be read.'], ['Loading', 'The plan could not be read.'], ['Ledger', 'The books could not be read.']]
  for (const [place, words] of places) {
    await page.getByRole('navigation', { name: 'Main' }).getByRole('link', { name: place }).click()
    await expect(page.getByRole('main').getByRole('alert')).toContainText(words)
    await look(page, `${place.toLowerCase()}-broken`)
  }
  await page.unroute('**/api/**')
  await page.getByRole('button', { name: 'Try again' }).click()
  await expect(page.getByRole('heading', { name: 'Money and job cost' })).toBeVisible()
})
