import { STEP_TOLERANCE, isContinuous, stepsOf } from '../steps'
import type { ExtensionSizeRequest, LoadPoint } from '../types'

/**
 * What a request fixes; NaN where the search chooses. A spring has three numbers beside its wire, mean diameter, body coils and
 * initial tension: the first load settles the tension, a rate or a free length one more.
 */
export interface ExtensionTravel {
  /** `one-load` leaves diameter and coils free; `rate-and-length` asks for no load. */
  readonly kind: 'rate' | 'free-length' | 'one-load' | 'rate-and-length'
  readonly points: readonly LoadPoint[]
  /** The first load, from which the initial tension is counted. */
  readonly lengthMm: number
  readonly forceN: number
  readonly greatestForceN: number
  readonly rateNPerMm: number
  readonly freeLengthMm: number
  /** By how much of themselves steps may move rate, loads and free length off those asked; nought where they are exact. */
  readonly rateTolerance: number
  readonly loadTolerance: number
  readonly lengthTolerance: number
}

// Between two loads close together the rate may be far off before either load is: never more than this, as for compression
// springs (common practice, no source).
const MOST_RATE_ERROR = 0.1

/**
 * What the request fixes. With coils and diameter in steps the asked loads are met within STEP_TOLERANCE, which between two
 * lets the rate be off by (F1 + F2)/(F2 - F1) of it; with one of the two in steps the other makes rate or free length exact.
 * Throws for a request that was not checked.
 */
export function resolveExtensionTravel(request: ExtensionSizeRequest): ExtensionTravel {
  const { points, rateNPerMm, freeLengthMm } = request
  const [first, second] = points
  if (!first && (rateNPerMm === undefined || freeLengthMm === undefined)) throw new Error('A size request for an extension spring needs a load, or a rate and a free length')
  const steps = stepsOf(request)
  const stepped = Number.isNaN(steps.coilStep) || Number.isNaN(steps.diameterStepMm) ? 0 : STEP_TOLERANCE
  const common = {
    points, lengthMm: first?.lengthMm ?? Number.NaN, forceN: first?.forceN ?? Number.NaN, greatestForceN: (second ?? first)?.forceN ?? Number.NaN,
    rateNPerMm: Number.NaN, freeLengthMm: Number.NaN, rateTolerance: 0, loadTolerance: 0, lengthTolerance: 0,
  }
  if (first && second) {
    const more = second.forceN - first.forceN
    const rateTolerance = Math.min((stepped * (first.forceN + second.forceN)) / more, MOST_RATE_ERROR)
    return {
      ...common, kind: 'rate', rateNPerMm: more / (second.lengthMm - first.lengthMm), rateTolerance,
      loadTolerance: (rateTolerance * more) / (first.forceN + second.forceN),
    }
  }
  if (!first) {
    // Two wishes and one number left: in any kind of step the free length gives way.
    const lengthTolerance = isContinuous(steps) ? 0 : STEP_TOLERANCE
    return { ...common, kind: 'rate-and-length', rateNPerMm: rateNPerMm ?? Number.NaN, freeLengthMm: freeLengthMm ?? Number.NaN, rateTolerance: stepped, lengthTolerance }
  }
  if (rateNPerMm !== undefined) return { ...common, kind: 'rate', rateNPerMm, rateTolerance: stepped }
  if (freeLengthMm !== undefined) return { ...common, kind: 'free-length', freeLengthMm, lengthTolerance: stepped }
  return { ...common, kind: 'one-load' }
}

/**
 * The first load for a rate that steps have moved off the asked one, N: between two the error is shared out evenly,
 * F1 (1 - e) and F2 (1 + e); one load is held exactly.
 */
export function firstForceN(travel: ExtensionTravel, rateNPerMm: number): number {
  const { points, forceN, greatestForceN } = travel
  if (points.length < 2) return forceN
  const error = ((rateNPerMm / travel.rateNPerMm - 1) * (greatestForceN - forceN)) / (forceN + greatestForceN)
  return forceN * (1 - error)
}

/** What steps may move off the asked values, in words; null where nothing can be off. */
export function steppedQuantity({ kind, points }: ExtensionTravel): string | null {
  switch (kind) {
    case 'rate': return points.length > 1 ? 'Forces' : 'The rate'
    case 'free-length': return 'The free length'
    case 'rate-and-length': return 'Rate and free length'
    case 'one-load': return null
  }
}
