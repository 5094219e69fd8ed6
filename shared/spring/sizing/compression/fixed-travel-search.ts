import { passesStopChecks } from '../../mechanics/compression/checks'
import type { CompressionModel } from '../../mechanics/compression/model'
import { stateMassG, type CompressionState } from '../../mechanics/compression/state'
import type { WireGoal, WireSpring } from '../kind-search'
import { lightestDiameterMm } from './fixed-mass'
import { feasibleDiameters, fillAtDiameter } from './fixed-travel'
import type { FixedTravel } from './travel'

/**
 * The spring of the wire that serves the goal best, or none; it passes every stop check. The mass of each feasible interval
 * has one valley (fixed-mass.ts); the stress at a fixed load, and when solid, rises with D (fixed-travel.ts), so there the
 * least feasible diameter is the best.
 */
export function searchFixedTravel(model: CompressionModel, state: CompressionState, travel: FixedTravel, goal: WireGoal): WireSpring[] {
  let best: WireSpring | null = null
  let least = Infinity
  for (const { lowMm, highMm } of feasibleDiameters(model, state, travel)) {
    const spring = passingSpring(model, state, travel, goal === 'stress' ? lowMm : lightestDiameterMm(model, state, travel, lowMm, highMm))
    if (!spring) continue
    if (goal === 'stress') return [spring]
    const mass = stateMassG(model, fillAtDiameter(model, state, travel, spring.meanDiameterMm))
    if (mass < least) {
      least = mass
      best = spring
    }
  }
  return best ? [best] : []
}

// Where an interval begins on a step of the tolerance table, the step itself may still belong to the row below.
function passingSpring(model: CompressionModel, state: CompressionState, travel: FixedTravel, meanDiameterMm: number): WireSpring | null {
  for (const D of [meanDiameterMm, meanDiameterMm * (1 + 1e-10), meanDiameterMm * (1 - 1e-10)]) {
    fillAtDiameter(model, state, travel, D)
    if (passesStopChecks(model, state)) {
      return { meanDiameterMm: D, activeCoils: state.activeCoils, totalCoils: state.totalCoils, freeLengthMm: state.freeLengthMm }
    }
  }
  return null
}
