import type Stripe from 'stripe'
import { assertChargeable, lineTotalMinor, readCurrency } from '../money'
import { invalidRequest, missingParameter } from '../errors'
import { createId } from '../ids'
import { hash, integer, list, metadata, text, unmodelled, url } from '../params'
import type { Param } from '../params'
import type { WireLineItem } from '../state'

const productData = hash({
  name: text({ maxLength: 5000 }),
  description: text({ maxLength: 40_000 }),
  images: list(url(), 8),
  metadata: metadata(),
  tax_code: unmodelled(),
  tax_details: unmodelled(),
  unit_label: text({ maxLength: 12 }),
}, ['name'])

const priceData = hash({
  currency: text({ pattern: /^[A-Za-z]{3}$/, patternMessage: 'Invalid currency: a three-letter code is wanted' }),
  product: unmodelled(),
  product_data: productData,
  recurring: unmodelled(),
  tax_behavior: text({ oneOf: ['exclusive', 'inclusive', 'unspecified'] }),
  unit_amount: integer({ min: 0 }),
  unit_amount_decimal: text({ pattern: /^\d{1,12}(\.\d{1,12})?$/, patternMessage: 'Invalid decimal' }),
}, ['currency', 'product_data'])

/** The `line_items` parameter: prices stated in place, no stored prices. */
export const lineItemsParam = list(hash({
  adjustable_quantity: unmodelled(),
  metadata: metadata(),
  price: unmodelled(),
  price_data: priceData,
  quantity: integer({ min: 1, max: 999_999 }),
  tax_rates: unmodelled(),
}, ['price_data', 'quantity']), 100)

type ReadLineItem = (typeof lineItemsParam extends Param<infer T> ? T : never)[number]

/** What a session's line items come to, with the products made for them. */
export interface BuiltLineItems {
  items: WireLineItem[]
  products: Stripe.Product[]
  currency: string
  totalMinor: number
}

function buildProduct(read: NonNullable<NonNullable<ReadLineItem['price_data']>['product_data']>, createdS: number): Stripe.Product {
  return {
    id: createId('product'),
    object: 'product',
    active: false,
    created: createdS,
    default_price: null,
    description: read.description ?? null,
    images: read.images ?? [],
    livemode: false,
    marketing_features: [],
    metadata: read.metadata ?? {},
    name: read.name ?? '',
    package_dimensions: null,
    shippable: null,
    statement_descriptor: null,
    tax_code: null,
    tax_details: null,
    type: 'service',
    unit_label: read.unit_label ?? null,
    updated: createdS,
    url: null,
  }
}

function buildLineItem(read: ReadLineItem, path: string, createdS: number): { item: WireLineItem, product: Stripe.Product } {
  const price = read.price_data
  if (!price?.product_data || !price.currency) throw missingParameter(`${path}[price_data]`)
  if ((price.unit_amount === undefined) === (price.unit_amount_decimal === undefined)) {
    throw invalidRequest('You must give exactly one of unit_amount and unit_amount_decimal.', { param: `${path}[price_data]` })
  }
  const currency = readCurrency(price.currency, `${path}[price_data][currency]`)
  const unitAmountDecimal = price.unit_amount_decimal ?? String(price.unit_amount)
  const quantity = read.quantity ?? 1
  const totalMinor = lineTotalMinor(unitAmountDecimal, quantity)
  const product = buildProduct(price.product_data, createdS)
  const item: WireLineItem = {
    id: createId('lineItem'),
    object: 'item',
    adjustable_quantity: null,
    amount_discount: 0,
    amount_subtotal: totalMinor,
    amount_tax: 0,
    amount_total: totalMinor,
    currency,
    description: product.name,
    metadata: read.metadata ?? {},
    price: {
      id: createId('price'),
      object: 'price',
      active: false,
      billing_scheme: 'per_unit',
      created: createdS,
      currency,
      custom_unit_amount: null,
      livemode: false,
      lookup_key: null,
      metadata: {},
      nickname: null,
      product: product.id,
      recurring: null,
      tax_behavior: price.tax_behavior ?? 'unspecified',
      tiers_mode: null,
      transform_quantity: null,
      type: 'one_time',
      unit_amount: /^\d+$/.test(unitAmountDecimal) ? Number(unitAmountDecimal) : null,
      unit_amount_decimal: unitAmountDecimal,
    },
    quantity,
  }
  return { item, product }
}

/** Builds the line items of a session; refuses mixed currencies and totals that cannot be charged. */
export function buildLineItems(read: readonly ReadLineItem[], createdS: number): BuiltLineItems {
  if (read.length === 0) throw missingParameter('line_items')
  const built = read.map((item, index) => buildLineItem(item, `line_items[${index}]`, createdS))
  const currencies = new Set(built.map(({ item }) => item.currency))
  const [currency] = currencies
  if (currency === undefined || currencies.size > 1) {
    throw invalidRequest('All line items of a Checkout Session must have the same currency.', { param: 'line_items' })
  }
  const totalMinor = built.reduce((sum, { item }) => sum + item.amount_total, 0)
  assertChargeable(totalMinor, currency)
  return { items: built.map(({ item }) => item), products: built.map(({ product }) => product), currency, totalMinor }
}
