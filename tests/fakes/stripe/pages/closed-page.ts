import type Stripe from 'stripe'
import type { HttpAnswer } from '../http'
import { formatAmount } from '../money'
import { html } from './html'
import { pageAnswer } from './layout'

/** The shop's address after a payment, with the session's id filled in. */
export function successAddress(session: Stripe.Checkout.Session): string {
  return (session.success_url ?? '').replaceAll('{CHECKOUT_SESSION_ID}', session.id)
}

/** What a session's page shows once nothing can be paid there any more. */
export function closedPage(session: Stripe.Checkout.Session): HttpAnswer {
  if (session.status === 'complete') {
    const amount = formatAmount(session.amount_total ?? 0, session.currency ?? '')
    const state = session.payment_status === 'paid'
      ? `${amount} counts as paid. You will not be charged again.`
      : `${amount} is on its way from the bank, which has not confirmed it.`
    return pageAnswer({
      status: 200,
      title: 'Payment done',
      content: html`<h1>This payment has been made</h1>
<p>${state}</p>
<p><a class="button" href="${successAddress(session)}">Go back to the shop</a></p>`,
    })
  }
  return pageAnswer({
    status: 410,
    title: 'Payment page closed',
    content: html`<h1>This payment page is closed</h1>
<p>It was open for a limited time, or the shop closed it. Nothing was taken. Start the payment again from the shop to get a new page.</p>
${session.cancel_url ? html`<p><a class="button" href="${session.cancel_url}">Go back to the shop</a></p>` : null}`,
  })
}

/** The page for an address that belongs to no session. */
export function unknownPage(): HttpAnswer {
  return pageAnswer({
    status: 404,
    title: 'No such payment page',
    content: html`<h1>There is no such payment page</h1>
<p>Check that the address is complete, or start the payment again from the shop.</p>`,
  })
}
