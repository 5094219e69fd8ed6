import type Stripe from 'stripe'
import type { Fake } from '../fake'
import { attemptPayment, endAuthentication } from '../flow/attempt'
import { emptyTable } from '../form-decoding'
import type { FormTable } from '../form-decoding'
import type { HttpAnswer } from '../http'
import { matchRoute } from '../router'
import type { Route } from '../router'
import type { SessionSetup } from '../state'
import { closedPage, successAddress, unknownPage } from './closed-page'
import { redirectAnswer } from './layout'
import { checkPayForm, readPayForm } from './pay-form'
import type { PayFormErrors, PayFormValues } from './pay-form'
import { authenticatePage, payPage } from './pay-page'
import { STYLESHEET } from './stylesheet'

interface OpenPage { fake: Fake, session: Stripe.Checkout.Session, setup: SessionSetup, form: FormTable }

function knownEmail({ fake, session }: OpenPage): string | null {
  const customer = typeof session.customer === 'string' ? fake.state.customers[session.customer] : undefined
  return session.customer_email ?? customer?.email ?? null
}

function showPayPage(page: OpenPage, values: PayFormValues, errors: PayFormErrors): HttpAnswer {
  const { fake, session, setup } = page
  const intent = typeof session.payment_intent === 'string' ? fake.state.paymentIntents[session.payment_intent] : undefined
  const hasErrors = Object.keys(errors).length > 0
  return payPage({
    session,
    items: fake.state.lineItems[session.id] ?? [],
    description: setup.description,
    knownEmail: knownEmail(page),
    values,
    errors,
    declineMessage: hasErrors ? null : intent?.last_payment_error?.message ?? null,
    isAwaitingAuthentication: setup.cardAwaitingAuthentication !== null,
    attemptNumber: setup.nextAttemptNumber,
  })
}

/** Who tried last, so that a second try need not ask again. */
function lastPayer({ fake, session }: OpenPage): { email: string, name: string } {
  const intent = typeof session.payment_intent === 'string' ? fake.state.paymentIntents[session.payment_intent] : undefined
  const details = intent?.last_payment_error?.payment_method?.billing_details
  return { email: details?.email ?? '', name: details?.name ?? '' }
}

/** A second click sends the number of an attempt that has been made: it is shown the present state, and charges nothing. */
function isStale({ setup, form }: OpenPage): boolean {
  return form.attempt !== String(setup.nextAttemptNumber)
}

function presentState({ session, setup }: OpenPage): HttpAnswer {
  return redirectAnswer(setup.cardAwaitingAuthentication === null ? `/c/pay/${session.id}` : `/c/pay/${session.id}/authenticate`)
}

function submitPayment(page: OpenPage): HttpAnswer {
  const { fake, session } = page
  if (isStale(page)) return presentState(page)
  const values = readPayForm(page.form)
  const email = knownEmail(page)
  const { method, errors } = checkPayForm(values, {
    email,
    hasCard: session.payment_method_types.includes('card'),
    hasDebit: session.payment_method_types.some(type => type !== 'card'),
    nowMs: fake.clock.nowMs(),
  })
  if (!method) return showPayPage(page, values, errors)
  const outcome = attemptPayment(fake, session, method, { email: email ?? values.email, name: values.name || null })
  fake.persist()
  return outcome === 'paid' || outcome === 'processing' ? redirectAnswer(successAddress(session)) : presentState(page)
}

function showAuthentication(page: OpenPage): HttpAnswer {
  return page.setup.cardAwaitingAuthentication === null ? presentState(page) : authenticatePage(page.session, page.setup.nextAttemptNumber)
}

function submitAuthentication(page: OpenPage): HttpAnswer {
  const { fake, session, setup, form } = page
  if (setup.cardAwaitingAuthentication === null || isStale(page)) return presentState(page)
  const outcome = endAuthentication(fake, session, form.result === 'complete')
  fake.persist()
  return outcome === 'paid' ? redirectAnswer(successAddress(session)) : presentState(page)
}

const ROUTES: readonly Route<(page: OpenPage) => HttpAnswer>[] = [
  { method: 'GET', path: '/c/pay/:id', handler: page => showPayPage(page, { ...readPayForm(emptyTable()), ...lastPayer(page) }, {}) },
  { method: 'POST', path: '/c/pay/:id', handler: submitPayment },
  { method: 'GET', path: '/c/pay/:id/authenticate', handler: showAuthentication },
  { method: 'POST', path: '/c/pay/:id/authenticate', handler: submitAuthentication },
]

/** Answers a request under /c/: the hosted pages. */
export function answerPage(fake: Fake, method: string, path: string, form: FormTable): HttpAnswer {
  if (method === 'GET' && path === '/c/style.css') {
    return { status: 200, headers: { 'content-type': 'text/css; charset=utf-8' }, body: STYLESHEET }
  }
  const route = matchRoute(ROUTES, method, path)
  fake.scheduler.sweep()
  const session = route ? fake.state.sessions[route.parts.id ?? ''] : undefined
  const setup = session ? fake.state.setups[session.id] : undefined
  if (!route || !session || !setup) return unknownPage()
  if (session.status !== 'open') {
    return method === 'POST' && session.status === 'complete' ? redirectAnswer(successAddress(session)) : closedPage(session)
  }
  return route.handler({ fake, session, setup, form })
}
