import { totalCoilsFor } from '../../mechanics/compression/end-geometry'
import type { CompressionCheck } from '../../mechanics/compression/checks/check'
import type { CompressionModel } from '../../mechanics/compression/model'
import { createState, type CompressionState } from '../../mechanics/compression/state'
import type { Travel } from './travel'

/** A spring of one wire, before it is evaluated. */
export interface WireSpring {
  readonly meanDiameterMm: number
  readonly activeCoils: number
  readonly totalCoils: number
  readonly freeLengthMm: number
}

/** Which springs of a wire are wanted: the lightest, the least stressed, or a spread of them for another objective. */
export type WireGoal = 'mass' | 'stress' | 'spread'

/** Steps of what can be made; NaN where continuous. */
export interface Steps {
  readonly coilStep: number
  readonly diameterStepMm: number
}

/** Index range of the quality table: the bounds every search starts from. */
export const LEAST_INDEX = 4
export const MOST_INDEX = 20
export const LEAST_ACTIVE_COILS = 2

/** State for a travel: its lengths placed, everything else to be filled. */
export function createSearchState(travel: Travel): CompressionState {
  const lengths = travel.points.map(point => point.lengthMm)
  const [first] = lengths
  const last = lengths[lengths.length - 1]
  return createState(last ?? Number.NaN, lengths.length > 1 && first !== undefined ? first : Number.NaN)
}

/** Total coils for active coils of the model's ends. */
export function totalCoils(model: CompressionModel, activeCoils: number): number {
  return totalCoilsFor(model.ends, activeCoils)
}

/** True where a check does not stop this spring. */
export function holds(check: CompressionCheck, model: CompressionModel, state: CompressionState): boolean {
  return !check.applies(model, state) || !check.stops(model, state)
}

/** True where none of the checks stops this spring. */
export function allHold(checks: readonly CompressionCheck[], model: CompressionModel, state: CompressionState): boolean {
  for (const check of checks) {
    if (!holds(check, model, state)) return false
  }
  return true
}

/** A multiple of a step without the dust of binary fractions. */
export function stepped(index: number, step: number): number {
  return Math.round(index * step * 1e6) / 1e6
}
