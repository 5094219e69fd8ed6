import { passesStopChecks } from '../../mechanics/compression/checks'
import type { CompressionModel } from '../../mechanics/compression/model'
import { stateMassG, type CompressionState } from '../../mechanics/compression/state'
import { minimiseBounded } from '../bounded-minimum'
import type { WireGoal, WireSpring } from '../kind-search'
import { forEachStep, isContinuous, stepped, type Steps } from '../steps'
import { coilRange, couldPass, fewestCoilsBetween, fillFreeRate, massBoundG, mostCoils, possibleDiameters } from './free-rate'
import { LEAST_ACTIVE_COILS } from './search-state'
import type { FreeRateTravel } from './travel'

/** Of the range of diameters, far below what can be wound. */
const LEAST_WIDTH = 1e-7

/** What each wire is searched for: the best for a goal, all, or whichever passes first. */
type Goal = WireGoal | 'any'

interface Diameters {
  readonly low: number
  readonly high: number
}

/**
 * Springs of the wire that serve the goal when only one load is asked for; every one passes every stop check. Mass rises with
 * the coils, so each diameter gives its spring of fewest coils; in steps of diameter `every` gives all of those.
 */
export function searchFreeRate(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, goal: Goal, steps: Steps): WireSpring[] {
  const range = possibleDiameters(model, state, travel)
  if (!range) return []
  if (isContinuous(steps)) return searchContinuous(model, state, travel, goal, range)
  return Number.isNaN(steps.diameterStepMm)
    ? searchCoilSteps(model, state, travel, goal, steps.coilStep, range)
    : searchDiameterSteps(model, state, travel, goal, steps, range)
}

/** True where the wire gives some spring. */
export function isFreeRateFeasible(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, steps: Steps): boolean {
  return searchFreeRate(model, state, travel, 'any', steps).length > 0
}

const springOf = (state: CompressionState): WireSpring =>
  ({ meanDiameterMm: state.meanDiameterMm, activeCoils: state.activeCoils, totalCoils: state.totalCoils, freeLengthMm: state.freeLengthMm })

function searchContinuous(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, goal: Goal, { low, high }: Diameters): WireSpring[] {
  const byStress = goal === 'stress'
  const { point } = minimiseBounded({
    low: [low], high: [high],
    bound: ([a = 0], [b = 0]) => {
      const bound = massBoundG(model, state, travel, a, b)
      // The working stress of the one load rises with D alone.
      return byStress && bound < Infinity ? a : bound
    },
    value: ([D = 0]) => {
      const range = coilRange(model, state, travel, D)
      if (!range) return Infinity
      return byStress ? D : stateMassG(model, fillFreeRate(model, state, travel, D, range.least))
    },
  }, { leastWidth: LEAST_WIDTH, anyPoint: goal === 'any' })
  const D = point?.[0]
  const n = D === undefined ? undefined : coilRange(model, state, travel, D)?.least
  if (D === undefined || n === undefined) return []
  fillFreeRate(model, state, travel, D, n)
  return passesStopChecks(model, state) ? [springOf(state)] : []
}

// At each stepped diameter the fewest coils that pass, in steps too where asked; the best is kept, or all.
function searchDiameterSteps(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, goal: Goal, { coilStep, diameterStepMm }: Steps, { low, high }: Diameters): WireSpring[] {
  const keep = createKeeper(model, state, goal)
  forEachStep(low, high, diameterStepMm, (D) => {
    if (keep.isDone()) return
    // No spring of this diameter is lighter than one of two coils.
    if (goal === 'mass' && stateMassG(model, fillFreeRate(model, state, travel, D, LEAST_ACTIVE_COILS)) >= keep.least()) return
    const range = coilRange(model, state, travel, D)
    if (!range) return
    const n = Number.isNaN(coilStep) ? range.least : stepped(Math.ceil(range.least / coilStep - 1e-9), coilStep)
    if (n > range.most) return
    fillFreeRate(model, state, travel, D, n)
    if (passesStopChecks(model, state)) keep.take()
  })
  return keep.kept()
}

// With the coils given, mass and stress rise with D: the least diameter that passes is both the lightest and the least stressed.
function searchCoilSteps(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, goal: Goal, coilStep: number, { low, high }: Diameters): WireSpring[] {
  const keep = createKeeper(model, state, goal)
  forEachStep(LEAST_ACTIVE_COILS, mostCoils(model, travel), coilStep, (n) => {
    if (keep.isDone() || !couldPass(model, state, travel, n, low, high)) return
    if (goal === 'mass' && stateMassG(model, fillFreeRate(model, state, travel, low, n)) >= keep.least()) return
    const { point } = minimiseBounded({
      low: [low], high: [high],
      bound: ([a = 0], [b = 0]) => (couldPass(model, state, travel, n, a, b) && fewestCoilsBetween(model, state, travel, a, b) <= n * (1 + 1e-9) ? a : Infinity),
      value: ([D = 0]) => (passesStopChecks(model, fillFreeRate(model, state, travel, D, n)) ? D : Infinity),
    }, { leastWidth: LEAST_WIDTH })
    const D = point?.[0]
    if (D === undefined) return
    fillFreeRate(model, state, travel, D, n)
    keep.take()
  })
  return keep.kept()
}

// Keeps of the springs that the state is filled with what the goal asks for.
function createKeeper(model: CompressionModel, state: CompressionState, goal: Goal) {
  const kept: WireSpring[] = []
  let least = Infinity
  return {
    least: () => least,
    isDone: () => goal === 'any' && kept.length > 0,
    kept: () => kept,
    take: () => {
      if (goal === 'every') {
        kept.push(springOf(state))
        return
      }
      const value = goal === 'stress' ? state.meanDiameterMm : stateMassG(model, state)
      if (value >= least) return
      least = value
      kept[0] = springOf(state)
    },
  }
}
