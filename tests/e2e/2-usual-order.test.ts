import type { BrowserContext } from '@playwright/test'
import { Buyer } from './support/buyer'
import { linkIn } from './support/mailbox'
import { look } from './support/look'
import { OrderForm, USUAL_SPRING } from './support/order-form'
import { PayPage } from './support/pay-page'
import { expect, test } from './support/test'

/** One usual order from the form to the job's cost, each person in a window of their own. The tests go on from each other. */
test.describe.configure({ mode: 'serial' })

const TITLE = 'Return spring of a bottle filler'
const ORLA = { name: 'Orla Fenwick', firm: 'Brackwater Fillers', email: 'orla@brackwater.example' }
const DEPOSIT = '€158.98'
const BALANCE = '€238.46'
const OPERATIONS = ['Coiling', 'Stress relief', 'End grinding', 'Inspection', 'Packing'] as const
const order = { ref: '', jobRef: '', quoteUrl: '' }
const other = { jobRef: '' }
/** The customer's cookies, from one test to the next. */
let signedIn: Awaited<ReturnType<BrowserContext['storageState']>>

test('a visitor describes a spring and sees it drawn, priced and dated; a reload loses nothing of it', async ({ page, mailbox }) => {
  const form = new OrderForm(page)
  await form.open()
  await form.fill(USUAL_SPRING)
  await expect(form.drawing).toHaveAccessibleName(/wire 2\.20 mm/)
  await expect(form.priceRow('200')).toContainText('€331.20')
  await expect(form.view).toContainText(/could be dispatched\s*\d+ [A-Z][a-z]{2} \d{4}/)
  await form.fill({ quantity3: '600' })
  await expect(form.priceRow('600')).toBeVisible()

  await page.reload()
  await expect(form.field('firstForce')).toHaveValue('60')
  await expect(form.field('quantity3')).toHaveValue('600')
  await form.fill({ quantity3: '500' })
  await expect(form.priceRow('200')).toContainText('€331.20')
  // Who asks is not kept on the device: it may not be theirs.
  await form.fill({ title: TITLE, ...ORLA })
  await form.answerCouldHurt('No')
  await look(page, 'order-filled')

  await form.send.dblclick()
  await expect(page).toHaveURL(/\/quotes\/OX-\d+/)
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(/^Quote OX-\d+$/)
  order.ref = new URL(page.url()).pathname.split('/').at(-1)!
  await mailbox.waitFor(ORLA.email, /^Your quote/)
})

test('the quote comes once by e-mail, and its link opens it anywhere', async ({ page, mailbox }) => {
  const mail = await mailbox.waitFor(ORLA.email, /^Your quote/)
  expect(mail.subject).toContain(order.ref)
  expect(mail.text).toContain('€1.656')
  order.quoteUrl = linkIn(mail, `/quotes/${order.ref}`)
  await page.goto(order.quoteUrl)
  await expect(page.getByRole('img', { name: /wire 2\.20 mm/ })).toBeVisible()
  await expect(page.getByRole('row', { name: /^200 / })).toContainText('€331.20')
  await look(page, 'quote')
})

test('a quote does not open without its key', async ({ page, watch }) => {
  watch.expect(404, /\/(api\/)?quotes\//)
  await page.goto(`/quotes/${order.ref}`)
  await expect(page.getByText(/no quote at this address/)).toBeVisible()
  await look(page, 'quote-without-key')
})

test('the customer accepts one quantity; a double click accepts once', async ({ page, mailbox }) => {
  await page.goto(order.quoteUrl)
  await page.getByRole('radio', { name: '200' }).check()
  await page.getByRole('button', { name: 'Accept 200 springs' }).dblclick()
  await expect(page.getByText('Accepted. Now confirm your address')).toBeVisible()
  await page.reload()
  await expect(page.getByText('Accepted. Now confirm your address')).toBeVisible()
  await mailbox.waitFor(ORLA.email, /^Confirm your address/)
  await look(page, 'quote-accepted')
})

test('the e-mailed link confirms the address by one button, and works once', async ({ page, mailbox, watch, openAs }) => {
  const link = linkIn(await mailbox.waitFor(ORLA.email, /^Confirm your address/), '/link/')
  // What a mail program does with every link.
  expect((await page.request.get(link)).status()).toBe(200)
  await page.goto(link)
  await look(page, 'link')
  await page.getByRole('button', { name: 'Yes, sign me in' }).click()
  await expect(page.getByRole('button', { name: `Pay deposit of ${DEPOSIT}` })).toBeVisible()
  signedIn = await page.context().storageState()
  await look(page, 'quote-confirmed')

  watch.expect(404, /\/api\/auth\/use-link/)
  watch.expect(409, /\/api\/auth\/use-link/)
  watch.expect(410, /\/api\/auth\/use-link/)
  watch.expect(422, /\/api\/auth\/use-link/)
  const stranger = await openAs('visitor')
  await stranger.goto(link)
  await stranger.getByRole('button', { name: 'Yes, sign me in' }).click()
  await expect(stranger.getByText('The link did not work')).toBeVisible()
  await look(stranger, 'link-used')
})

test('the deposit is paid: a declined card, then one with a second step; back and reload change nothing', async ({ openAs, mailbox }) => {
  const page = await openAs(signedIn)
  await page.goto(`/quotes/${order.ref}`)
  await page.getByRole('button', { name: `Pay deposit of ${DEPOSIT}` }).dblclick()
  const pay = new PayPage(page)
  await pay.isOpen(DEPOSIT)
  await look(page, 'pay')
  await pay.fillEmail(ORLA.email)
  await pay.choose('The bank declines it')
  await pay.pay.click()
  await expect(pay.summary).toContainText('Your card was declined')
  await look(page, 'pay-declined')

  await page.goBack()
  await page.goto(`/quotes/${order.ref}`)
  await page.getByRole('button', { name: `Pay deposit of ${DEPOSIT}` }).click()
  await pay.isOpen(DEPOSIT)
  await pay.choose('The bank asks for a second step')
  await pay.pay.click()
  await expect(page.getByRole('heading', { name: 'Your bank asks for a second step' })).toBeVisible()
  await look(page, 'pay-second-step')
  await page.getByRole('button', { name: 'Complete authentication' }).click()

  await expect(page).toHaveURL(new RegExp(`/account/orders/${order.ref}`))
  await expect(page.getByText('Thank you: the deposit is here')).toBeVisible({ timeout: 20_000 })
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(/^Deposit paid/)
  await look(page, 'account-order-deposit-paid')
  await page.reload()
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(/^Deposit paid/)
  await mailbox.waitFor(ORLA.email, /^Deposit received/)
  await page.goto('/account')
  await expect(page.getByRole('row', { name: new RegExp(order.ref) })).toContainText('Deposit paid')
  await look(page, 'account')
})

test('the supervisor finds the paid job in Loading, and no unpaid one', async ({ openAs, services }) => {
  const unpaid = await Buyer.create(services, 'Una Unpaid')
  await unpaid.accept(await unpaid.sendEnquiry('Spring that nobody has paid for'), 200)
  const second = await Buyer.create(services, 'Sam Second')
  const outcome = await second.sendEnquiry('Spring of the second job')
  await second.accept(outcome, 50)
  await second.payDeposit(outcome)

  const page = await openAs('supervisor')
  await page.goto('/loading')
  const row = page.getByRole('row', { name: new RegExp(TITLE) })
  await expect(row).toContainText('set aside')
  await expect(page.getByText('Spring that nobody has paid for')).toHaveCount(0)
  order.jobRef = (await row.getByRole('link').first().innerText()).trim()
  other.jobRef = (await page.getByRole('row', { name: /Spring of the second job/ }).getByRole('link').first().innerText()).trim()
  expect(order.jobRef).toMatch(/^J-\d+$/)
  await look(page, 'loading-to-plan')
  await unpaid.close()
  await second.close()
})

test('the supervisor places an operation by form; a taken time is refused with the other job and the first free time', async ({ openAs, watch }) => {
  const page = await openAs('supervisor')
  await page.goto(`/loading/jobs/${order.jobRef}`)
  await look(page, 'job-to-plan')
  // A Tuesday within the shift of the coiler, far enough ahead to be free; the demo shop keeps no holiday on one.
  const tuesday = nextTuesday()
  const place = async (operation: string, time: string) => {
    await page.getByLabel(`Start of ${operation}`).fill(time)
    await page.getByRole('row', { name: new RegExp(`^\\d\\. ${operation}`, 'i') }).getByRole('button', { name: /^(Place|Move) it$/ }).click()
  }
  await place('coiling', `${tuesday}T08:00`)
  await expect(page.getByRole('row', { name: /^1\. Coiling/ })).toContainText('Planned')

  watch.expect(409, /\/operations\/.*\/place$/)
  await page.goto(`/loading/jobs/${other.jobRef}`)
  await place('coiling', `${tuesday}T08:30`)
  const why = page.getByRole('row', { name: /^1\. Coiling/ }).getByRole('alert')
  await expect(why).toContainText(order.jobRef)
  await expect(why).toContainText(/\d{1,2}:\d{2}/)
  await look(page, 'job-clash')
})

test('all of the job is placed at once, and the customer is told the date once', async ({ openAs, mailbox }) => {
  const page = await openAs('supervisor')
  await page.goto(`/loading/jobs/${order.jobRef}`)
  await page.getByRole('button', { name: 'Place all at the first free time' }).dblclick()
  await expect(page.getByRole('status')).toContainText(`${order.jobRef} leaves`)
  for (const [index, name] of OPERATIONS.entries()) await expect(page.getByRole('row', { name: new RegExp(`^${index + 1}\\. ${name}`) })).toContainText('Planned')
  await look(page, 'job-planned')
  const mail = await mailbox.waitFor(ORLA.email, new RegExp(`^${order.ref} is planned`))
  expect(mail.text).toMatch(/leave us on \w+ \d{1,2} \w+ \d{4}/)
  await page.goto('/loading')
  await expect(page.getByRole('row', { name: new RegExp(TITLE) })).toContainText('Planned')
  await look(page, 'loading-planned')
})

test('an operator starts, runs, counts and finishes each operation in order', async ({ openAs, mailbox }) => {
  const page = await openAs('operator')
  await page.goto('/bench')
  await look(page, 'bench')
  for (const [index, name] of OPERATIONS.entries()) {
    await page.goto('/bench')
    await page.getByRole('main').getByRole('link', { name: new RegExp(`^${CENTRES[name]} .*1 waits`) }).click()
    const work = page.getByRole('region', { name: new RegExp(`^${name}, ${order.jobRef}`) })
    await expect(work).toBeVisible()
    if (index === 0) await look(page, 'bench-planned')
    await work.getByRole('button', { name: 'Start setting up' }).dblclick()
    await work.getByRole('button', { name: 'Set-up is done, run' }).click()
    if (index === 0) await page.reload()
    // Taps faster than the network: none is lost.
    for (const key of ['+50 good', '+1 good', '+1 good', '−1 good, taken away', '−1 good, taken away']) await work.getByRole('button', { name: key }).click()
    await expect(work).toContainText('150')
    await work.getByRole('button', { name: '−1 good, taken away' }).click()
    if (index === 0) {
      await work.getByRole('button', { name: '+1 scrap' }).click()
      await look(page, 'bench-running')
    }
    await work.getByRole('button', { name: `${name} is finished` }).click()
    await page.getByLabel('Good springs').fill('200')
    if (index === 0) await page.getByLabel('Wire used, kg').fill('3.7')
    await page.getByLabel('Minutes setting up').fill(index % 2 === 0 ? '40' : '')
    await page.getByLabel('Minutes running').fill('25')
    if (index === 0) await look(page, 'bench-finish')
    await page.getByRole('button', { name: `Record: ${name} is finished` }).click()
    await expect(work).toBeHidden()
  }
  await mailbox.waitFor(ORLA.email, /^Your springs are being made/)
  const done = await mailbox.waitFor(ORLA.email, /^Your springs are finished/)
  expect(done.text).toContain(BALANCE)
})

test('the customer follows the order and pays the balance', async ({ openAs }) => {
  const page = await openAs(signedIn)
  await page.goto(`/account/orders/${order.ref}`)
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Finished: the balance is due')
  await look(page, 'account-order-finished')
  await page.getByRole('button', { name: `Pay balance of ${BALANCE}` }).click()
  const pay = new PayPage(page)
  await pay.isOpen(BALANCE)
  await pay.fillEmail(ORLA.email)
  await pay.choose('The payment works')
  await pay.pay.click()
  await expect(page.getByText('Thank you: the balance is here')).toBeVisible({ timeout: 20_000 })
})

test('the supervisor says that the springs have left; the order is settled', async ({ openAs, mailbox }) => {
  const page = await openAs('supervisor')
  await page.goto(`/loading/jobs/${order.jobRef}`)
  await page.getByRole('button', { name: 'The springs have left' }).dblclick()
  await expect(page.getByRole('status')).toContainText('is dispatched')
  await look(page, 'job-dispatched')
  await mailbox.waitFor(ORLA.email, /dispatched|left us|on their way/i)
  const customer = await openAs(signedIn)
  await customer.goto(`/account/orders/${order.ref}`)
  await expect(customer.getByRole('heading', { level: 1 })).toHaveText(/^Settled/)
  await look(customer, 'account-order-settled')
})

test('the bookkeeper reads the cost of the job line by line, and it adds up', async ({ openAs }) => {
  const page = await openAs('bookkeeper')
  await page.goto('/ledger')
  const row = page.getByRole('row', { name: new RegExp(order.jobRef) })
  await expect(row).toContainText('€331.20')
  await look(page, 'ledger')
  await row.getByRole('link').click()
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(`${order.jobRef}: what it cost`)
  await expect(page.getByRole('row', { name: /^Coiling, set-up/ })).toContainText('€81.00')
  const table = page.getByRole('region', { name: 'Line by line' }).last().getByRole('table')
  for (const column of [3, 4, 5]) {
    const lines = (await table.locator(`tbody tr > :nth-child(${column + 1})`).allInnerTexts()).map(toMinor)
    const together = toMinor(await table.locator('tfoot tr').locator(`:nth-child(${column - 1})`).innerText())
    expect(lines.length).toBeGreaterThanOrEqual(7)
    expect(lines.reduce((sum, minor) => sum + minor, 0)).toBe(together)
  }
  await look(page, 'ledger-job')
})

test('each e-mail of the order came once, and Works shows them as sent', async ({ openAs, mailbox }) => {
  const subjects = await mailbox.subjects(ORLA.email)
  expect(new Set(subjects).size).toBe(subjects.length)
  const page = await openAs('admin')
  await page.goto('/works/mail')
  const rows = page.getByRole('row', { name: new RegExp(order.ref) })
  await expect(rows).toHaveCount(subjects.length)
  await expect(rows.filter({ hasNotText: /sent,/ })).toHaveCount(0)
  await look(page, 'works-mail')
})

/** Where each operation is done in the demo shop, for wire of 2.2 mm. */
const CENTRES: Readonly<Record<(typeof OPERATIONS)[number], string>> = { 'Coiling': 'C2', 'Stress relief': 'F1', 'End grinding': 'G1', 'Inspection': 'I1', 'Packing': 'P1' }

/** A Tuesday at least a week ahead, as YYYY-MM-DD. */
function nextTuesday(): string {
  const day = new Date(Date.now() + 7 * 86_400_000)
  day.setUTCDate(day.getUTCDate() + (9 - day.getUTCDay()) % 7)
  return day.toISOString().slice(0, 10)
}

/** `−€1 234.50` as -123450; a dash is nothing. */
function toMinor(text: string): number {
  const clean = text.replace(/[\s\u202f€+]/g, '').replace('\u2212', '-')
  return clean === '–' || clean === '' ? 0 : Math.round(Number(clean) * 100)
}
