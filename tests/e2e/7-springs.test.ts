import type { Page } from '@playwright/test'
import { look } from './support/look'
import { expect, test } from './support/test'

/** The page for engineers, at both widths, by address and by hand. */
const EXAMPLE = 'kind=compression&material=EN10270-1-SH&d=2.5mm&D=20mm&n=8.25&nt=10.25&L0=60mm&p1=L50mm&p2=L35mm&ends=closed-ground'

const value = (page: Page, field: string) => page.locator(`[data-field="${field}"]`)
/** Every figure of the sheet, as it stands. */
const figures = (page: Page): Promise<string[]> => page.locator('.sheet-parts td').allInnerTexts()

for (const width of [1280, 360]) {
  test.describe(`at ${width} px`, () => {
    test.use({ viewport: { width, height: 900 } })

    test('types a spring, reads it in the other units, and sends its address to a colleague who sees the same', async ({ page, openAs, context }) => {
      await context.grantPermissions(['clipboard-read', 'clipboard-write'])
      await page.goto('/springs')
      await expect(page.getByText('Type the sizes, or begin from an example.')).toBeVisible()
      await page.getByLabel('Material').selectOption('EN10270-1-SH')
      for (const [name, text] of [[/^Wire diameter/, '2.5'], [/^Mean diameter/, '20'], [/^Active coils/, '8.25'], [/^Total coils/, '10.25'], [/^Free length L/, '60']] as const) await page.getByRole('textbox', { name }).fill(text)
      // R = G d^4/(8 D^3 n) = 81 500 x 39.0625/(8 x 8000 x 8.25) = 6.03 N/mm
      await expect(value(page, 'rateNPerMm')).toHaveText('6.03\u202fN/mm')
      await page.getByRole('textbox', { name: /^Point 1, length/ }).fill('50')
      await page.getByLabel('Point 2', { exact: true }).selectOption({ label: 'at a load' })
      await page.getByRole('textbox', { name: /^Point 2, load/ }).fill('120')
      await expect(page.locator('.points tbody tr').nth(1)).toContainText('120.0\u202fN')
      await expect(page).toHaveURL(/d=2\.5mm&D=20mm&n=8\.25/)
      await expect(page).toHaveURL(/p2=F120N/)

      await page.getByRole('button', { name: 'inch and lbf' }).click()
      await expect(page.getByRole('textbox', { name: /^Wire diameter/ })).toHaveValue('0.098425197')
      await expect(value(page, 'rateNPerMm')).toHaveText('34.43\u202flbf/in')
      await page.locator('summary', { hasText: 'Where it works' }).click()
      await page.getByRole('textbox', { name: /^Works in a bore of/ }).fill('0.95')
      await expect(page).toHaveURL(/d=2\.5mm.*bore=0\.95in/)
      await page.getByRole('button', { name: 'mm and N' }).click()
      await expect(page.getByRole('textbox', { name: /^Works in a bore of/ })).toHaveValue('24.13')

      await page.getByRole('button', { name: 'Copy the address' }).click()
      await expect(page.getByText('The address is copied')).toBeVisible()
      const copied = await page.evaluate(() => navigator.clipboard.readText())
      const colleague = await openAs('visitor')
      await colleague.goto(copied)
      await expect(value(colleague, 'rateNPerMm')).toHaveText('6.03\u202fN/mm')
      expect(await figures(colleague)).toEqual(await figures(page))
      expect((await figures(page)).length).toBeGreaterThan(150)
    })

    test('names what cannot be read beside its field, and shows what can', async ({ page }) => {
      await page.goto(`/springs?${EXAMPLE.replace('d=2.5mm', 'd=2,500').replace('p2=L35mm', 'p2=35+furlongs')}&ends=sharp&colour=red`)
      await expect(page.getByRole('textbox', { name: /^Wire diameter/ })).toHaveValue('2,500')
      await expect(page.getByRole('textbox', { name: /^Wire diameter/ })).toHaveAttribute('aria-invalid', 'true')
      await expect(page.getByText('can be read in two ways').first()).toBeVisible()
      await expect(page.getByRole('textbox', { name: /^Point 2/ })).toHaveAttribute('aria-invalid', 'true')
      await expect(page.getByText('colour: Not known here.')).toBeVisible()
      await expect(page.getByRole('textbox', { name: /^Mean diameter/ })).toHaveValue('20')
      await page.getByRole('textbox', { name: /^Wire diameter/ }).fill('-2')
      await expect(page.getByText('The wire diameter must be from 0.01 to 100 mm.').first()).toBeVisible()
    })
  })
}

test('goes back from an example to what stood before it, and forward again', async ({ page }) => {
  await page.goto(`/springs?${EXAMPLE}`)
  await page.getByRole('textbox', { name: /^Free length L/ }).fill('64')
  await page.getByRole('button', { name: 'torsion', exact: true }).click()
  await expect(value(page, 'rateNmmPerDeg')).toBeVisible()
  await page.goBack()
  await expect(page.getByRole('textbox', { name: /^Free length L/ })).toHaveValue('64')
  await expect(value(page, 'freeLengthMm')).toHaveText('64.00\u202fmm')
  await page.goForward()
  await expect(value(page, 'rateNmmPerDeg')).toBeVisible()
})

test('is worked by the keyboard alone', async ({ page }) => {
  await page.goto('/springs')
  await page.getByRole('radio', { name: /^Compression/ }).focus()
  await page.keyboard.press('ArrowRight')
  await expect(page.getByRole('radio', { name: /^Extension/ })).toBeChecked()
  await expect(page).toHaveURL(/kind=extension/)
  await page.getByRole('button', { name: 'extension', exact: true }).focus()
  await page.keyboard.press('Enter')
  await expect(value(page, 'rateNPerMm')).toBeVisible()
  const summary = page.locator('summary', { hasText: 'Wire diameter' })
  await summary.focus()
  await page.keyboard.press('Enter')
  await expect(page.getByText('How thick the wire is.')).toBeVisible()
  const slider = page.getByRole('slider')
  await slider.focus()
  const before = await slider.getAttribute('aria-valuetext')
  await page.keyboard.press('ArrowRight')
  await expect(slider).not.toHaveAttribute('aria-valuetext', before ?? '')
})

test('links to the data sheet of the very spring, and takes it to the order form', async ({ page }) => {
  await page.goto(`/springs?${EXAMPLE}`)
  const href = await page.getByRole('link', { name: 'Data sheet as PDF' }).getAttribute('href')
  const answer = await page.request.get(href ?? '')
  expect(answer.status()).toBe(200)
  expect(answer.headers()['content-type']).toBe('application/pdf')
  const number = /filename="(SP-[0-9A-F]+)\.pdf"/.exec(answer.headers()['content-disposition'] ?? '')?.[1] ?? 'none'
  await expect(page.getByText(number, { exact: true })).toBeVisible()
  await page.getByRole('button', { name: 'Order this spring' }).click()
  await expect(page).toHaveURL(/\/order$/)
  await expect(page.getByRole('textbox', { name: /^at a length of/ })).toHaveValue('50')
})

test('looks as it should: each kind, failing, on paper', async ({ page }) => {
  await page.goto('/springs')
  for (const kind of ['compression', 'extension', 'torsion']) {
    await page.getByRole('button', { name: kind, exact: true }).click()
    await expect(page.getByRole('status').filter({ hasText: 'checks' })).toBeVisible()
    await look(page, `springs-${kind}`)
  }
  await page.goto(`/springs?${EXAMPLE.replace('n=8.25&nt=10.25', 'n=1.5')}&p3=L12mm&bore=20mm&rod=19mm&cycles=10000000&temperature=200C`)
  await expect(page.getByText(/of \d+ checks fail/)).toBeVisible()
  await look(page, 'springs-failing')
  await page.goto(`/springs?${EXAMPLE.replace('2.5mm', 'thick')}&colour=red`)
  await look(page, 'springs-wrong')
  await page.goto(`/springs?${EXAMPLE}`)
  await page.emulateMedia({ media: 'print' })
  await page.setViewportSize({ width: 680, height: 960 })
  await expect(page.getByRole('heading', { name: 'The spring' })).toBeHidden()
  await expect(value(page, 'rateNPerMm')).toBeVisible()
  await page.screenshot({ path: new URL('screenshots/springs-print.png', import.meta.url).pathname, fullPage: true })
})
