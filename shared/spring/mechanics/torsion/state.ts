import { wireMassG } from '../wire-length'
import { bendingStressMpa, legCoils, momentRateNmmPerDeg, turnedMeanDiameterMm } from './bending'
import type { TorsionModel } from './model'

/**
 * One torsion spring of a model with the numbers all checks start from. The search fills the same object again and again,
 * so that its inner loop makes no garbage; nothing outside the calculation keeps one.
 */
export interface TorsionState {
  meanDiameterMm: number
  bodyCoils: number
  activeCoils: number
  springIndex: number
  rateNmmPerDeg: number
  /** Greatest and least working angles from free; NaN where there is no point. The least is NaN with one point: it is let go each stroke. */
  greatestAngleDeg: number
  leastAngleDeg: number
  /** False where the points are not in order of rising moment. */
  ordered: boolean
}

/** An empty state to fill. */
export function createTorsionState(leastAngleDeg: number, greatestAngleDeg: number): TorsionState {
  return { meanDiameterMm: 0, bodyCoils: 0, activeCoils: 0, springIndex: 0, rateNmmPerDeg: 0, leastAngleDeg, greatestAngleDeg, ordered: true }
}

/** Fills the state with a spring of the model and returns it. */
export function fillTorsionState(state: TorsionState, model: TorsionModel, meanDiameterMm: number, bodyCoils: number, activeCoils: number): TorsionState {
  state.meanDiameterMm = meanDiameterMm
  state.bodyCoils = bodyCoils
  state.activeCoils = activeCoils
  state.springIndex = meanDiameterMm / model.wireDiameterMm
  state.rateNmmPerDeg = momentRateNmmPerDeg(model.method, model.youngsModulusMpa, model.wireDiameterMm, meanDiameterMm, activeCoils)
  return state
}

/** Active coils of a body with the model's legs. */
export const activeCoilsOf = (model: TorsionModel, meanDiameterMm: number, bodyCoils: number): number => bodyCoils + legCoils(model.legsLengthMm, meanDiameterMm)

/** Greatest and least working moments, N mm; NaN and nought without a point. */
export const greatestMomentNmm = (state: TorsionState): number => state.rateNmmPerDeg * state.greatestAngleDeg
export const leastMomentNmm = (state: TorsionState): number => (Number.isNaN(state.leastAngleDeg) ? 0 : state.rateNmmPerDeg * state.leastAngleDeg)

/** Stress the method compares with its static limit, MPa. */
export const comparedBendingMpa = (model: TorsionModel, state: TorsionState, momentNmm: number): number =>
  model.staticLimit.stressFactor(state.springIndex) * bendingStressMpa(momentNmm, model.wireDiameterMm)

/** Turns by which the body itself is wound up at an angle (below nought where the load opens it): the legs' share is left out. */
export function bodyTurns(model: TorsionModel, state: TorsionState, angleDeg: number): number {
  const turns = (angleDeg / 360) * (state.bodyCoils / state.activeCoils)
  return model.loadOpens ? -turns : turns
}

/** Mean diameter of the body at an angle, mm. */
export const meanDiameterAtMm = (model: TorsionModel, state: TorsionState, angleDeg: number): number =>
  turnedMeanDiameterMm(state.meanDiameterMm, state.bodyCoils, bodyTurns(model, state, angleDeg))

/** Length of the closed body at an angle, mm: it grows by the wire for each turn wound up, d (Nb + 1 + turns) (from memory). */
export const bodyLengthAtMm = (model: TorsionModel, state: TorsionState, angleDeg: number): number =>
  model.wireDiameterMm * (state.bodyCoils + 1 + Math.max(0, bodyTurns(model, state, angleDeg)))

/** Greatest working angle, or nought without a point. */
export const angleOrZero = (state: TorsionState): number => (Number.isNaN(state.greatestAngleDeg) ? 0 : state.greatestAngleDeg)

/** Length of wire, mm: pi D Nb and the legs. */
export const torsionWireLengthMm = (model: TorsionModel, state: TorsionState): number => Math.PI * state.meanDiameterMm * state.bodyCoils + model.legsLengthMm

/** Mass of the spring, g. */
export const torsionMassG = (model: TorsionModel, state: TorsionState): number =>
  wireMassG(model.wireDiameterMm, torsionWireLengthMm(model, state), model.densityKgPerM3)
