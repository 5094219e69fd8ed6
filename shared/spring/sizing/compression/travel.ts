import { STEP_TOLERANCE } from '../steps'
import type { CompressionSizeRequest, LoadPoint } from '../types'

/** Rate and free length follow from the request. `anchor` says what stays exact when coils or diameter go in steps. */
export interface FixedTravel {
  readonly kind: 'fixed'
  readonly anchor: 'two-points' | 'one-point' | 'free-length'
  readonly rateNPerMm: number
  readonly freeLengthMm: number
  readonly points: readonly LoadPoint[]
}

/** One load at one length; the rate is for the search to choose. */
export interface FreeRateTravel {
  readonly kind: 'free-rate'
  readonly point: LoadPoint
  readonly points: readonly LoadPoint[]
}

export type Travel = FixedTravel | FreeRateTravel

/** Rate and free length a request implies, or the one point it leaves free. Throws for a request that was not checked. */
export function resolveTravel(request: CompressionSizeRequest): Travel {
  const { points, rateNPerMm, freeLengthMm } = request
  const [first, second] = points
  if (first && second) {
    const rate = (second.forceN - first.forceN) / (first.lengthMm - second.lengthMm)
    return { kind: 'fixed', anchor: 'two-points', rateNPerMm: rate, freeLengthMm: first.lengthMm + first.forceN / rate, points }
  }
  if (first && rateNPerMm !== undefined) {
    return { kind: 'fixed', anchor: 'one-point', rateNPerMm, freeLengthMm: first.lengthMm + first.forceN / rateNPerMm, points }
  }
  if (first && freeLengthMm !== undefined) {
    return { kind: 'fixed', anchor: 'free-length', rateNPerMm: first.forceN / (freeLengthMm - first.lengthMm), freeLengthMm, points }
  }
  if (first) return { kind: 'free-rate', point: first, points }
  if (rateNPerMm !== undefined && freeLengthMm !== undefined) {
    return { kind: 'fixed', anchor: 'free-length', rateNPerMm, freeLengthMm, points }
  }
  throw new Error('A size request needs points, or a rate and a free length')
}

/** Between two loads close together the rate may be far off before either load is: never more than this (common practice, no source). */
const MOST_RATE_ERROR = 0.1

/** By how much of itself the rate may be off for the asked loads to be met within STEP_TOLERANCE: (F1 + F2)/(F2 - F1) of it between two. */
export function rateTolerance(travel: FixedTravel): number {
  const [first, second] = travel.points
  const spread = travel.anchor === 'two-points' && first && second ? (first.forceN + second.forceN) / (second.forceN - first.forceN) : 1
  return Math.min(STEP_TOLERANCE * spread, MOST_RATE_ERROR)
}

/**
 * Free length for a rate that steps have moved off the asked one, mm. Between two points the error of the loads is shared out
 * evenly, F1 (1 - e) and F2 (1 + e); one point is held exactly; a free length is kept.
 */
export function freeLengthForRateMm(travel: FixedTravel, rateNPerMm: number): number {
  const [first, second] = travel.points
  if (travel.anchor === 'free-length' || !first) return travel.freeLengthMm
  if (travel.anchor === 'one-point' || !second) return first.lengthMm + first.forceN / rateNPerMm
  const error = ((rateNPerMm / travel.rateNPerMm - 1) * (second.forceN - first.forceN)) / (first.forceN + second.forceN)
  return first.lengthMm + (first.forceN * (1 - error)) / rateNPerMm
}

/** The same travel with another rate, and the free length that goes with it. */
export function withRate(travel: FixedTravel, rateNPerMm: number): FixedTravel {
  return { ...travel, rateNPerMm, freeLengthMm: freeLengthForRateMm(travel, rateNPerMm) }
}
