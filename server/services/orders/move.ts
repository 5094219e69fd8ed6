import { eq } from 'drizzle-orm'
import { ORDER_MOVES, type OrderState } from '#shared/schemas/order-states'
import { orderEvents, orders } from '../../database/schema'
import type { Transaction } from '../../database/client'
import { conflict, notFound, stale } from '../errors'

export type OrderMove = {
  orderId: string
  /** States the caller expects; the order being in another one is a conflict. */
  from: readonly OrderState[]
  to: OrderState
  /** Shown in the order's history. */
  why: string
  /** Who moves it; null for the shop itself or a guest with the link. */
  personId: string | null
  now: Date
  /** The version the writer saw, where a person writes. */
  version?: number
  /** What changes together with the state. */
  set?: Partial<Omit<typeof orders.$inferInsert, 'id' | 'state' | 'version' | 'updatedAt'>>
}

const WORDS: Readonly<Partial<Record<OrderState, string>>> = { 'enquiry': 'still with our estimator', 'deposit-paid': 'paid', 'in-work': 'in work' }
const wordsOf = (state: OrderState) => WORDS[state] ?? state

/**
 * Moves an order and writes the event in the same transaction: the one way its state changes. The row is locked first, so
 * of two movers the second sees what the first did.
 * @throws DomainError conflict when the order is in another state, stale when its version is another
 * @throws Error when the move is not one of ORDER_MOVES, which is a defect of the caller
 */
export async function moveOrder(tx: Transaction, move: OrderMove): Promise<{ version: number, from: OrderState }> {
  for (const state of move.from) {
    if (!ORDER_MOVES[state].includes(move.to)) throw new Error(`An order never moves from ${state} to ${move.to}`)
  }
  const [current] = await tx.select({ state: orders.state, version: orders.version }).from(orders).where(eq(orders.id, move.orderId)).for('update')
  if (!current) throw notFound('order')
  if (!move.from.includes(current.state)) throw conflict(`This order is ${wordsOf(current.state)}, so that is no longer possible.`)
  if (move.version !== undefined && current.version !== move.version) throw stale('order')

  const version = current.version + 1
  await tx.update(orders).set({ ...move.set, state: move.to, version, updatedAt: move.now }).where(eq(orders.id, move.orderId))
  await tx.insert(orderEvents).values({ orderId: move.orderId, at: move.now, personId: move.personId, fromState: current.state, toState: move.to, why: move.why })
  return { version, from: current.state }
}

/** The first event of an order, written in the transaction that inserts it. */
export async function recordOrderStart(tx: Transaction, start: Pick<OrderMove, 'orderId' | 'why' | 'personId' | 'now'>): Promise<void> {
  await tx.insert(orderEvents).values({ orderId: start.orderId, at: start.now, personId: start.personId, fromState: null, toState: 'enquiry', why: start.why })
}
