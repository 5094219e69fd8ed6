import type Stripe from 'stripe'
import { groupDigits, TEST_CARDS } from '../cards'
import type { HttpAnswer } from '../http'
import { formatAmount } from '../money'
import type { WireLineItem } from '../state'
import { html } from './html'
import type { SafeHtml } from './html'
import { pageAnswer } from './layout'
import { OFFERED_CARDS } from './pay-form'
import type { PayFormErrors, PayFormValues } from './pay-form'

/** Everything the payment page shows. */
export interface PayPageView {
  session: Stripe.Checkout.Session
  items: readonly WireLineItem[]
  description: string | null
  /** Address that is known already and cannot be changed. */
  knownEmail: string | null
  values: PayFormValues
  errors: PayFormErrors
  /** Why the last try failed, if it did. */
  declineMessage: string | null
  isAwaitingAuthentication: boolean
  attemptNumber: number
}

/** Where the browser may end up after the form: our own pages and the shop's. */
function formTargets(session: Stripe.Checkout.Session): string[] {
  return session.success_url && URL.canParse(session.success_url) ? [new URL(session.success_url).origin] : []
}

function itemsTable(view: PayPageView): SafeHtml {
  const currency = view.session.currency ?? ''
  const rows = view.items.map(item => html`<tr><td class="wrap">${item.description}</td><td class="amount">${item.quantity ?? 1}</td><td class="amount">${formatAmount(item.amount_total, item.currency)}</td></tr>
`)
  return html`<table>
<caption>What you pay for</caption>
<thead><tr><th scope="col">Description</th><th scope="col" class="amount">Quantity</th><th scope="col" class="amount">Amount</th></tr></thead>
<tbody>
${rows}</tbody>
<tfoot><tr><th scope="row" colspan="2">Total</th><td class="amount">${formatAmount(view.session.amount_total ?? 0, currency)}</td></tr></tfoot>
</table>`
}

function choice(view: PayPageView, value: string, label: string, note: string): SafeHtml {
  const id = `choice-${value}`
  return html`<div class="choice"><input type="radio" name="choice" id="${id}" value="${value}"${view.values.choice === value ? html` checked` : null}><label for="${id}"><span>${label}</span><span class="quiet">${note}</span></label></div>
`
}

function textField(view: PayPageView, field: { name: 'email' | 'name' | 'number' | 'expiry' | 'cvc', label: string, hint?: string, type?: string, autocomplete: string, isShort?: boolean, inputMode?: string }): SafeHtml {
  const wrong = field.name === 'name' ? undefined : view.errors[field.name]
  const described = [field.hint ? `${field.name}-hint` : '', wrong ? `${field.name}-error` : ''].filter(Boolean).join(' ')
  return html`<div class="field${field.isShort ? ' short' : ''}">
<label for="${field.name}">${field.label}</label>
${field.hint ? html`<span class="quiet" id="${field.name}-hint">${field.hint}</span>
` : null}<input id="${field.name}" name="${field.name}" type="${field.type ?? 'text'}" value="${view.values[field.name]}" autocomplete="${field.autocomplete}"${field.inputMode ? html` inputmode="${field.inputMode}"` : null}${described ? html` aria-describedby="${described}"` : null}${wrong ? html` aria-invalid="true"` : null}>
${wrong ? html`<p class="error" id="${field.name}-error">${wrong}</p>` : null}</div>
`
}

function problemSummary(view: PayPageView): SafeHtml | null {
  const problems = Object.entries(view.errors)
  if (problems.length === 0 && view.declineMessage === null) return null
  const heading = problems.length > 0 ? 'Something needs correcting' : 'The payment did not go through'
  const lines = problems.length > 0
    ? problems.map(([field, message]) => html`<p><a href="#${field}">${message}</a></p>`)
    : [html`<p>${view.declineMessage} Nothing was taken. You can try again with another card.</p>`]
  return html`<div class="summary" role="alert"><h2>${heading}</h2>${lines}</div>`
}

/** The payment page of an open session. */
export function payPage(view: PayPageView): HttpAnswer {
  const { session } = view
  const amount = formatAmount(session.amount_total ?? 0, session.currency ?? '')
  const hasDebit = session.payment_method_types.some(type => type !== 'card')
  const hasCard = session.payment_method_types.includes('card')
  const hasProblem = Object.keys(view.errors).length > 0
  const cards = OFFERED_CARDS.map(card => choice(view, card.number, `Test card ${groupDigits(card.number)}`, card.purpose))
  const debits = [
    choice(view, 'debit_succeeds', 'Bank debit that succeeds later', 'The order waits for some seconds, then the money arrives'),
    choice(view, 'debit_fails', 'Bank debit that fails later', 'The order waits for some seconds, then the bank refuses'),
  ]
  const others = TEST_CARDS.slice(OFFERED_CARDS.length).map(card => html`<li>${groupDigits(card.number)}: ${card.purpose}</li>
`)
  const content = html`${problemSummary(view)}
<p class="quiet">${session.branding_settings?.display_name ?? 'Oxmere Spring Works'}</p>
<h1>Pay ${amount}</h1>
${view.description ? html`<p class="wrap">${view.description}</p>` : null}
${itemsTable(view)}
${view.isAwaitingAuthentication ? html`<p>Your bank still waits for the second step. <a href="/c/pay/${session.id}/authenticate">Go on with the second step</a></p>` : null}
<form method="post" action="/c/pay/${session.id}" novalidate>
<input type="hidden" name="attempt" value="${view.attemptNumber}">
<h2>Who pays</h2>
${view.knownEmail === null
  ? textField(view, { name: 'email', label: 'E-mail address', type: 'email', autocomplete: 'email' })
  : html`<p class="wrap">E-mail address: ${view.knownEmail}</p>`}
${textField(view, { name: 'name', label: 'Name (optional)', autocomplete: 'name' })}
<h2>How to pay</h2>
<fieldset id="choice"><legend>Choose a way to pay</legend>
${view.errors.choice ? html`<p class="error">${view.errors.choice}</p>` : null}
${hasCard ? cards : []}${hasDebit ? debits : []}</fieldset>
${hasCard
  ? html`<fieldset><legend>Or type a test card</legend>
<p class="quiet">A typed number counts instead of the card chosen above. Never type the number of a real card.</p>
${textField(view, { name: 'number', label: 'Card number', autocomplete: 'off', inputMode: 'numeric' })}
${textField(view, { name: 'expiry', label: 'Ends (month / year)', hint: 'Any month to come, or leave it empty', autocomplete: 'off', isShort: true })}
${textField(view, { name: 'cvc', label: 'Security code', hint: 'Any three digits, or leave it empty', autocomplete: 'off', isShort: true, inputMode: 'numeric' })}
<details><summary>More test numbers</summary><ul>
${others}</ul></details>
</fieldset>`
  : null}
<button type="submit">Pay ${amount}</button>
</form>
${session.cancel_url ? html`<p><a href="${session.cancel_url}">Cancel and go back to the shop</a></p>` : null}`
  return pageAnswer({ status: hasProblem ? 422 : 200, title: `${hasProblem || view.declineMessage ? 'Problem: ' : ''}Pay ${amount}`, content, formTargets: formTargets(session) })
}

/** The page of the bank's second step. */
export function authenticatePage(session: Stripe.Checkout.Session, attemptNumber: number): HttpAnswer {
  const amount = formatAmount(session.amount_total ?? 0, session.currency ?? '')
  const content = html`<h1>Your bank asks for a second step</h1>
<p>A real bank would send you to its own page or app here, to confirm that it is you who pays ${amount}. Choose how that ends.</p>
<form method="post" action="/c/pay/${session.id}/authenticate">
<input type="hidden" name="attempt" value="${attemptNumber}">
<button type="submit" name="result" value="complete">Complete authentication</button>
<button type="submit" name="result" value="fail" class="second">Fail authentication</button>
</form>
<p><a href="/c/pay/${session.id}">Go back and choose another way to pay</a></p>`
  return pageAnswer({ status: 200, title: 'Second step with your bank', content, formTargets: formTargets(session) })
}
