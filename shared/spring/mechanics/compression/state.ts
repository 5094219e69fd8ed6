import { minimumClearanceMm } from './clearance'
import { growthAtSolidMm, growthPitchMm } from './diameter-growth'
import { pitchMm, solidLengthMm } from './end-geometry'
import type { CompressionModel } from './model'
import { rateNPerMm } from '../rate'
import { shearStressMpa } from '../stress'
import { wireLengthMm, wireMassG } from '../wire-length'

/**
 * One spring of a model with the numbers all checks start from. The search fills the same object again and again, so that
 * its inner loop makes no garbage; nothing outside the calculation keeps one.
 */
export interface CompressionState {
  meanDiameterMm: number
  activeCoils: number
  totalCoils: number
  freeLengthMm: number
  springIndex: number
  rateNPerMm: number
  solidLengthMm: number
  minimumClearanceMm: number
  solidForceN: number
  /** Shortest and longest working lengths; NaN where there is no point. The longest is NaN with one point: it works from free. */
  shortestLengthMm: number
  longestLengthMm: number
  /** False where the points are not in order of rising force. */
  ordered: boolean
}

/** An empty state to fill. */
export function createState(shortestLengthMm: number, longestLengthMm: number): CompressionState {
  return {
    meanDiameterMm: 0,
    activeCoils: 0,
    totalCoils: 0,
    freeLengthMm: 0,
    springIndex: 0,
    rateNPerMm: 0,
    solidLengthMm: 0,
    minimumClearanceMm: 0,
    solidForceN: 0,
    shortestLengthMm,
    longestLengthMm,
    ordered: true,
  }
}

/** Fills the state with a spring of the model and returns it. */
export function fillState(
  state: CompressionState, model: CompressionModel, meanDiameterMm: number, activeCoils: number, totalCoils: number, freeLengthMm: number,
): CompressionState {
  state.meanDiameterMm = meanDiameterMm
  state.activeCoils = activeCoils
  state.totalCoils = totalCoils
  state.freeLengthMm = freeLengthMm
  state.springIndex = meanDiameterMm / model.wireDiameterMm
  state.rateNPerMm = rateNPerMm({
    shearModulusMpa: model.shearModulusMpa, wireDiameterMm: model.wireDiameterMm, meanDiameterMm, activeCoils,
  })
  state.solidLengthMm = solidLengthMm(model.convention, model.ends, totalCoils, model.solidWireMm)
  state.minimumClearanceMm = minimumClearanceMm(meanDiameterMm, model.wireDiameterMm, activeCoils, model.dynamic)
  state.solidForceN = state.rateNPerMm * (freeLengthMm - state.solidLengthMm)
  return state
}

/** Force at a length, N. */
export function forceAtLengthN(state: CompressionState, lengthMm: number): number {
  return state.rateNPerMm * (state.freeLengthMm - lengthMm)
}

/** Least working force, N; zero where the spring works from free. */
export function leastForceN(state: CompressionState): number {
  return Number.isNaN(state.longestLengthMm) ? 0 : forceAtLengthN(state, state.longestLengthMm)
}

/** Greatest working force, N; NaN without a point. */
export function greatestForceN(state: CompressionState): number {
  return forceAtLengthN(state, state.shortestLengthMm)
}

/** Stress the method compares with its static limit, MPa. */
export function comparedStressMpa(model: CompressionModel, state: CompressionState, forceN: number): number {
  return model.staticLimit.stressFactor(state.springIndex) * shearStressMpa(forceN, state.meanDiameterMm, model.wireDiameterMm)
}

/** Outside diameter when solid, mm, ends free to turn. */
export function outerDiameterAtSolidMm(model: CompressionModel, state: CompressionState): number {
  const m = growthPitchMm(model.ends === 'closed', state.freeLengthMm, model.wireDiameterMm, state.activeCoils)
  return state.meanDiameterMm + model.wireDiameterMm + growthAtSolidMm(state.meanDiameterMm, model.wireDiameterMm, Math.max(m, 0))
}

/** Pitch of the free spring, mm. */
export function statePitchMm(model: CompressionModel, state: CompressionState): number {
  return pitchMm({
    ends: model.ends,
    freeLengthMm: state.freeLengthMm,
    wireDiameterMm: model.wireDiameterMm,
    activeCoils: state.activeCoils,
    totalCoils: state.totalCoils,
  })
}

/** Length of wire, mm. */
export function stateWireLengthMm(model: CompressionModel, state: CompressionState): number {
  return wireLengthMm(state.meanDiameterMm, state.activeCoils, state.totalCoils, statePitchMm(model, state))
}

/** Mass of the spring, g. */
export function stateMassG(model: CompressionModel, state: CompressionState): number {
  return wireMassG(model.wireDiameterMm, stateWireLengthMm(model, state), model.densityKgPerM3)
}
