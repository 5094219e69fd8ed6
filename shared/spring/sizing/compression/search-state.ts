import type { CompressionCheck } from '../../mechanics/compression/checks/check'
import type { CompressionModel } from '../../mechanics/compression/model'
import { createState, type CompressionState } from '../../mechanics/compression/state'
import type { Travel } from './travel'

export const LEAST_ACTIVE_COILS = 2

/** State for a travel: its lengths placed, everything else to be filled. */
export function createSearchState(travel: Travel): CompressionState {
  const lengths = travel.points.map(point => point.lengthMm)
  const [first] = lengths
  const last = lengths[lengths.length - 1]
  return createState(last ?? Number.NaN, lengths.length > 1 && first !== undefined ? first : Number.NaN)
}

/** True where none of the checks stops this spring. */
export function allHold(checks: readonly CompressionCheck[], model: CompressionModel, state: CompressionState): boolean {
  for (const check of checks) {
    if (check.applies(model, state) && check.stops(model, state)) return false
  }
  return true
}
