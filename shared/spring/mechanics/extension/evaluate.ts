import { describeAll } from '../checks/check'
import { rateNPerMm } from '../rate'
import { forceAtStressN, shearStressMpa } from '../stress'
import { stressCorrectionFactor } from '../stress-factors'
import { modulusAtTemperatureMpa } from '../temperature'
import { hasFatigueData } from '../fatigue-data'
import type { FatigueResult, PointInput, PointResult } from '../types'
import type { EvaluationContext } from '../wire-model'
import { describeExtensionAssumptions } from './assumptions'
import { EXTENSION_CHECKS } from './checks'
import { extensionFatigueFactor, extensionLifeFractionFactor, PLACE_WORDS, stressAtPlaceMpa, weakestPlace } from './fatigue'
import { bodyLengthMm, hookBendingMpaPerN, hookLengthMm, hookTorsionMpaPerN } from './hooks'
import { greatestInitialStressMpa, leastInitialStressMpa } from './initial-tension'
import { buildExtensionModel, type ExtensionModel } from './model'
import {
  bodyStressMpa, createExtensionState, extensionForceN, extensionMassG, extensionWireLengthMm, fillExtensionState, greatestExtensionForceN,
  hookBendingMpa, hookTorsionMpa, initialStressMpa, leastExtensionForceN, type ExtensionState,
} from './state'
import { listExtensionTolerances } from './tolerances'
import type { ExtensionEvaluation, ExtensionInput } from './types'

const orNull = (value: number): number | null => (Number.isFinite(value) ? value : null)

/**
 * Every computed value and check of an extension spring that is fully described. Lengths mm, inside the hooks; forces N;
 * stresses MPa at 20 °C. Never throws for a finite input: what cannot be made shows as failed checks of severity stop.
 */
export function evaluateExtension(input: ExtensionInput, context: EvaluationContext = {}): ExtensionEvaluation {
  const model = buildExtensionModel(input, input, context)
  const { bodyCoils, activeCoils } = coilsOf(input, model)
  const freeLengthMm = input.insideHooksFreeLengthMm
    ?? bodyLengthMm(bodyCoils, model.wireDiameterMm) + 2 * hookLengthMm(model.hookForm, input.meanDiameterMm, model.wireDiameterMm)
  const state = fillExtensionState(
    createExtensionState(Number.NaN, Number.NaN), model, input.meanDiameterMm, bodyCoils, activeCoils, freeLengthMm, input.initialTensionN,
  )
  const lengths = (input.points ?? []).map(point => pointLengthMm(point, state))
  placePoints(state, lengths)
  return describeExtension(model, state, lengths)
}

// The schema asks for one of the two; with neither the spring has no coils and its checks say so.
function coilsOf({ bodyCoils, activeCoils }: ExtensionInput, model: ExtensionModel): { readonly bodyCoils: number, readonly activeCoils: number } {
  const body = bodyCoils ?? (activeCoils ?? 0) - model.hookCoils
  return { bodyCoils: body, activeCoils: activeCoils ?? body + model.hookCoils }
}

function pointLengthMm(point: PointInput, state: ExtensionState): number {
  if ('lengthMm' in point) return point.lengthMm
  if ('deflectionMm' in point) return state.freeLengthMm + point.deflectionMm
  return state.freeLengthMm + (point.forceN - state.initialTensionN) / state.rateNPerMm
}

function placePoints(state: ExtensionState, lengths: readonly number[]): void {
  if (lengths.length === 0) return
  state.longestLengthMm = Math.max(...lengths)
  state.shortestLengthMm = lengths.length === 1 ? Number.NaN : Math.min(...lengths)
  state.ordered = lengths.every((length, i) => i === 0 || length >= (lengths[i - 1] ?? length))
}

/** The whole answer for a filled state; sizing shows its designs through it. */
export function describeExtension(model: ExtensionModel, state: ExtensionState, lengths: readonly number[]): ExtensionEvaluation {
  const d = model.wireDiameterMm
  const D = state.meanDiameterMm
  const factor = stressCorrectionFactor(model.method, state.springIndex)
  const greatestWorkingN = lengths.length > 0 ? greatestExtensionForceN(state) : Number.NaN
  const greatestForceN = greatestAllowedForceN(model, state)
  return {
    kind: 'extension',
    springIndex: state.springIndex,
    stressCorrectionFactor: factor,
    rateNPerMm: state.rateNPerMm,
    outerDiameterMm: D + d,
    innerDiameterMm: D - d,
    wireLengthMm: extensionWireLengthMm(model, state),
    massG: extensionMassG(model, state),
    tensileStrengthMpa: orNull(model.tensileStrengthMpa),
    allowableStressMpa: orNull(model.allowableStressMpa),
    points: lengths.map(lengthMm => describePoint(model, state, factor, lengthMm)),
    checks: describeAll(EXTENSION_CHECKS, model, state),
    tolerances: listExtensionTolerances(model, state),
    assumptions: describeExtensionAssumptions(model, state),
    fatigue: lengths.length >= 2 ? describeFatigue(model, state) : null,
    activeCoils: state.activeCoils,
    bodyCoils: state.bodyCoils,
    coilsEquivalent: state.activeCoils - state.bodyCoils,
    bodyLengthMm: bodyLengthMm(state.bodyCoils, d),
    insideHooksFreeLengthMm: state.freeLengthMm,
    hookLengthMm: state.hookLengthMm,
    hookBendRadiusMm: state.bendRadiusMm,
    hookSideBendRadiusMm: state.sideBendRadiusMm,
    initialTensionN: state.initialTensionN,
    initialStressMpa: initialStressMpa(model, state),
    initialStressRangeMpa: [leastInitialStressMpa(state.springIndex), greatestInitialStressMpa(state.springIndex)],
    hookBendingStressMpa: orNull(hookBendingMpa(model, state, greatestWorkingN)),
    hookTorsionStressMpa: orNull(hookTorsionMpa(model, state, greatestWorkingN)),
    hookBendingLimitMpa: orNull(model.hookBendingLimitMpa),
    hookTorsionLimitMpa: orNull(model.hookTorsionLimitMpa),
    greatestForceN: orNull(greatestForceN),
    greatestLengthMm: orNull(state.freeLengthMm + (greatestForceN - state.initialTensionN) / state.rateNPerMm),
    rateAtTemperatureNPerMm: Number.isNaN(model.temperatureC)
      ? null
      : rateNPerMm({
          shearModulusMpa: modulusAtTemperatureMpa(model.shearModulusMpa, model.material.modulusLossPerKelvin.value, model.temperatureC),
          wireDiameterMm: d, meanDiameterMm: D, activeCoils: state.activeCoils,
        }),
  }
}

/** The load at which body, hook bending or hook torsion first reaches its limit, N; NaN without a strength. */
function greatestAllowedForceN(model: ExtensionModel, state: ExtensionState): number {
  const d = model.wireDiameterMm
  const D = state.meanDiameterMm
  return Math.min(
    forceAtStressN(model.allowableStressMpa / model.staticLimit.stressFactor(state.springIndex), D, d),
    model.hookBendingLimitMpa / hookBendingMpaPerN(D, d, state.bendRadiusMm),
    model.hookTorsionLimitMpa / hookTorsionMpaPerN(D, d, state.sideBendRadiusMm),
  )
}

function describePoint(model: ExtensionModel, state: ExtensionState, factor: number, lengthMm: number): PointResult {
  const forceN = extensionForceN(state, lengthMm)
  const stressMpa = shearStressMpa(forceN, state.meanDiameterMm, model.wireDiameterMm)
  return {
    lengthMm,
    deflectionMm: lengthMm - state.freeLengthMm,
    forceN,
    stressMpa,
    correctedStressMpa: factor * stressMpa,
    utilisation: orNull(bodyStressMpa(model, state, forceN) / model.allowableStressMpa),
  }
}

function describeFatigue(model: ExtensionModel, state: ExtensionState): FatigueResult | null {
  if (model.cycles <= 0 || Number.isNaN(model.tensileStrengthMpa) || !hasFatigueData(model)) return null
  const place = weakestPlace(model, state)
  const high = stressAtPlaceMpa(place, model, state, greatestExtensionForceN(state))
  const low = stressAtPlaceMpa(place, model, state, leastExtensionForceN(state))
  const amplitudeMpa = (high - low) / 2
  // Hooks that cannot be bent have no stress to speak of, and a spring shorter than free none at all: their own checks stop them.
  if (!(amplitudeMpa > 0) || low < 0 || !Number.isFinite(high) || !Number.isFinite(low)) return null
  const safetyFactor = extensionFatigueFactor(model, state)
  return {
    method: `Goodman line through Zimmerli's data, not peened, least in ${PLACE_WORDS[place]}`,
    meanStressMpa: (high + low) / 2,
    amplitudeMpa,
    allowableAmplitudeMpa: safetyFactor * amplitudeMpa,
    safetyFactor,
    life: model.cycles,
    lifeFractionSafetyFactor: extensionLifeFractionFactor(model, state),
  }
}
