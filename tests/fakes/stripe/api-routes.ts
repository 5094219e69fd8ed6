import type { Cause } from './cause'
import type { Fake } from './fake'
import type { FormTable } from './form-decoding'
import { retrieveBalanceTransaction } from './resources/balance-transactions'
import { listCharges, retrieveCharge } from './resources/charges'
import { createSession, expireSessionByRequest, listSessionLineItems, listSessions, retrieveSession } from './resources/checkout-sessions'
import { createCustomerByRequest, listCustomers, retrieveCustomer } from './resources/customers'
import { listDisputes, retrieveDispute } from './resources/disputes'
import { listEvents, retrieveEvent } from './resources/events'
import { listPaymentIntents, retrievePaymentIntent } from './resources/payment-intents'
import { createRefund, listRefunds, retrieveRefund } from './resources/refunds'
import type { Route } from './router'

/** Carries out one API request and answers the object. */
export type ApiHandler = (fake: Fake, call: { id: string, form: FormTable, cause: Cause }) => object

/** Every API route that the fake serves (FK-1). */
export const API_ROUTES: readonly Route<ApiHandler>[] = [
  { method: 'POST', path: '/v1/checkout/sessions', handler: (fake, { form }) => createSession(fake, form) },
  { method: 'GET', path: '/v1/checkout/sessions', handler: (fake, { form }) => listSessions(fake, form) },
  { method: 'GET', path: '/v1/checkout/sessions/:id', handler: (fake, { id, form }) => retrieveSession(fake, id, form) },
  { method: 'POST', path: '/v1/checkout/sessions/:id/expire', handler: (fake, { id, form, cause }) => expireSessionByRequest(fake, id, form, cause) },
  { method: 'GET', path: '/v1/checkout/sessions/:id/line_items', handler: (fake, { id, form }) => listSessionLineItems(fake, id, form) },
  { method: 'GET', path: '/v1/payment_intents', handler: (fake, { form }) => listPaymentIntents(fake, form) },
  { method: 'GET', path: '/v1/payment_intents/:id', handler: (fake, { id, form }) => retrievePaymentIntent(fake, id, form) },
  { method: 'GET', path: '/v1/charges', handler: (fake, { form }) => listCharges(fake, form) },
  { method: 'GET', path: '/v1/charges/:id', handler: (fake, { id, form }) => retrieveCharge(fake, id, form) },
  { method: 'POST', path: '/v1/refunds', handler: (fake, { form, cause }) => createRefund(fake, form, cause) },
  { method: 'GET', path: '/v1/refunds', handler: (fake, { form }) => listRefunds(fake, form) },
  { method: 'GET', path: '/v1/refunds/:id', handler: (fake, { id, form }) => retrieveRefund(fake, id, form) },
  { method: 'POST', path: '/v1/customers', handler: (fake, { form, cause }) => createCustomerByRequest(fake, form, cause) },
  { method: 'GET', path: '/v1/customers', handler: (fake, { form }) => listCustomers(fake, form) },
  { method: 'GET', path: '/v1/customers/:id', handler: (fake, { id, form }) => retrieveCustomer(fake, id, form) },
  { method: 'GET', path: '/v1/disputes', handler: (fake, { form }) => listDisputes(fake, form) },
  { method: 'GET', path: '/v1/disputes/:id', handler: (fake, { id, form }) => retrieveDispute(fake, id, form) },
  { method: 'GET', path: '/v1/balance_transactions/:id', handler: (fake, { id, form }) => retrieveBalanceTransaction(fake, id, form) },
  { method: 'GET', path: '/v1/events', handler: (fake, { form }) => listEvents(fake, form) },
  { method: 'GET', path: '/v1/events/:id', handler: (fake, { id, form }) => retrieveEvent(fake, id, form) },
]
