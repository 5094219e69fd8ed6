import { bucklingDeflection } from '../buckling'
import { figure } from '../../figure'
import type { CompressionModel } from '../model'
import { naturalFrequencyHz, SURGE_RATIO } from '../natural-frequency'
import type { CompressionState } from '../state'
import { exceeds, finishCheck } from '../../checks/check'
import type { CompressionCheck } from './check'

/** Deflection at which it would buckle, mm; Infinity where it cannot. */
export function stateBucklingDeflectionMm(model: CompressionModel, state: CompressionState): number {
  return bucklingDeflection(state.freeLengthMm, state.meanDiameterMm, model.seating, model.moduli)
}

/** Greatest working deflection, or down to the shortest permitted length where no point is given, mm. */
export function greatestDeflectionMm(state: CompressionState): number {
  const shortest = Number.isNaN(state.shortestLengthMm)
    ? Math.min(state.solidLengthMm + state.minimumClearanceMm, state.freeLengthMm)
    : state.shortestLengthMm
  return state.freeLengthMm - shortest
}

/** True where it would buckle within its travel, guided or not. */
export function buckles(model: CompressionModel, state: CompressionState): boolean {
  return exceeds(greatestDeflectionMm(state), stateBucklingDeflectionMm(model, state))
}

export const bucklingCheck: CompressionCheck = {
  code: 'buckling',
  applies: () => true,
  stops: (model, state) => !model.guided && !Number.isNaN(state.shortestLengthMm) && buckles(model, state),
  describe: (model, state) => {
    const critical = stateBucklingDeflectionMm(model, state)
    const travel = greatestDeflectionMm(state)
    const fails = buckles(model, state)
    const where = Number.isFinite(critical) ? `It would buckle from ${figure(critical)} mm of deflection` : 'It cannot buckle'
    const basis = `(EN 13906-1, seating coefficient ${model.seating})`
    const remedy = model.guided ? 'the bore, rod or guide must keep it straight' : 'it needs a bore, a rod or another guide'
    return finishCheck(
      'buckling',
      { stop: bucklingCheck.stops(model, state), caution: fails },
      travel,
      critical,
      {
        stop: `${where} ${basis} and works to ${figure(travel)} mm: ${remedy}.`,
        caution: `${where} ${basis} and can be pressed to ${figure(travel)} mm: ${remedy}.`,
        pass: Number.isFinite(critical) ? `${where} ${basis}, beyond its ${figure(travel)} mm of travel.` : `${where} ${basis}.`,
      },
    )
  },
}

/** First natural frequency of the spring, Hz. */
export function stateNaturalFrequencyHz(model: CompressionModel, state: CompressionState): number {
  return naturalFrequencyHz({
    wireDiameterMm: model.wireDiameterMm,
    meanDiameterMm: state.meanDiameterMm,
    activeCoils: state.activeCoils,
    shearModulusMpa: model.shearModulusMpa,
    densityKgPerM3: model.densityKgPerM3,
  })
}

export const resonanceCheck: CompressionCheck = {
  code: 'resonance',
  applies: model => model.strokesPerMinute > 0,
  stops: () => false,
  describe: (model, state) => {
    const natural = stateNaturalFrequencyHz(model, state)
    const least = (SURGE_RATIO * model.strokesPerMinute) / 60
    const says = `Natural frequency ${figure(natural)} Hz; ${SURGE_RATIO} times the working frequency is ${figure(least)} Hz`
    return finishCheck(
      'resonance',
      { stop: false, caution: natural < least },
      natural,
      least,
      { stop: '', caution: `${says}: surge may raise the stress (Shigley).`, pass: `${says} (Shigley).` },
      'caution',
    )
  },
}
