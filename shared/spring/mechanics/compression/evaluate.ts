import { describeAssumptions } from './assumptions'
import { describeChecks } from './checks'
import { buckles, stateBucklingDeflectionMm, stateNaturalFrequencyHz } from './checks/stability'
import {
  greatestCorrectedStressMpa, leastCorrectedStressMpa, stateFatigueFactor, stateLifeFractionFactor,
} from './checks/life'
import { stateImpactStressMpa, stateSpeedMPerS } from './checks/impact'
import { listTolerances } from './tolerances'
import { totalCoilsFor } from './end-geometry'
import type { EvaluationContext } from '../wire-model'
import { buildCompressionModel, type CompressionModel } from './model'
import { rateNPerMm } from '../rate'
import {
  comparedStressMpa, createState, fillState, outerDiameterAtSolidMm, stateMassG, statePitchMm, stateWireLengthMm,
  type CompressionState,
} from './state'
import { shearStressMpa } from '../stress'
import { stressCorrectionFactor } from '../stress-factors'
import { modulusAtTemperatureMpa } from '../temperature'
import { hasFatigueData } from '../fatigue-data'
import type { FatigueResult, PointInput, PointResult } from '../types'
import type { CompressionEvaluation, CompressionInput } from './types'

const orNull = (value: number): number | null => (Number.isFinite(value) ? value : null)

/**
 * Every computed value and check of a compression spring that is fully described. Lengths mm, forces N, stresses MPa at
 * 20 °C. Never throws for a finite input: what cannot be made shows as failed checks of severity stop.
 */
export function evaluateCompression(input: CompressionInput, context: EvaluationContext = {}): CompressionEvaluation {
  const model = buildCompressionModel(input, input, context)
  const totalCoils = input.totalCoils ?? totalCoilsFor(model.ends, input.activeCoils)
  const state = fillState(createState(Number.NaN, Number.NaN), model, input.meanDiameterMm, input.activeCoils, totalCoils, input.freeLengthMm)
  const lengths = (input.points ?? []).map(point => pointLengthMm(point, state))
  placePoints(state, lengths)
  return describeSpring(model, state, lengths)
}

/** The whole answer for a filled state; sizing shows its designs through it. */
export function describeSpring(model: CompressionModel, state: CompressionState, lengths: readonly number[]): CompressionEvaluation {
  const factor = stressCorrectionFactor(model.method, state.springIndex)
  const points = lengths.map(lengthMm => describePoint(model, state, factor, lengthMm))
  const solidStress = shearStressMpa(state.solidForceN, state.meanDiameterMm, model.wireDiameterMm)
  return {
    kind: 'compression',
    springIndex: state.springIndex,
    stressCorrectionFactor: factor,
    rateNPerMm: state.rateNPerMm,
    outerDiameterMm: state.meanDiameterMm + model.wireDiameterMm,
    innerDiameterMm: state.meanDiameterMm - model.wireDiameterMm,
    totalCoils: state.totalCoils,
    wireLengthMm: stateWireLengthMm(model, state),
    massG: stateMassG(model, state),
    tensileStrengthMpa: orNull(model.tensileStrengthMpa),
    allowableStressMpa: orNull(model.allowableStressMpa),
    points,
    checks: describeChecks(model, state),
    tolerances: listTolerances(model, state, points),
    assumptions: describeAssumptions(model, state),
    solidLengthMm: state.solidLengthMm,
    solid: { forceN: state.solidForceN, stressMpa: solidStress, correctedStressMpa: factor * solidStress },
    minimumClearanceMm: state.minimumClearanceMm,
    shortestLengthMm: state.solidLengthMm + state.minimumClearanceMm,
    outerDiameterAtSolidMm: outerDiameterAtSolidMm(model, state),
    pitchMm: statePitchMm(model, state),
    naturalFrequencyHz: stateNaturalFrequencyHz(model, state),
    impact: describeImpact(model, state),
    buckling: {
      slenderness: state.freeLengthMm / state.meanDiameterMm,
      criticalDeflectionMm: orNull(stateBucklingDeflectionMm(model, state)),
      ok: !buckles(model, state),
    },
    fatigue: lengths.length >= 2 ? describeFatigue(model, state) : null,
    rateAtTemperatureNPerMm: Number.isNaN(model.temperatureC)
      ? null
      : rateNPerMm({
          shearModulusMpa: modulusAtTemperatureMpa(model.shearModulusMpa, model.material.modulusLossPerKelvin.value, model.temperatureC),
          wireDiameterMm: model.wireDiameterMm,
          meanDiameterMm: state.meanDiameterMm,
          activeCoils: state.activeCoils,
        }),
  }
}

function pointLengthMm(point: PointInput, state: CompressionState): number {
  if ('lengthMm' in point) return point.lengthMm
  if ('forceN' in point) return state.freeLengthMm - point.forceN / state.rateNPerMm
  return state.freeLengthMm - point.deflectionMm
}

function placePoints(state: CompressionState, lengths: readonly number[]): void {
  if (lengths.length === 0) return
  state.shortestLengthMm = Math.min(...lengths)
  state.longestLengthMm = lengths.length === 1 ? Number.NaN : Math.max(...lengths)
  state.ordered = lengths.every((length, i) => i === 0 || length <= (lengths[i - 1] ?? length))
}

function describePoint(model: CompressionModel, state: CompressionState, factor: number, lengthMm: number): PointResult {
  const deflectionMm = state.freeLengthMm - lengthMm
  const forceN = state.rateNPerMm * deflectionMm
  const stressMpa = shearStressMpa(forceN, state.meanDiameterMm, model.wireDiameterMm)
  return {
    lengthMm,
    deflectionMm,
    forceN,
    stressMpa,
    correctedStressMpa: factor * stressMpa,
    utilisation: orNull(comparedStressMpa(model, state, forceN) / model.allowableStressMpa),
  }
}

function describeImpact(model: CompressionModel, state: CompressionState): CompressionEvaluation['impact'] {
  const speedMPerS = stateSpeedMPerS(model, state)
  return speedMPerS >= 0 ? { speedMPerS, stressMpa: stateImpactStressMpa(model, state) } : null
}

function describeFatigue(model: CompressionModel, state: CompressionState): FatigueResult | null {
  if (model.cycles <= 0 || Number.isNaN(model.tensileStrengthMpa) || !hasFatigueData(model)) return null
  const high = greatestCorrectedStressMpa(model, state)
  const low = leastCorrectedStressMpa(model, state)
  const amplitudeMpa = (high - low) / 2
  // Drawn out beyond its free length it is no compression spring: the check of order stops it.
  if (!(amplitudeMpa > 0) || low < 0) return null
  const safetyFactor = stateFatigueFactor(model, state)
  return {
    method: `Goodman line through Zimmerli's data, ${model.shotPeened ? 'shot peened' : 'not peened'}`,
    meanStressMpa: (high + low) / 2,
    amplitudeMpa,
    allowableAmplitudeMpa: safetyFactor * amplitudeMpa,
    safetyFactor,
    life: model.cycles,
    lifeFractionSafetyFactor: stateLifeFractionFactor(model, state),
  }
}
