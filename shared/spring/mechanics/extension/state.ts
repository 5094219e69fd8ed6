import { rateNPerMm } from '../rate'
import { shearStressMpa } from '../stress'
import { wireMassG } from '../wire-length'
import { bodyLengthMm, hookBendingMpaPerN, hookTorsionMpaPerN, hookWireMm } from './hooks'
import type { ExtensionModel } from './model'

/**
 * One extension spring of a model with the numbers all checks start from. The search fills the same object again and again,
 * so that its inner loop makes no garbage; nothing outside the calculation keeps one.
 */
export interface ExtensionState {
  meanDiameterMm: number
  bodyCoils: number
  activeCoils: number
  /** Inside the hooks, unloaded. */
  freeLengthMm: number
  hookLengthMm: number
  springIndex: number
  rateNPerMm: number
  initialTensionN: number
  bendRadiusMm: number
  sideBendRadiusMm: number
  /** Longest and shortest working lengths; NaN where there is no point. The shortest is NaN with one point: it is let go each stroke. */
  longestLengthMm: number
  shortestLengthMm: number
  /** False where the points are not in order of rising force. */
  ordered: boolean
}

/** An empty state to fill. */
export function createExtensionState(shortestLengthMm: number, longestLengthMm: number): ExtensionState {
  return {
    meanDiameterMm: 0, bodyCoils: 0, activeCoils: 0, freeLengthMm: 0, hookLengthMm: 0, springIndex: 0, rateNPerMm: 0, initialTensionN: 0,
    bendRadiusMm: 0, sideBendRadiusMm: 0, shortestLengthMm, longestLengthMm, ordered: true,
  }
}

/** Fills the state with a spring of the model and returns it. */
export function fillExtensionState(
  state: ExtensionState, model: ExtensionModel, meanDiameterMm: number, bodyCoils: number, activeCoils: number, freeLengthMm: number, initialTensionN: number,
): ExtensionState {
  const d = model.wireDiameterMm
  state.meanDiameterMm = meanDiameterMm
  state.bodyCoils = bodyCoils
  state.activeCoils = activeCoils
  state.freeLengthMm = freeLengthMm
  state.hookLengthMm = (freeLengthMm - bodyLengthMm(bodyCoils, d)) / 2
  state.springIndex = meanDiameterMm / d
  state.rateNPerMm = rateNPerMm({ shearModulusMpa: model.shearModulusMpa, wireDiameterMm: d, meanDiameterMm, activeCoils })
  state.initialTensionN = initialTensionN
  state.bendRadiusMm = Number.isNaN(model.bendRadiusMm) ? meanDiameterMm / 2 : model.bendRadiusMm
  state.sideBendRadiusMm = Number.isNaN(model.sideBendRadiusMm) ? (meanDiameterMm - d) / 2 : model.sideBendRadiusMm
  return state
}

/** Force at a length inside the hooks, N: F0 + R (L - L0). Shorter than free it is what the line says, and the order check stops it. */
export function extensionForceN(state: ExtensionState, lengthMm: number): number {
  return state.initialTensionN + state.rateNPerMm * (lengthMm - state.freeLengthMm)
}

/** Greatest working force, N; NaN without a point. */
export const greatestExtensionForceN = (state: ExtensionState): number => extensionForceN(state, state.longestLengthMm)

/** Least working force, N; nought where it is let go. */
export const leastExtensionForceN = (state: ExtensionState): number =>
  Number.isNaN(state.shortestLengthMm) ? 0 : extensionForceN(state, state.shortestLengthMm)

/** Stress of the body that the method compares with its static limit, MPa. */
export function bodyStressMpa(model: ExtensionModel, state: ExtensionState, forceN: number): number {
  return model.staticLimit.stressFactor(state.springIndex) * shearStressMpa(forceN, state.meanDiameterMm, model.wireDiameterMm)
}

/** Bending stress in the hooks, MPa. */
export const hookBendingMpa = (model: ExtensionModel, state: ExtensionState, forceN: number): number =>
  forceN * hookBendingMpaPerN(state.meanDiameterMm, model.wireDiameterMm, state.bendRadiusMm)

/** Torsion where the hooks leave the body, MPa. */
export const hookTorsionMpa = (model: ExtensionModel, state: ExtensionState, forceN: number): number =>
  forceN * hookTorsionMpaPerN(state.meanDiameterMm, model.wireDiameterMm, state.sideBendRadiusMm)

/** Uncorrected stress that the initial tension leaves in the body, MPa. */
export const initialStressMpa = (model: ExtensionModel, state: ExtensionState): number =>
  shearStressMpa(state.initialTensionN, state.meanDiameterMm, model.wireDiameterMm)

/** Length of wire, mm: pi D a coil (they lie closed) and the hooks. */
export function extensionWireLengthMm(model: ExtensionModel, state: ExtensionState): number {
  return Math.PI * state.meanDiameterMm * state.bodyCoils
    + 2 * hookWireMm(model.hookForm, state.meanDiameterMm, model.wireDiameterMm, state.hookLengthMm)
}

/** Mass of the spring, g. */
export const extensionMassG = (model: ExtensionModel, state: ExtensionState): number =>
  wireMassG(model.wireDiameterMm, extensionWireLengthMm(model, state), model.densityKgPerM3)
