import { linkIn } from './support/mailbox'
import { look } from './support/look'
import { OrderForm } from './support/order-form'
import { expect, test } from './support/test'

/** An enquiry in inch and pound-force whose spring could hurt someone: a person answers it. The tests go on from each other. */
test.describe.configure({ mode: 'serial' })

const TITLE = 'Hold-down spring of a guard'
const BRAM = { name: 'Bram Oakes', firm: 'Oakes Restorations', email: 'bram@oakes.example' }
const order = { ref: '' }

test('a visitor asks in inch and pound-force; going back and forth between the units loses nothing', async ({ page }) => {
  const form = new OrderForm(page)
  await form.open()
  await page.getByRole('button', { name: 'inch and lbf' }).click()
  await form.fill({ firstForce: '13.5', firstLength: '1 31/32', secondForce: '33.7', secondLength: '1.378', bore: '0.945', rod: '0.551', quantity1: '25', quantity2: '100', quantity3: '', quantity4: '', quantity5: '' })
  await expect(form.drawing).toHaveAccessibleName(/ in /)
  await expect(form.priceRow('100')).toContainText('€')
  await page.getByRole('button', { name: 'mm and N' }).click()
  await expect(form.field('secondLength')).toHaveValue(/^35(\.0\d*)?$/)
  await page.getByRole('button', { name: 'inch and lbf' }).click()
  await expect(form.field('secondLength')).toHaveValue('1.378')
  await expect(form.field('firstLength')).toHaveValue(/^(1 31\/32|1\.968[78])/)

  await form.answerCouldHurt('Yes, or I am not sure')
  await expect(form.view).toContainText('A person will answer this one')
  await form.fill({ title: TITLE, ...BRAM, remarks: 'It holds the guard of a press shut.' })
  await look(page, 'order-inch')
  await form.send.click()
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Thank you. A person answers this one.')
  await expect(page.getByRole('main')).toContainText(/You hear from us by \d+ [A-Z][a-z]{2} \d{4}, \d{2}:\d{2}/)
  order.ref = (await page.getByRole('main').innerText()).match(/OX-\d+/)![0]
  await look(page, 'order-thanks')
})

test('the customer is told by when a person answers, and the estimators that one waits', async ({ page, mailbox, services }) => {
  const mail = await mailbox.waitFor(BRAM.email, /^One of us is looking/)
  await page.goto(linkIn(mail, `/quotes/${order.ref}`))
  await expect(page.getByRole('heading', { name: 'A person answers this one' })).toBeVisible()
  await look(page, 'quote-waiting')
  const estimator = services.demoSignIns.find(({ role }) => role === 'estimator')!
  const told = await mailbox.waitFor(estimator.email, new RegExp(`^${order.ref} waits`))
  expect(linkIn(told, '/estimating/')).toContain(order.ref)
})

test('the estimator signs in and sees why the enquiry waits', async ({ page, services }) => {
  const { email, password } = services.demoSignIns.find(({ role }) => role === 'estimator')!
  await page.goto('/estimating')
  await expect(page).toHaveURL(/\/sign-in\?redirect=/)
  await page.getByLabel('E-mail', { exact: true }).fill(email)
  await page.getByLabel('Password', { exact: true }).fill(password)
  await page.getByRole('button', { name: 'Sign in', exact: true }).click()
  await expect(page).toHaveURL(/\/estimating$/)
  const row = page.getByRole('row', { name: new RegExp(order.ref) })
  await expect(row).toContainText('A break could hurt someone')
  await look(page, 'estimating')
  await row.getByRole('link').click()
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(TITLE)
  await expect(page.getByText('It holds the guard of a press shut.')).toBeVisible()
  await look(page, 'estimating-enquiry')
})

test('the estimator changes a line and the margin with a reason; the computed values stay beside', async ({ openAs }) => {
  const page = await openAs('estimator')
  await page.goto(`/estimating/${order.ref}`)
  await page.getByRole('button', { name: 'I take this one' }).click()
  await expect(page.getByRole('contentinfo')).not.toContainText('nobody yet')
  await page.getByRole('group', { name: 'Quantity' }).getByRole('button', { name: '25' }).click()

  const line = page.getByRole('row', { name: /^Coiling, set-up/ })
  const computed = (await line.innerText()).match(/€[\d\s\u202f]+\.\d\d(?!.*€)/s)![0]
  await line.getByRole('button', { name: 'Change Coiling, set-up' }).click()
  await page.getByLabel('New amount').fill('120.50')
  await page.getByRole('button', { name: 'Keep this amount' }).click()
  await expect(page.getByRole('alert')).toContainText('Give a reason')
  await look(page, 'estimating-no-reason')
  await page.getByLabel('Why', { exact: true }).fill('A second arbor is needed')
  await page.getByRole('button', { name: 'Keep this amount' }).click()
  await expect(line).toContainText('€120.50')
  await expect(line).toContainText(`computed ${computed}`)
  await expect(page.getByRole('row', { name: /A second arbor is needed/ })).toContainText(`go back to the computed ${computed}`)

  await page.getByLabel(/^Margin of the price/).fill('30')
  await page.getByLabel('Why this margin').fill('A guard: more care at inspection')
  await page.getByRole('button', { name: 'Keep this margin' }).click()
  await expect(page.getByText('Changed to 30')).toBeVisible()
  await expect(page.getByText('The book says 24')).toBeVisible()
  await page.reload()
  await expect(line).toContainText(`computed ${computed}`)
  await expect(page.getByText('Changed to 30')).toBeVisible()
  await look(page, 'estimating-changed')
})

test('a double click sends the quote once, and a sent one is not changed any more', async ({ openAs, mailbox }) => {
  const page = await openAs('estimator')
  await page.goto(`/estimating/${order.ref}`)
  await page.getByLabel('A line to the customer').fill('We have thought of your guard.')
  await page.getByRole('button', { name: `Send ${order.ref} A to ${BRAM.name}` }).dblclick()
  await expect(page.getByText('Revision A was sent. A sent quote never changes.')).toBeVisible()
  await expect(page.getByRole('button', { name: /^Change / })).toHaveCount(0)
  await look(page, 'estimating-sent')
  await mailbox.waitFor(BRAM.email, /^Your quote/)
})

test('the customer reads the answer with the engineer’s note, and declines', async ({ page, mailbox }) => {
  await page.goto(linkIn(await mailbox.waitFor(BRAM.email, /^Your quote/), `/quotes/${order.ref}`))
  await expect(page.getByText('A qualified engineer must review the duty', { exact: true })).toBeVisible()
  await expect(page.getByText('We have thought of your guard.')).toBeVisible()
  await look(page, 'quote-could-hurt')
  await page.getByRole('button', { name: 'No, thank you' }).click()
  await page.getByLabel(/^What did not fit\?/).fill('We found the old spring.')
  await page.getByRole('button', { name: 'Decline this quote' }).dblclick()
  await expect(page.getByText(/no longer open|withdrawn/i).first()).toBeVisible()
  await look(page, 'quote-declined')
})
