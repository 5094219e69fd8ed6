import type { Check, CheckSeverity } from '../types'

/** One check of a spring. Sizing uses `stops`, evaluating uses `describe`; both read the same measure. */
export interface SpringCheck<Model, State> {
  readonly code: string
  /** False where the request gives nothing to check. */
  readonly applies: (model: Model, state: State) => boolean
  /** True where the spring must not be made. Numbers only: it runs in the search's inner loop. */
  readonly stops: (model: Model, state: State) => boolean
  readonly describe: (model: Model, state: State) => Check
}

/** True where no check of severity stop fails: the constraint of sizing. */
export function passesAll<Model, State>(checks: readonly SpringCheck<Model, State>[], model: Model, state: State): boolean {
  for (const check of checks) {
    if (check.applies(model, state) && check.stops(model, state)) return false
  }
  return true
}

/** Every check that applies, in words. */
export function describeAll<Model, State>(checks: readonly SpringCheck<Model, State>[], model: Model, state: State): Check[] {
  return checks.filter(check => check.applies(model, state)).map(check => check.describe(model, state))
}

// Springs found on a limit pass it: rounding in the last figures must not turn them away.
const SLACK = 1e-9

/** value > limit beyond rounding. */
export function exceeds(value: number, limit: number): boolean {
  return value > limit + SLACK * Math.abs(limit)
}

/** value < limit beyond rounding. */
export function fallsShort(value: number, limit: number): boolean {
  return value < limit - SLACK * Math.abs(limit)
}

/** The finished check: failed as a stop, failed as a caution, or passed. */
export function finishCheck(
  code: string,
  verdict: { readonly stop: boolean, readonly caution: boolean },
  value: number,
  limit: number,
  words: { readonly stop: string, readonly caution: string, readonly pass: string },
  gravest: CheckSeverity = 'stop',
): Check {
  const state = verdict.stop ? 'stop' : verdict.caution ? 'caution' : 'pass'
  return {
    code,
    ok: state === 'pass',
    severity: state === 'caution' && gravest === 'stop' ? 'caution' : gravest,
    value: Number.isFinite(value) ? value : null,
    limit: Number.isFinite(limit) ? limit : null,
    message: words[state],
  }
}
