import { describeAll } from '../checks/check'
import { modulusAtTemperatureMpa } from '../temperature'
import { hasFatigueData } from '../fatigue-data'
import type { FatigueResult } from '../types'
import type { EvaluationContext } from '../wire-model'
import { describeTorsionAssumptions } from './assumptions'
import { bendingCorrectionFactor, bendingStressMpa, legCoils, momentAtStressNmm, momentRateNmmPerDeg } from './bending'
import { TORSION_CHECKS } from './checks'
import { correctedBendingMpa, torsionFatigueFactor, torsionLifeFractionFactor } from './fatigue'
import { buildTorsionModel, type TorsionModel } from './model'
import {
  angleOrZero, bodyLengthAtMm, comparedBendingMpa, createTorsionState, fillTorsionState, greatestMomentNmm, leastMomentNmm, meanDiameterAtMm,
  torsionMassG, torsionWireLengthMm, type TorsionState,
} from './state'
import { listTorsionTolerances } from './tolerances'
import type { TorsionEvaluation, TorsionInput, TorsionPointInput, TorsionPointResult } from './types'

const orNull = (value: number): number | null => (Number.isFinite(value) ? value : null)

// Rod over the wound-down inside diameter (widely used, from memory).
const ROD_SHARE = 0.9

/**
 * Every computed value and check of a torsion spring that is fully described. Lengths mm, angles degrees from free, moments
 * N mm, stresses MPa at 20 °C. Never throws for a finite input: what cannot be made shows as failed checks of severity stop.
 */
export function evaluateTorsion(input: TorsionInput, context: EvaluationContext = {}): TorsionEvaluation {
  const model = buildTorsionModel(input, input, context)
  const share = legCoils(model.legsLengthMm, input.meanDiameterMm)
  // The schema asks for one of the two; with neither the spring has no coils and its checks say so.
  const bodyCoils = input.bodyCoils ?? (input.activeCoils ?? 0) - share
  const activeCoils = input.activeCoils ?? bodyCoils + share
  const state = fillTorsionState(createTorsionState(Number.NaN, Number.NaN), model, input.meanDiameterMm, bodyCoils, activeCoils)
  const angles = (input.points ?? []).map(point => pointAngleDeg(point, state))
  placePoints(state, angles)
  return describeTorsion(model, state, angles)
}

const pointAngleDeg = (point: TorsionPointInput, state: TorsionState): number => ('angleDeg' in point ? point.angleDeg : point.momentNmm / state.rateNmmPerDeg)

function placePoints(state: TorsionState, angles: readonly number[]): void {
  if (angles.length === 0) return
  state.greatestAngleDeg = Math.max(...angles)
  state.leastAngleDeg = angles.length === 1 ? Number.NaN : Math.min(...angles)
  state.ordered = angles.every((angle, i) => i === 0 || angle >= (angles[i - 1] ?? angle))
}

/** The whole answer for a filled state; sizing shows its designs through it. */
export function describeTorsion(model: TorsionModel, state: TorsionState, angles: readonly number[]): TorsionEvaluation {
  const d = model.wireDiameterMm
  const D = state.meanDiameterMm
  const factor = bendingCorrectionFactor(model.method, state.springIndex)
  const points = angles.map(angleDeg => describePoint(model, state, factor, angleDeg))
  const mostNmm = momentAtStressNmm(model.allowableStressMpa / model.staticLimit.stressFactor(state.springIndex), d)
  return {
    kind: 'torsion',
    springIndex: state.springIndex,
    stressCorrectionFactor: factor,
    rateNmmPerDeg: state.rateNmmPerDeg,
    rateNmmPerTurn: 360 * state.rateNmmPerDeg,
    outerDiameterMm: D + d,
    innerDiameterMm: D - d,
    wireLengthMm: torsionWireLengthMm(model, state),
    massG: torsionMassG(model, state),
    tensileStrengthMpa: orNull(model.tensileStrengthMpa),
    allowableStressMpa: orNull(model.allowableStressMpa),
    points,
    checks: describeAll(TORSION_CHECKS, model, state),
    tolerances: listTorsionTolerances(model, state, points),
    assumptions: describeTorsionAssumptions(model, state),
    fatigue: angles.length >= 2 ? describeFatigue(model, state) : null,
    activeCoils: state.activeCoils,
    bodyCoils: state.bodyCoils,
    legCoils: state.activeCoils - state.bodyCoils,
    bodyLengthMm: bodyLengthAtMm(model, state, 0),
    legDeflectionDeg: orNull(state.greatestAngleDeg * (1 - state.bodyCoils / state.activeCoils)),
    greatestMomentNmm: orNull(mostNmm),
    greatestAngleDeg: orNull(mostNmm / state.rateNmmPerDeg),
    recommendedRodMm: ROD_SHARE * (Math.min(D, meanDiameterAtMm(model, state, angleOrZero(state))) - d),
    rateAtTemperatureNmmPerDeg: Number.isNaN(model.temperatureC)
      ? null
      : momentRateNmmPerDeg(
          model.method, modulusAtTemperatureMpa(model.youngsModulusMpa, model.material.modulusLossPerKelvin.value, model.temperatureC), d, D, state.activeCoils,
        ),
  }
}

function describePoint(model: TorsionModel, state: TorsionState, factor: number, angleDeg: number): TorsionPointResult {
  const momentNmm = state.rateNmmPerDeg * angleDeg
  const stressMpa = bendingStressMpa(momentNmm, model.wireDiameterMm)
  return {
    angleDeg,
    momentNmm,
    bendingStressMpa: stressMpa,
    correctedStressMpa: factor * stressMpa,
    utilisation: orNull(comparedBendingMpa(model, state, momentNmm) / model.allowableStressMpa),
    innerDiameterAtPointMm: meanDiameterAtMm(model, state, angleDeg) - model.wireDiameterMm,
    bodyLengthMm: bodyLengthAtMm(model, state, angleDeg),
  }
}

function describeFatigue(model: TorsionModel, state: TorsionState): FatigueResult | null {
  if (model.cycles <= 0 || Number.isNaN(model.tensileStrengthMpa) || !hasFatigueData(model)) return null
  const high = correctedBendingMpa(model, state, greatestMomentNmm(state))
  const low = correctedBendingMpa(model, state, leastMomentNmm(state))
  const amplitudeMpa = (high - low) / 2
  if (!(amplitudeMpa > 0)) return null
  const safetyFactor = torsionFatigueFactor(model, state)
  return {
    method: 'Goodman line in bending, Zimmerli\'s data over 0.577, not peened',
    meanStressMpa: (high + low) / 2,
    amplitudeMpa,
    allowableAmplitudeMpa: safetyFactor * amplitudeMpa,
    safetyFactor,
    life: model.cycles,
    lifeFractionSafetyFactor: torsionLifeFractionFactor(model, state),
  }
}
