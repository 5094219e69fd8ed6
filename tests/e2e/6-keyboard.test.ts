import type { Page } from '@playwright/test'
import { expect, test } from './support/test'

/** What has the focus: its role or kind, and its name. */
const focused = (page: Page) => page.evaluate(() => {
  const element = document.activeElement
  if (!(element instanceof HTMLElement) || element === document.body) return null
  const rect = element.getBoundingClientRect()
  const style = getComputedStyle(element)
  const boxStyle = getComputedStyle(element.closest('.box') ?? element.closest('label') ?? element)
  return {
    id: element.id, kind: element.tagName.toLowerCase(), text: (element.getAttribute('aria-label') ?? element.innerText ?? '').trim().slice(0, 60),
    isInView: rect.bottom > 0 && rect.top < innerHeight && rect.width > 0,
    hasRing: [style, boxStyle].some(one => one.outlineStyle !== 'none' && Number.parseFloat(one.outlineWidth) >= 2),
  }
})

test('the whole order form is filled in and sent with the keyboard alone', async ({ page, mailbox }) => {
  await page.goto('/order')
  await expect(page.getByRole('button', { name: /^Send, and get/ })).toBeEnabled()

  await page.keyboard.press('Tab')
  expect(await focused(page)).toMatchObject({ kind: 'a', text: 'To the content', isInView: true })
  await page.keyboard.press('Enter')
  await expect(page.locator('#main')).toBeFocused()

  const typed: Readonly<Record<string, string>> = {
    'order-firstForce': '60', 'order-firstLength': '50', 'order-secondForce': '150', 'order-secondLength': '35', 'order-bore': '24', 'order-rod': '14',
    'order-quantity1': '50', 'order-quantity2': '200', 'order-quantity3': '500', 'order-quantity4': '', 'order-quantity5': '',
    'order-title': 'Spring ordered by keyboard', 'order-name': 'Kit Eyre', 'order-firm': 'Eyre', 'order-email': 'kit@eyre.example',
  }
  const visited: string[] = []
  const positions: number[] = []
  for (let step = 0; step < 80; step += 1) {
    await page.keyboard.press('Tab')
    const now = await focused(page)
    if (!now) break
    expect(now, `after ${visited.at(-1)}`).toMatchObject({ isInView: true, hasRing: true })
    visited.push(now.id || now.text)
    positions.push(await page.evaluate(() => document.activeElement!.getBoundingClientRect().top + scrollY))
    if (now.id.startsWith('order-couldHurt')) {
      // Nothing is chosen beforehand; the space bar takes the first answer, which is no.
      await page.keyboard.press('Space')
    }
    const text = typed[now.id]
    if (text !== undefined) {
      await page.keyboard.press('Control+a')
      await page.keyboard.press('Delete')
      if (text) await page.keyboard.type(text)
    }
    if (now.text.startsWith('Send, and get')) break
  }
  expect(visited).toEqual(expect.arrayContaining(Object.keys(typed)))
  // In visual order: nothing in the form's column is reached before what stands above it.
  const column = positions.slice(visited.indexOf('order-firstForce'), visited.indexOf('order-email') + 1)
  for (const [index, top] of column.entries()) if (index > 0) expect(top, visited[index]).toBeGreaterThanOrEqual(column[index - 1]! - 60)

  await page.keyboard.press('Enter')
  await expect(page).toHaveURL(/\/quotes\/OX-\d+/)
  await mailbox.waitFor('kit@eyre.example', /^Your quote/)
})

test('the spring is pressed with the arrow keys', async ({ page }) => {
  await page.goto('/order')
  const slider = page.getByRole('slider', { name: /^Press it/ })
  await expect(slider).toHaveAttribute('aria-valuetext', /mm/)
  await slider.focus()
  const before = await slider.getAttribute('aria-valuetext')
  // The aside comes alive when somebody turns to it, so the first press may come too early.
  await expect(async () => {
    await page.keyboard.press('ArrowLeft')
    await expect(slider).not.toHaveAttribute('aria-valuetext', before!, { timeout: 300 })
  }).toPass()
})

test('what is typed before the page comes alive is kept', async ({ page, services }) => {
  let release = () => {}
  const held = new Promise<void>((resolve) => { release = resolve })
  await page.route('**/_nuxt/*.js', async (route) => {
    await held
    await route.continue()
  })
  await page.goto('/sign-in', { waitUntil: 'commit' })
  const { email, password } = services.demoSignIns.find(({ role }) => role === 'operator')!
  await expect(page.getByRole('button', { name: 'Sign in', exact: true })).toBeDisabled()
  await page.getByLabel('E-mail', { exact: true }).fill(email)
  await page.getByLabel('Password', { exact: true }).fill(password)
  release()
  await page.getByRole('button', { name: 'Sign in', exact: true }).click()
  await expect(page.getByRole('heading', { level: 1, name: 'Which work centre?' })).toBeVisible()
})
