import { invalidRequest } from './errors'
import type { Fake } from './fake'

const MAX_DEPTH = 4

type Json = null | boolean | number | string | Json[] | JsonObject
interface JsonObject { [key: string]: Json }

/** A JSON copy, which is what goes over the wire anyway. */
function toJson(value: object): JsonObject {
  return JSON.parse(JSON.stringify(value)) as JsonObject
}

/** Where the object behind a reference of this name is kept. */
function lookUp(fake: Fake, name: string, id: string): object | undefined {
  const { state } = fake
  switch (name) {
    case 'payment_intent': return state.paymentIntents[id]
    case 'latest_charge':
    case 'charge': return state.charges[id]
    case 'customer': return state.customers[id]
    case 'payment_method': return state.paymentMethods[id]
    case 'product': return state.products[id]
    case 'balance_transaction':
    case 'failure_balance_transaction': return state.balanceTransactions[id]
    default: return undefined
  }
}

/** Lists that an object shows only when asked for. */
function includable(fake: Fake, parent: JsonObject, name: string): Json | undefined {
  const id = String(parent.id)
  if (parent.object === 'checkout.session' && name === 'line_items') {
    const items = fake.state.lineItems[id] ?? []
    return { object: 'list', data: items.slice(0, 10).map(toJson), has_more: items.length > 10, url: `/v1/checkout/sessions/${id}/line_items` }
  }
  if (parent.object === 'charge' && name === 'refunds') {
    const refunds = Object.values(fake.state.refunds).filter(refund => refund.charge === id).reverse()
    return { object: 'list', data: refunds.slice(0, 10).map(toJson), has_more: refunds.length > 10, url: `/v1/charges/${id}/refunds` }
  }
  return undefined
}

function expandPath(fake: Fake, parent: Json, path: string[], whole: string): void {
  const [name, ...rest] = path
  if (name === undefined || parent === null) return
  if (Array.isArray(parent)) {
    for (const item of parent) expandPath(fake, item, path, whole)
    return
  }
  const refusal = invalidRequest(`This property cannot be expanded (${whole}).`, { param: 'expand' })
  if (typeof parent !== 'object') throw refusal
  const included = parent[name] === undefined ? includable(fake, parent, name) : undefined
  if (included !== undefined) parent[name] = included
  const present = parent[name]
  if (present === undefined) throw refusal
  if (typeof present === 'string') {
    const found = lookUp(fake, name, present)
    if (!found) throw refusal
    parent[name] = toJson(found)
  } else if (present !== null && typeof present !== 'object') {
    throw refusal
  }
  expandPath(fake, parent[name] ?? null, rest, whole)
}

/** A copy of an answer in which the asked references are whole objects; refuses what cannot be expanded. */
export function expandAnswer(fake: Fake, answer: object, paths: readonly string[]): object {
  const copy = toJson(answer)
  for (const path of paths) {
    const parts = path.split('.')
    const depth = parts[0] === 'data' ? parts.length - 1 : parts.length
    if (depth > MAX_DEPTH) throw invalidRequest(`You cannot expand more than ${MAX_DEPTH} levels of a property (${path}).`, { param: 'expand' })
    expandPath(fake, copy, parts, path)
  }
  return copy
}
