import { look } from './support/look'
import { OrderForm } from './support/order-form'
import { expect, test } from './support/test'

const PULL = { firstForce: '20', firstLength: '60', secondForce: '50', secondLength: '80' } as const
const TWIST = { firstMoment: '300', firstAngle: '30', secondMoment: '900', secondAngle: '90', firstLeg: '30', secondLeg: '30', rod: '10' } as const
const ASKER = { name: 'Orla Fenwick', firm: 'Brackwater Fillers', email: 'orla.pulls@brackwater.example' } as const

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

  await page.reload()
  await expect(form.field('secondLength')).toHaveValue('80')
  await expect(page.getByRole('radio', { name: /^It pulls/ })).toBeChecked()
  await form.fill({ title: 'Pedal return', ...ASKER })
  await form.answerCouldHurt('No')
  await form.send.dblclick()
  await expect(page.getByRole('heading', { level: 1 })).toBeVisible()
  await expect(page.getByText(/OX-\d+/).first()).toBeVisible()
  await look(page, 'order-pulls-sent')
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

test('what stands in the way of a spring is resolved by one click', async ({ page }) => {
  const form = new OrderForm(page)
  await form.open()
  await form.choose('It pulls')
  await form.fill({ ...PULL, bore: '4' })
  const note = page.getByRole('button', { name: /^a bore of/ })
  await expect(note).toBeVisible()
  await look(page, 'order-clash')
  await note.click()
  await expect(form.field('bore')).not.toHaveValue('4')
  await expect(form.priceRow('500')).toContainText('€')
})

test('an old spring is measured by its bounce, by keyboard alone', async ({ page }) => {
  const form = new OrderForm(page)
  await form.open()
  await page.getByText('I have the old spring: measure its rate').click()
  await page.getByLabel('The mass on it').fill('0.5 kg')
  const tap = page.getByRole('button', { name: /^Tap here in time with it/ })
  await tap.focus()
  for (let i = 0; i < 10; i++) {
    await page.keyboard.press('Space')
    await page.waitForTimeout(300)
  }
  await expect(page.getByText(/Its rate is/).first()).toContainText(/N\/mm/)
  await look(page, 'order-bounce')
  await page.getByRole('button', { name: 'Use this rate' }).click()
  await expect(form.field('rate')).not.toHaveValue('')
  await expect(form.field('rate')).toBeFocused()
})
