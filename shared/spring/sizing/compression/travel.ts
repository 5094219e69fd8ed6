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

/**
 * Free length for a rate that steps have moved off the asked one, and the relative error of the asked forces that comes
 * with it. Between two points the error is shared out evenly; one point is held exactly.
 */
export function freeLengthForRate(travel: FixedTravel, rateNPerMm: number): { readonly freeLengthMm: number, readonly error: number } {
  const ratio = rateNPerMm / travel.rateNPerMm - 1
  const [first, second] = travel.points
  if (travel.anchor === 'two-points' && first && second) {
    const error = (ratio * (second.forceN - first.forceN)) / (first.forceN + second.forceN)
    return { freeLengthMm: first.lengthMm + (first.forceN * (1 - error)) / rateNPerMm, error: Math.abs(error) }
  }
  if (travel.anchor === 'one-point' && first) {
    return { freeLengthMm: first.lengthMm + first.forceN / rateNPerMm, error: Math.abs(ratio) }
  }
  return { freeLengthMm: travel.freeLengthMm, error: Math.abs(ratio) }
}

/**
 * The stiffest rate and the shortest free length that steps may leave within their tolerance, as if they came together: no
 * stepped spring is lighter than one of these. Between two loads the rate may be off by (F1 + F2)/(F2 - F1) of it.
 */
export function lightestSteppedTravel(travel: FixedTravel): FixedTravel {
  const [first, second] = travel.points
  const spread = travel.anchor === 'two-points' && first && second ? (first.forceN + second.forceN) / (second.forceN - first.forceN) : 1
  const rateNPerMm = travel.rateNPerMm * (1 + STEP_TOLERANCE * spread)
  if (travel.anchor === 'free-length' || !first) return { ...travel, rateNPerMm }
  return { ...travel, rateNPerMm, freeLengthMm: first.lengthMm + ((1 - STEP_TOLERANCE) * first.forceN) / rateNPerMm }
}
