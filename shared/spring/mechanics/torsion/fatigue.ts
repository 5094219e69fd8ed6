import { bendingGoodmanFactor } from '../bending-fatigue'
import { bendingCorrectionFactor, bendingStressMpa } from './bending'
import type { TorsionModel } from './model'
import { greatestMomentNmm, leastMomentNmm, type TorsionState } from './state'

/** Corrected bending stress at a moment, MPa. */
export const correctedBendingMpa = (model: TorsionModel, state: TorsionState, momentNmm: number): number =>
  bendingCorrectionFactor(model.method, state.springIndex) * bendingStressMpa(momentNmm, model.wireDiameterMm)

/** Goodman safety factor in bending between the working moments. */
export function torsionFatigueFactor(model: TorsionModel, state: TorsionState): number {
  const high = correctedBendingMpa(model, state, greatestMomentNmm(state))
  const low = correctedBendingMpa(model, state, leastMomentNmm(state))
  return bendingGoodmanFactor((high - low) / 2, (high + low) / 2, model.tensileStrengthMpa)
}

// Greatest bending stress from zero over tensile strength, music wire A228 (handbook values, from memory).
const AT_1E5 = { unpeened: 0.53, peened: 0.62 } as const
const AT_1E6 = { unpeened: 0.5, peened: 0.6 } as const

/**
 * Factor of the published fractions, stress from zero to the greatest moment; null outside 1e5 to 1e6 strokes, and for
 * other than cold-drawn carbon wire, where none are published. A least moment above nought is not counted, which is safe.
 */
export function torsionLifeFractionFactor(model: TorsionModel, state: TorsionState): number | null {
  if (model.cycles < 1e5 || model.cycles > 1e6 || model.material.family !== 'cold-drawn-carbon') return null
  const way = model.shotPeened ? 'peened' : 'unpeened'
  const fraction = AT_1E5[way] + (AT_1E6[way] - AT_1E5[way]) * (Math.log10(model.cycles) - 5)
  return (fraction * model.tensileStrengthMpa) / correctedBendingMpa(model, state, greatestMomentNmm(state))
}
