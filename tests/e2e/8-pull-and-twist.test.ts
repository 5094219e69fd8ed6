import type { Page } from '@playwright/test'
import { look } from './support/look'
import { OrderForm } from './support/order-form'
import { expect, test } from './support/test'

const PULL = { firstForce: '20', firstLength: '60', secondForce: '50', secondLength: '80' } as const
const TWIST = { firstMoment: '300', firstAngle: '30', secondMoment: '900', secondAngle: '90', firstLeg: '30', secondLeg: '30', rod: '10' } as const
const ASKER = { name: 'Orla Fenwick', firm: 'Brackwater Fillers', email: 'orla.pulls@brackwater.example' } as const

/** How many pages of paper a page prints on. */
async function pagesOf(page: Page): Promise<number> {
  const pdf = await page.pdf({ preferCSSPageSize: true, printBackground: true })
  return pdf.toString('latin1').match(/\/Type\s*\/Page\b/g)?.length ?? 0
}

test('a spring that pulls is described, drawn, priced and quoted or passed to a person', async ({ page, watch }) => {
  const form = new OrderForm(page)
  await form.open()
  await form.choose('It pulls')
  await form.fill(PULL)
  await expect(form.drawing).toHaveAccessibleName(/^Extension spring in side view.*full loops/)
  await expect(form.priceRow('500')).toContainText('€')
  const slider = form.view.getByRole('slider', { name: /^Pull it/ })
  await slider.press('End')
  await expect(form.view).toContainText(/it pulls with/)
  await page.getByRole('combobox', { name: /^Its hooks/ }).selectOption({ label: 'Half a loop, short' })
  await expect(form.drawing).toHaveAccessibleName(/half loops/)
  await look(page, 'order-pulls')

  watch.expect(422, /\/api\/order\/preview/)
  // A wrong length is said beside its field, and nothing that was typed is lost.
  await form.fill({ secondLength: '40' })
  await expect(form.view).toContainText('must be longer than the first')
  await form.fill({ secondLength: '80' })
  await expect(form.priceRow('500')).toContainText('€')

  await page.getByRole('button', { name: 'inch and lbf' }).click()
  await expect(form.field('secondLength')).toHaveValue('3.1496')
  await page.reload()
  await expect(form.field('secondLength')).toHaveValue('3.1496')
  await page.getByRole('button', { name: 'mm and N' }).click()
  await expect(form.field('secondLength')).toHaveValue('80')
  await expect(page.getByRole('radio', { name: /^It pulls/ })).toBeChecked()
  await form.fill({ title: 'Pedal return', ...ASKER })
  await form.answerCouldHurt('No')
  await form.send.dblclick()
  await expect(page.getByRole('heading', { level: 1 })).toBeVisible()
  await expect(page.getByText(/OX-\d+/).first()).toBeVisible()
  await look(page, 'order-pulls-sent')
  expect(await pagesOf(page), 'a quote is one sheet of paper').toBe(1)

  // What was asked for comes back into the form to be changed, and is worked out again.
  await page.getByRole('button', { name: 'Change something' }).click()
  await expect(form.field('secondLength')).toHaveValue('80')
  await expect(page.getByRole('combobox', { name: /^Its hooks/ })).toHaveValue('half-loop')
  await expect(form.priceRow('500')).toContainText('€')
  await page.goBack()
  await expect(page.getByText(/OX-\d+/).first()).toBeVisible()

})

test('a spring that twists is described in inch units and comes back the same in metric ones', async ({ page }) => {
  const form = new OrderForm(page)
  await form.open()
  await form.choose('It twists')
  await form.fill(TWIST)
  await expect(form.drawing).toHaveAccessibleName(/^Torsion spring seen from its end.*legs 30\.0/)
  await expect(form.priceRow('500')).toContainText('€')
  const slider = form.view.getByRole('slider', { name: /^Turn it/ })
  await slider.press('Home')
  await expect(form.view).toContainText('Free: no moment.')
  await look(page, 'order-twists')

  await page.getByRole('button', { name: 'inch and lbf' }).click()
  await expect(form.field('firstMoment')).toHaveValue('2.655')
  await page.getByRole('button', { name: 'mm and N' }).click()
  await expect(form.field('firstMoment')).toHaveValue('300')

  // What was typed for one kind stays while another is looked at.
  await form.choose('It pushes')
  await expect(form.field('firstForce')).toHaveValue('')
  await form.choose('It twists')
  await expect(form.field('secondMoment')).toHaveValue('900')
})

test('a spring that twists is ordered on a phone, after a wrong answer is put right', async ({ page, watch }) => {
  await page.setViewportSize({ width: 360, height: 760 })
  const form = new OrderForm(page)
  await form.open()
  await form.choose('It twists')
  watch.expect(422, /\/api\/order\/preview/)
  await form.fill({ ...TWIST, secondAngle: '20', title: 'Lid return', ...ASKER })
  await form.answerCouldHurt('No')
  await form.send.click()
  const summary = page.getByRole('alert').filter({ hasText: 'Please look at these again' })
  await expect(summary).toBeFocused()
  await summary.getByRole('link').first().click()
  await expect(form.field('secondAngle')).toBeFocused()
  await expect(form.field('secondAngle')).toHaveAttribute('aria-invalid', 'true')
  await page.keyboard.press('ControlOrMeta+A')
  await page.keyboard.type('90')
  await expect(form.field('secondAngle')).not.toHaveAttribute('aria-invalid', 'true')
  await expect(form.priceRow('500')).toContainText('€')
  await form.send.dblclick()
  await expect(page).toHaveURL(/\/quotes\/OX-\d+/)
  await expect(page.getByRole('img', { name: /^Torsion spring/ })).toBeVisible()
  await expect(page.getByText('Legs, hand')).toBeVisible()
  await look(page, 'order-twists-sent')
  await page.setViewportSize({ width: 1280, height: 900 })
  const overPx = await page.getByRole('table', { name: 'What is made' }).evaluate(table => table.getBoundingClientRect().right - (table.parentElement?.getBoundingClientRect().right ?? 0))
  expect(overPx, 'the table stays in its sheet').toBeLessThanOrEqual(0.5)
  expect(await pagesOf(page), 'a quote is one sheet of paper').toBe(1)
  await page.goBack()
  await form.choose('It twists')
  await expect(form.field('firstMoment')).toHaveValue('')
})

test('the loads of each kind stay its own, through other units and a reload', async ({ page }) => {
  const form = new OrderForm(page)
  await form.open()
  await form.fill({ firstForce: '60', firstLength: '50', secondForce: '150', secondLength: '35' })
  await form.choose('It pulls')
  await expect(form.field('firstForce')).toHaveValue('')
  await form.fill(PULL)
  await page.getByRole('button', { name: 'inch and lbf' }).click()
  await expect(form.field('secondLength')).toHaveValue('3.1496')
  await form.choose('It pushes')
  await expect(form.field('secondLength')).toHaveValue('1.378')
  await page.getByRole('button', { name: 'mm and N' }).click()
  await expect(form.priceRow('500')).toContainText('€')
  await page.reload()
  await expect(form.field('secondLength')).toHaveValue('35')
  await form.choose('It pulls')
  await expect(form.field('secondLength')).toHaveValue('80')
})

test('the first question on the front page takes a spring that twists over into the form', async ({ page }) => {
  await page.goto('/')
  await expect(page.getByRole('button', { name: 'Go on with this spring' })).toBeEnabled()
  const shown = page.getByRole('complementary', { name: 'The spring that follows' })
  await page.getByRole('radio', { name: /^It pulls/ }).check()
  await expect(shown.getByRole('img', { name: /^Extension spring/ })).toBeVisible()
  await page.getByRole('radio', { name: /^It twists/ }).check()
  await expect(shown.getByRole('img', { name: /^Torsion spring/ })).toBeVisible()
  await look(page, 'index-twists')
  for (const [name, value] of [['First moment', '300'], ['Angle at the first', '30'], ['Second moment', '900'], ['Angle at the second', '90'], ['Length of the first leg', '30'], ['Length of the second leg', '30']] as const) {
    await page.getByRole('textbox', { name: new RegExp(`^${name}`) }).fill(value)
  }
  await expect(shown).toContainText(/500 springs\s*€/)
  await page.getByRole('button', { name: 'Go on with this spring' }).click()
  const form = new OrderForm(page)
  await expect(page.getByRole('radio', { name: /^It twists/ })).toBeChecked()
  await expect(form.field('secondMoment')).toHaveValue('900')
  await expect(form.field('secondLeg')).toHaveValue('30')
  await expect(form.priceRow('500')).toContainText('€')
})

test('what stands in the way of a spring is resolved by one click, and put back by another', async ({ page }) => {
  const form = new OrderForm(page)
  await form.open()
  await form.choose('It pulls')
  await form.fill({ ...PULL, bore: '4' })
  const way = page.getByRole('button', { name: /^a bore of/ })
  await expect(way).toBeVisible()
  await look(page, 'order-clash')
  const offered = (await way.textContent() ?? '').replace(/^a bore of /, '').replace(/\s*mm$/, '')
  await way.focus()
  await page.keyboard.press('Enter')
  await expect(form.field('bore')).toHaveValue(offered)
  await expect(form.field('bore')).toBeFocused()
  await expect(page.getByRole('status').filter({ hasText: /springs at €/ })).toBeAttached()
  await expect(form.priceRow('500')).toContainText('€')
  await look(page, 'order-changed')

  // In other units it is still the same change, and what was typed comes back in them.
  await page.getByRole('button', { name: 'inch and lbf' }).click()
  await expect(page.getByRole('button', { name: /^Put 0\.1575\sin back/ })).toBeVisible()
  await page.getByRole('button', { name: 'mm and N' }).click()
  await page.getByRole('button', { name: /^Put 4\smm back/ }).click()
  await expect(form.field('bore')).toHaveValue('4')
  await expect(form.field('bore')).toBeFocused()
  await expect(way).toBeVisible()
  await expect(page.getByRole('button', { name: /back$/ })).toHaveCount(0)

  // Typed over, a change is the person's own and is not offered back.
  await way.click()
  await form.fill({ bore: '9' })
  await expect(form.priceRow('500')).toContainText('€')
  await expect(page.getByRole('button', { name: /back$/ })).toHaveCount(0)
})

test('an old spring is measured by its bounce, by keyboard alone', async ({ page }) => {
  const form = new OrderForm(page)
  await form.open()
  const summary = page.getByText('I have the old spring: measure its rate')
  await summary.focus()
  await page.keyboard.press('Enter')
  await page.keyboard.press('Tab')
  await expect(page.getByLabel('The mass on it')).toBeFocused()
  await page.keyboard.type('0.5 kg')
  const tap = page.getByRole('button', { name: /^Tap here in time with it/ })
  await tap.focus()
  for (let i = 0; i < 10; i++) {
    await page.keyboard.press('Space')
    await page.waitForTimeout(300)
  }
  const found = page.getByRole('status').filter({ hasText: /Its rate is/ })
  await expect(found).toContainText(/N\/mm, give or take [\d.]+\sN\/mm/)
  await expect(tap).toContainText('10 taps')
  await look(page, 'order-bounce')
  // 10 taps about 0.3 s apart: k = (2 pi / T)^2 m, and a loaded machine only makes T longer.
  const rateNPerMm = Number(/Its rate is\s*([\d.]+)/.exec(await found.textContent() ?? '')?.[1])
  expect(rateNPerMm).toBeLessThanOrEqual((2 * Math.PI / 0.3) ** 2 * 0.5 / 1000)
  expect(rateNPerMm).toBeGreaterThan((2 * Math.PI / 0.6) ** 2 * 0.5 / 1000)
  await page.getByRole('button', { name: 'Use this rate' }).focus()
  await page.keyboard.press('Enter')
  await expect(form.field('rate')).toBeFocused()
  await expect(form.field('rate')).toHaveValue(/^\d/)
  expect(Math.abs(Number(await form.field('rate').inputValue()) / rateNPerMm - 1)).toBeLessThan(0.01)
})
