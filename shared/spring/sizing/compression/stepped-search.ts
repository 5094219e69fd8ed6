import { passesStopChecks } from '../../mechanics/compression/checks'
import type { CompressionModel } from '../../mechanics/compression/model'
import { rateNPerMm } from '../../mechanics/rate'
import { fillState, type CompressionState } from '../../mechanics/compression/state'
import { feasibleDiameters } from './fixed-travel-search'
import { STEP_TOLERANCE, freeLengthForRate, type FixedTravel } from './travel'
import { LEAST_ACTIVE_COILS, LEAST_INDEX, MOST_INDEX, stepped, totalCoils, type Steps, type WireSpring } from './wire-search'

// A guard against absurd steps; a real wire has some hundred steps of diameter and coils.
const MOST_STEPS = 4000

/**
 * Every spring of the wire whose coils and diameter are whole steps and that passes every stop check. With one of the two
 * in steps the other makes the rate exact; with both, the asked forces are met within STEP_TOLERANCE.
 */
export function searchStepped(model: CompressionModel, state: CompressionState, travel: FixedTravel, steps: Steps): WireSpring[] {
  const intervals = feasibleDiameters(model, state, travel)
  const [first] = intervals
  const last = intervals[intervals.length - 1]
  if (!first || !last) return []
  const { coilStep, diameterStepMm } = steps
  const d = model.wireDiameterMm
  const stiffness = (model.shearModulusMpa * d ** 4) / 8
  const coilsAt = (D: number) => stiffness / (D * D * D * travel.rateNPerMm)
  const found: WireSpring[] = []
  const take = (D: number, n: number) => {
    const spring = passing(model, state, travel, D, n)
    if (spring) found.push(spring)
  }

  if (Number.isNaN(diameterStepMm)) {
    const from = Math.ceil(coilsAt(last.highMm) / coilStep - 1e-9)
    const to = Math.min(Math.floor(coilsAt(first.lowMm) / coilStep + 1e-9), from + MOST_STEPS)
    for (let i = from; i <= to; i++) {
      const n = stepped(i, coilStep)
      take(Math.cbrt(stiffness / (n * travel.rateNPerMm)), n)
    }
    return found
  }

  // One step beyond the exact range on either side: within the tolerance a neighbour may pass where the exact one does not.
  const from = Math.max(Math.floor(first.lowMm / diameterStepMm), Math.ceil((LEAST_INDEX * d) / diameterStepMm - 1e-9))
  const to = Math.min(Math.ceil(last.highMm / diameterStepMm), Math.floor((MOST_INDEX * d) / diameterStepMm + 1e-9), from + MOST_STEPS)
  for (let i = from; i <= to; i++) {
    const D = stepped(i, diameterStepMm)
    const exact = coilsAt(D)
    if (Number.isNaN(coilStep)) {
      take(D, exact)
      continue
    }
    const below = Math.floor(exact / coilStep)
    for (const n of [stepped(below, coilStep), stepped(below + 1, coilStep)]) take(D, n)
  }
  return found
}

function passing(model: CompressionModel, state: CompressionState, travel: FixedTravel, D: number, n: number): WireSpring | null {
  if (n < LEAST_ACTIVE_COILS) return null
  const rate = rateNPerMm({
    shearModulusMpa: model.shearModulusMpa, wireDiameterMm: model.wireDiameterMm, meanDiameterMm: D, activeCoils: n,
  })
  const { freeLengthMm, error } = freeLengthForRate(travel, rate)
  if (error > STEP_TOLERANCE) return null
  fillState(state, model, D, n, totalCoils(model, n), freeLengthMm)
  if (!passesStopChecks(model, state)) return null
  return { meanDiameterMm: D, activeCoils: n, totalCoils: state.totalCoils, freeLengthMm }
}
