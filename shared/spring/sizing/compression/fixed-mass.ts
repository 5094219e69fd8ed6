import { pitchMm } from '../../mechanics/compression/end-geometry'
import type { CompressionModel } from '../../mechanics/compression/model'
import { stateMassG, type CompressionState } from '../../mechanics/compression/state'
import { wireMassG } from '../../mechanics/wire-length'
import { minimiseBounded } from '../bounded-minimum'
import { LEAST_INDEX, MOST_INDEX } from '../steps'
import { fillAtDiameter } from './fixed-travel'
import type { FixedTravel } from './travel'

/*
 * Wire of a spring of fixed travel: n sqrt((pi D)^2 + p^2) + e pi D, with n = c/D^3 active coils and e end coils, so
 * sqrt((pi c/D^2)^2 + K^2) + e pi D with K = n p. K is what the end coils leave of the free length, a constant for all ends
 * but open and ground: there the first part is the norm of a convex falling function and a constant, so convex, and the
 * end coils add a straight line. The sum has one valley, where D^3 sqrt((pi c)^2 + K^2 D^4) = 2 pi c^2/e.
 * The left side rises with D; its logarithm has a slope of 3 to 5 against ln D, so Newton's steps home in at once.
 *
 * For open and ground ends K = L0 n/(n + 1) falls with D. With K at its least, at the greatest D, the same valley is a
 * bound of the mass; the place itself is found with bounds: between a and b the falling part is least at b, the rising at a.
 */
const NEWTON_STEPS = 8
const ENOUGH = 1e-12

/** The place of the valley between two diameters, mm. */
function valleyMm(c: number, K: number, endCoils: number, low: number, high: number): number {
  const turn = Math.PI * c
  const target = (2 * turn * c) / endCoils
  const side = (D: number) => D * D * D * Math.sqrt(turn * turn + K * K * D * D * D * D)
  // Without end coils, or with few, the wire only gets shorter.
  if (endCoils <= 0 || side(high) <= target) return high
  if (side(low) >= target) return low
  const aim = Math.log(target)
  let x = Math.log(high)
  for (let i = 0; i < NEWTON_STEPS; i++) {
    const rise = K * K * Math.exp(4 * x)
    const square = turn * turn + rise
    const step = (3 * x + 0.5 * Math.log(square) - aim) / (3 + (2 * rise) / square)
    x -= step
    if (Math.abs(step) < ENOUGH) break
  }
  return Math.min(high, Math.max(low, Math.exp(x)))
}

// K = n p at a diameter.
function activeLengthMm(model: CompressionModel, state: CompressionState, travel: FixedTravel, D: number): number {
  const { activeCoils, totalCoils, freeLengthMm } = fillAtDiameter(model, state, travel, D)
  return activeCoils * pitchMm({ ends: model.ends, freeLengthMm, wireDiameterMm: model.wireDiameterMm, activeCoils, totalCoils })
}

// The valley of the mass with K as it is at `high`.
function valleyBetween(model: CompressionModel, state: CompressionState, travel: FixedTravel, low: number, high: number): number {
  const K = activeLengthMm(model, state, travel, high)
  return valleyMm(state.activeCoils * high * high * high, K, state.totalCoils - state.activeCoils, low, high)
}

const massAt = (model: CompressionModel, state: CompressionState, travel: FixedTravel, D: number): number =>
  stateMassG(model, fillAtDiameter(model, state, travel, D))

/** The mean diameter between two of the lightest spring, passing or not, mm. */
export function lightestDiameterMm(model: CompressionModel, state: CompressionState, travel: FixedTravel, low: number, high: number): number {
  if (model.ends !== 'open-ground') return valleyBetween(model, state, travel, low, high)
  const endCoilsG = (D: number) => wireMassG(model.wireDiameterMm, Math.PI * D, model.densityKgPerM3)
  const { point } = minimiseBounded({
    low: [low], high: [high],
    bound: ([a = low], [b = high]) => massAt(model, state, travel, b) - endCoilsG(b) + endCoilsG(a),
    value: ([D = low]) => massAt(model, state, travel, D),
  })
  return point?.[0] ?? low
}

/** A mass below which no spring of the wire lies, g: the least over all indices, whether it passes or not. */
export function leastMassFixedG(model: CompressionModel, state: CompressionState, travel: FixedTravel): number {
  const d = model.wireDiameterMm
  const low = LEAST_INDEX * d
  const high = MOST_INDEX * d
  const D = valleyBetween(model, state, travel, low, high)
  if (model.ends !== 'open-ground') return massAt(model, state, travel, D) * (1 - 1e-9)
  const K = activeLengthMm(model, state, travel, high)
  const { activeCoils: n } = fillAtDiameter(model, state, travel, D)
  return wireMassG(d, Math.hypot(Math.PI * D * n, K) + Math.PI * D, model.densityKgPerM3) * (1 - 1e-9)
}
