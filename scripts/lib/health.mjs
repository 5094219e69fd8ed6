import { PlainError, readLogTail } from './say.mjs'

const TIMEOUT_MS = 60_000

/**
 * Waits until the address answers 200. Stops waiting as soon as the process behind it is gone.
 * @param {string} url
 * @param {import('./processes.mjs').ManagedProcess} behind
 */
export async function waitUntilHealthy(url, behind) {
  const deadline = Date.now() + TIMEOUT_MS
  let last = 'no answer yet'
  for (;;) {
    try {
      const response = await fetch(url, { signal: AbortSignal.timeout(5_000) })
      await response.arrayBuffer()
      if (response.status === 200) return
      last = `status ${response.status}`
    } catch (error) {
      last = error instanceof Error ? (error.cause instanceof Error ? error.cause.message : error.message) : String(error)
    }
    if (behind.hasExited()) throw new PlainError(`Starting ${behind.name} failed. The end of ${behind.logFile}:\n\n${await readLogTail(behind.logFile)}`)
    if (Date.now() > deadline) {
      throw new PlainError(`After ${TIMEOUT_MS / 1000} s ${url} does not answer 200 (${last}). The end of ${behind.logFile}:\n\n${await readLogTail(behind.logFile)}`)
    }
    await new Promise((resolve) => setTimeout(resolve, 100))
  }
}
