import { exceeds, finishCheck } from '../../checks/check'
import { figure } from '../../figure'
import { greatestStrokeSpeedMPerS, impactStressMpa } from '../impact'
import type { CompressionModel } from '../model'
import { comparedStressMpa, greatestForceN, type CompressionState } from '../state'
import type { CompressionCheck } from './check'

/** Greatest speed of the moving end as it works, m/s: between its two lengths, or from free; NaN without a point or strokes. */
export function stateSpeedMPerS(model: CompressionModel, state: CompressionState): number {
  if (!(model.strokesPerMinute > 0)) return Number.NaN
  const from = Number.isNaN(state.longestLengthMm) ? state.freeLengthMm : state.longestLengthMm
  return greatestStrokeSpeedMPerS(from - state.shortestLengthMm, model.strokesPerMinute)
}

/** Stress of the wave at that speed, MPa. */
export const stateImpactStressMpa = (model: CompressionModel, state: CompressionState): number =>
  impactStressMpa(stateSpeedMPerS(model, state), model.shearModulusMpa, model.densityKgPerM3)

/** The stress of quick strokes on top of the greatest working stress, as if both came together. */
export const impactCheck: CompressionCheck = {
  code: 'impact',
  applies: (model, state) => model.strokesPerMinute > 0 && stateSpeedMPerS(model, state) >= 0 && !Number.isNaN(model.allowableStressMpa),
  stops: () => false,
  describe: (model, state) => {
    const wave = stateImpactStressMpa(model, state)
    const stress = comparedStressMpa(model, state, greatestForceN(state)) + model.staticLimit.stressFactor(state.springIndex) * wave
    const limit = model.allowableStressMpa
    const says = `Moved to and fro evenly its end reaches ${figure(stateSpeedMPerS(model, state))} m/s, and the wave in the wire adds ${figure(wave)} MPa (EN 13906-1): ${figure(stress)} MPa at the greatest load, limit ${figure(limit)} MPa`
    return finishCheck('impact', { stop: false, caution: exceeds(stress, limit) }, stress, limit, {
      stop: '', caution: `${says}. Move it more slowly, or stress it less.`, pass: `${says}.`,
    }, 'caution')
  },
}
