import { createHash } from 'node:crypto'
import { FakeApiError, invalidRequest } from './errors'
import type { Fake } from './fake'
import type { StoredAnswer } from './state'

const MAX_KEY_LENGTH = 255
const KEPT_S = 24 * 60 * 60

/** Keys whose first request is being carried out at this moment, per running fake. */
const running = new WeakMap<Fake, Set<string>>()

/** What makes two requests the same: method, path and parameters. */
export function fingerprintOf(method: string, path: string, canonicalParams: string): string {
  return createHash('sha256').update(`${method} ${path}\n${canonicalParams}`).digest('hex')
}

function forgetOld(fake: Fake): void {
  const oldestS = fake.clock.nowS() - KEPT_S
  for (const [key, answer] of Object.entries(fake.state.answers)) {
    if (answer.storedAtS < oldestS) delete fake.state.answers[key]
  }
}

/**
 * Begins a request under a key. Answers the stored answer when the key was used for the same request; refuses with 400
 * when the parameters differ and with 409 while its twin is running (FK-5).
 */
export function beginIdempotent(fake: Fake, key: string, fingerprint: string): StoredAnswer | null {
  if (key.length > MAX_KEY_LENGTH) throw invalidRequest(`Idempotency keys can be up to ${MAX_KEY_LENGTH} characters.`)
  forgetOld(fake)
  const stored = fake.state.answers[key]
  if (stored && stored.fingerprint !== fingerprint) {
    throw new FakeApiError(400, {
      type: 'idempotency_error',
      message: `Keys for idempotent requests can only be used with the same parameters they were first used with. Use another key than '${key}' for a different request.`,
    })
  }
  if (stored) return stored
  const keys = running.get(fake) ?? new Set<string>()
  running.set(fake, keys)
  if (keys.has(key)) {
    throw new FakeApiError(409, {
      type: 'invalid_request_error',
      code: 'idempotency_key_in_use',
      message: 'Another request with this idempotency key is still being carried out.',
    })
  }
  keys.add(key)
  return null
}

/** Ends a request under a key; an answer given here is replayed from now on. */
export function endIdempotent(fake: Fake, key: string, answer: Omit<StoredAnswer, 'storedAtS'> | null): void {
  running.get(fake)?.delete(key)
  if (answer) fake.state.answers[key] = { ...answer, storedAtS: fake.clock.nowS() }
}
