import { timingSafeEqual } from 'node:crypto'
import { and, eq, gt, isNull, sql } from 'drizzle-orm'
import { orderAccess, orders } from '../../database/schema'
import type { Queryable, Transaction } from '../../database/client'
import type { Actor, ServiceContext } from '../context'
import { notFound } from '../errors'
import { createSecret, hashSecret } from '../sessions/token'
import { orderNumberOf } from './reference'

export type OrderRecord = typeof orders.$inferSelect

const ACCESS_DAYS = 180

/** Opens an order to whoever holds the returned secret, for half a year. It is kept nowhere: put it into the e-mail now. */
export async function createOrderAccess(tx: Transaction, orderId: string): Promise<string> {
  const secret = createSecret()
  await tx.insert(orderAccess).values({ orderId, tokenHash: hashSecret(secret), expiresAt: sql`now() + make_interval(days => ${ACCESS_DAYS})` })
  return secret
}

/** Where the customer reads the quote. Built from the configured origin, never from a header of the request. */
export const quoteUrlOf = (origin: string, ref: string, key?: string): string => `${origin}/quotes/${ref}${key ? `?key=${key}` : ''}`

/** The order of a reference, or null. No rights are checked. */
export async function findOrder(db: Queryable, ref: string): Promise<OrderRecord | null> {
  const [order] = await db.select().from(orders).where(eq(orders.number, orderNumberOf(ref)))
  return order ?? null
}

/** The order that a link opens, or null when the secret is wrong, expired or revoked. */
export async function findOrderByKey(db: Queryable, ref: string, key: string): Promise<OrderRecord | null> {
  const order = await findOrder(db, ref)
  if (!order) return null
  const rows = await db.select({ tokenHash: orderAccess.tokenHash }).from(orderAccess)
    .where(and(eq(orderAccess.orderId, order.id), isNull(orderAccess.revokedAt), gt(orderAccess.expiresAt, sql`now()`)))
  const given = hashSecret(key)
  let opens = false
  for (const { tokenHash } of rows) opens = timingSafeEqual(tokenHash, given) || opens
  return opens ? order : null
}

/** True where the order is the person's own: of their company, put to them, or asked for under their confirmed address. */
export function isOwnOrder(actor: Actor | null, order: Pick<OrderRecord, 'companyId' | 'personId' | 'contactEmail'>): boolean {
  if (!actor) return false
  if (order.companyId !== null) return order.companyId === actor.companyId
  return order.personId !== null ? order.personId === actor.personId : order.contactEmail === actor.email
}

/**
 * The order of a customer who holds its link or is signed in as its owner.
 * @throws DomainError not-found in every other case, so that a stranger does not learn which orders there are
 */
export async function requireOwnOrder(context: Pick<ServiceContext, 'db' | 'actor'>, ref: string, key?: string): Promise<OrderRecord> {
  const byKey = key ? await findOrderByKey(context.db, ref, key) : null
  if (byKey) return byKey
  const order = await findOrder(context.db, ref)
  if (!order || !isOwnOrder(context.actor, order)) throw notFound('order')
  return order
}

/**
 * As `requireOwnOrder`, and open to those who make quotes as well: for reading only.
 * @throws DomainError not-found
 */
export async function requireReadableOrder(context: Pick<ServiceContext, 'db' | 'actor'>, ref: string, key?: string): Promise<OrderRecord> {
  if (!context.actor?.roles.some(role => role === 'estimator' || role === 'admin')) return requireOwnOrder(context, ref, key)
  const order = await findOrder(context.db, ref)
  if (!order) throw notFound('order')
  return order
}
