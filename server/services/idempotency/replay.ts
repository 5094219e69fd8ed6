import { createHash } from 'node:crypto'
import { and, eq, sql } from 'drizzle-orm'
import { idempotencyKeys } from '../../database/schema'
import type { Queryable, Transaction } from '../../database/client'
import { DomainError } from '../errors'
import { hashClientKey, seal, unseal } from './seal'

/** A request that its sender may repeat: what for, the sender's own key, and everything that was sent. */
export type RepeatableRequest = { scope: string, clientKey: string, payload: unknown }

const fingerprintOf = (payload: unknown) => createHash('sha256').update(JSON.stringify(payload)).digest()

/**
 * The first answer to a request that was sent before, or null when it is new.
 * @throws DomainError invalid when the key was used for something else
 */
export async function findFirstAnswer(db: Queryable, request: RepeatableRequest): Promise<string | null> {
  const [row] = await db.select({ fingerprint: idempotencyKeys.fingerprint, response: idempotencyKeys.response }).from(idempotencyKeys)
    .where(and(eq(idempotencyKeys.scope, request.scope), eq(idempotencyKeys.key, hashClientKey(request.clientKey))))
  if (!row) return null
  if (!row.fingerprint.equals(fingerprintOf(request.payload)))
    throw new DomainError('invalid', 'This was sent before with other values. Load the page again, then send it.')
  return row.response === null ? null : unseal(row.response, request.clientKey)
}

/**
 * Does the work of a repeatable request once, inside its transaction. The key is locked until the transaction ends, and
 * stored with the answer, so that a crash leaves either both or neither.
 * @throws DomainError conflict while another request with the same key is at work
 */
export async function answerOnce(tx: Transaction, request: RepeatableRequest, work: () => Promise<string>): Promise<string> {
  const key = hashClientKey(request.clientKey)
  const locked = await tx.execute<{ ok: boolean }>(sql`select pg_try_advisory_xact_lock(hashtextextended(${`${request.scope}:${key}`}, 0)) as ok`)
  if (!locked.rows[0]?.ok) throw new DomainError('conflict', 'This is being worked on already. Wait a moment; it is done once.', [], 1)
  const first = await findFirstAnswer(tx, request)
  if (first !== null) return first
  const answer = await work()
  await tx.insert(idempotencyKeys).values({ scope: request.scope, key, fingerprint: fingerprintOf(request.payload), response: seal(answer, request.clientKey) })
  return answer
}
