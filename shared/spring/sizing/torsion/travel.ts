import type { TorsionState } from '../../mechanics/torsion/state'
import { STEP_TOLERANCE } from '../steps'
import type { MomentPoint, TorsionSizeRequest } from '../types'

/** The rate that a request fixes, and where its points lie from free. */
export interface TorsionTravel {
  /** What stays exact when steps move the rate: the turn between two points, the moment of one, or its angle from free. */
  readonly anchor: 'turn' | 'moment' | 'angle'
  readonly rateNmmPerDeg: number
  readonly points: readonly MomentPoint[]
  /** By how much of itself steps may move the rate off the asked one. */
  readonly rateTolerance: number
}

// Between two moments close together the rate may be far off before either moment is: never more than this, as for
// compression springs (common practice, no source).
const MOST_RATE_ERROR = 0.1

/** The rate that a request fixes. Throws for a request that was not checked. */
export function resolveTorsionTravel({ points, rateNmmPerDeg }: TorsionSizeRequest): TorsionTravel {
  const [first, second] = points
  if (!first) throw new Error('A size request for a torsion spring needs a moment')
  if (!second) {
    return rateNmmPerDeg === undefined
      ? { anchor: 'angle', rateNmmPerDeg: first.momentNmm / first.angleDeg, points, rateTolerance: STEP_TOLERANCE }
      : { anchor: 'moment', rateNmmPerDeg, points, rateTolerance: STEP_TOLERANCE }
  }
  const more = second.momentNmm - first.momentNmm
  return {
    anchor: 'turn',
    rateNmmPerDeg: more / (second.angleDeg - first.angleDeg),
    points,
    rateTolerance: Math.min(STEP_TOLERANCE * ((first.momentNmm + second.momentNmm) / more), MOST_RATE_ERROR),
  }
}

/**
 * Puts the points of the request, as angles from free, into a state whose rate steps may have moved off the asked one. Between
 * two points the error of the moments is shared out evenly, M1 (1 - e) and M2 (1 + e).
 */
export function placeTravel({ anchor, rateNmmPerDeg, points }: TorsionTravel, state: TorsionState): void {
  const rate = state.rateNmmPerDeg
  const [first, second] = points
  if (!first) return
  if (anchor === 'turn' && second) {
    const error = ((rate / rateNmmPerDeg - 1) * (second.momentNmm - first.momentNmm)) / (first.momentNmm + second.momentNmm)
    state.leastAngleDeg = (first.momentNmm * (1 - error)) / rate
    state.greatestAngleDeg = state.leastAngleDeg + (second.angleDeg - first.angleDeg)
    return
  }
  state.leastAngleDeg = Number.NaN
  state.greatestAngleDeg = anchor === 'angle' ? first.angleDeg : first.momentNmm / rate
}

/** Angles of a placed state from free, in the order of the points. */
export function placedAngles({ leastAngleDeg, greatestAngleDeg }: TorsionState): readonly number[] {
  return Number.isNaN(leastAngleDeg) ? [greatestAngleDeg] : [leastAngleDeg, greatestAngleDeg]
}
