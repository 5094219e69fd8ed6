import type Stripe from 'stripe'
import { resourceMissing } from '../errors'
import type { Cause } from '../cause'
import type { Fake } from '../fake'
import type { FormTable } from '../form-decoding'
import { createId } from '../ids'
import { listPage, matchesCreated } from '../lists'
import type { ListPage } from '../lists'
import { createdFilter, email, expandParam, hash, list, listParams, metadata, parseParams, text, unmodelled } from '../params'

const address = hash({ city: text(), country: text({ maxLength: 2 }), line1: text(), line2: text(), postal_code: text(), state: text() })

const createParams = {
  ...expandParam,
  address,
  balance: unmodelled(),
  business_name: text({ maxLength: 150 }),
  cash_balance: unmodelled(),
  description: text({ maxLength: 5000 }),
  email: email(),
  individual_name: text({ maxLength: 150 }),
  invoice_prefix: unmodelled(),
  invoice_settings: unmodelled(),
  metadata: metadata(),
  name: text({ maxLength: 256 }),
  next_invoice_sequence: unmodelled(),
  payment_method: unmodelled(),
  phone: text({ maxLength: 20 }),
  preferred_locales: list(text()),
  shipping: unmodelled(),
  source: unmodelled(),
  tax: unmodelled(),
  tax_exempt: text({ oneOf: ['exempt', 'none', 'reverse'] }),
  tax_id_data: unmodelled(),
  test_clock: unmodelled(),
  validate: unmodelled(),
}

type ReadCustomer = ReturnType<typeof readCustomer>
function readCustomer(form: FormTable) {
  return parseParams(form, createParams)
}

/** Stores a new customer and tells of it. */
export function createCustomer(fake: Fake, read: ReadCustomer, cause: Cause): Stripe.Customer {
  const customer: Stripe.Customer = {
    id: createId('customer'),
    object: 'customer',
    address: read.address
      ? {
          city: read.address.city ?? null,
          country: read.address.country ?? null,
          line1: read.address.line1 ?? null,
          line2: read.address.line2 ?? null,
          postal_code: read.address.postal_code ?? null,
          state: read.address.state ?? null,
        }
      : null,
    balance: 0,
    ...(read.business_name === undefined ? {} : { business_name: read.business_name }),
    created: fake.clock.nowS(),
    currency: null,
    customer_account: null,
    default_source: null,
    delinquent: false,
    description: read.description ?? null,
    discount: null,
    email: read.email ?? null,
    ...(read.individual_name === undefined ? {} : { individual_name: read.individual_name }),
    invoice_prefix: 'WIREWRIGHT',
    invoice_settings: { custom_fields: null, default_payment_method: null, footer: null, rendering_options: null },
    livemode: false,
    metadata: read.metadata ?? {},
    name: read.name ?? null,
    next_invoice_sequence: 1,
    phone: read.phone ?? null,
    preferred_locales: read.preferred_locales ?? [],
    shipping: null,
    tax_exempt: read.tax_exempt ?? 'none',
    test_clock: null,
  }
  fake.state.customers[customer.id] = customer
  fake.emit('customer.created', customer, cause)
  return customer
}

/** POST /v1/customers */
export function createCustomerByRequest(fake: Fake, form: FormTable, cause: Cause): Stripe.Customer {
  return createCustomer(fake, readCustomer(form), cause)
}

/** GET /v1/customers/:id */
export function retrieveCustomer(fake: Fake, id: string, form: FormTable): Stripe.Customer {
  parseParams(form, expandParam)
  const customer = fake.state.customers[id]
  if (!customer) throw resourceMissing('customer', id)
  return customer
}

/** GET /v1/customers */
export function listCustomers(fake: Fake, form: FormTable): ListPage<Stripe.Customer> {
  const read = parseParams(form, { ...listParams, created: createdFilter(), email: text(), test_clock: unmodelled() })
  const matching = Object.values(fake.state.customers).filter(customer => matchesCreated(customer.created, read.created)
    && (read.email === undefined || customer.email === read.email))
  return listPage(matching, '/v1/customers', read)
}
