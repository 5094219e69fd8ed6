import { totalCoilsFor } from '../../mechanics/compression/end-geometry'
import { passesStopChecks } from '../../mechanics/compression/checks'
import type { CompressionModel } from '../../mechanics/compression/model'
import { fillState, stateMassG, type CompressionState } from '../../mechanics/compression/state'
import { rateNPerMm } from '../../mechanics/rate'
import type { WireGoal, WireSpring } from '../kind-search'
import { LEAST_INDEX, MOST_INDEX, STEP_TOLERANCE, forEachStep, stepped, type Steps } from '../steps'
import { feasibleDiameters } from './fixed-travel-search'
import { LEAST_ACTIVE_COILS } from './search-state'
import { freeLengthForRate, type FixedTravel } from './travel'

/**
 * Springs of the wire whose coils and diameter are whole steps and that pass every stop check: all of them, or the best for
 * the goal. With one of the two in steps the other makes the rate exact; with both, the asked forces are met within
 * STEP_TOLERANCE. Every such spring is looked at, so the best is the best.
 */
export function searchStepped(model: CompressionModel, state: CompressionState, travel: FixedTravel, goal: WireGoal, steps: Steps): WireSpring[] {
  const intervals = feasibleDiameters(model, state, travel)
  const [first] = intervals
  const last = intervals[intervals.length - 1]
  if (!first || !last) return []
  const { coilStep, diameterStepMm } = steps
  const d = model.wireDiameterMm
  const stiffness = (model.shearModulusMpa * d ** 4) / 8
  const coilsAt = (D: number) => stiffness / (D * D * D * travel.rateNPerMm)
  const every: WireSpring[] = []
  let best: WireSpring | null = null
  let least = Infinity
  const take = (D: number, n: number) => {
    if (!fillPassing(model, state, travel, D, n)) return
    const value = goal === 'mass' ? stateMassG(model, state) : goal === 'stress' ? D : 0
    if (goal !== 'every' && !(value < least)) return
    const spring = { meanDiameterMm: D, activeCoils: n, totalCoils: state.totalCoils, freeLengthMm: state.freeLengthMm }
    least = value
    if (goal === 'every') every.push(spring)
    else best = spring
  }

  if (Number.isNaN(diameterStepMm)) {
    forEachStep(coilsAt(last.highMm), coilsAt(first.lowMm), coilStep, n => take(Math.cbrt(stiffness / (n * travel.rateNPerMm)), n))
  } else {
    // One step beyond the exact range on either side: within the tolerance a neighbour may pass where the exact one does not.
    const from = Math.max(first.lowMm - diameterStepMm, LEAST_INDEX * d)
    const to = Math.min(last.highMm + diameterStepMm, MOST_INDEX * d)
    forEachStep(from, to, diameterStepMm, (D) => {
      const exact = coilsAt(D)
      if (Number.isNaN(coilStep)) {
        take(D, exact)
        return
      }
      const below = Math.floor(exact / coilStep)
      take(D, stepped(below, coilStep))
      take(D, stepped(below + 1, coilStep))
    })
  }
  return best ? [best] : every
}

// Fills the state; true where the spring is within the tolerance of the steps and passes.
function fillPassing(model: CompressionModel, state: CompressionState, travel: FixedTravel, D: number, n: number): boolean {
  if (n < LEAST_ACTIVE_COILS) return false
  const rate = rateNPerMm({ shearModulusMpa: model.shearModulusMpa, wireDiameterMm: model.wireDiameterMm, meanDiameterMm: D, activeCoils: n })
  const { freeLengthMm, error } = freeLengthForRate(travel, rate)
  if (error > STEP_TOLERANCE) return false
  fillState(state, model, D, n, totalCoilsFor(model.ends, n), freeLengthMm)
  return passesStopChecks(model, state)
}
