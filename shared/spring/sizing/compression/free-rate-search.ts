import { wireRangeCheck, indexCheck } from '../../mechanics/checks/wire'
import { temperatureCheck } from '../../mechanics/checks/place'
import { bucklingDeflection } from '../../mechanics/compression/buckling'
import { passesStopChecks } from '../../mechanics/compression/checks'
import type { CompressionCheck } from '../../mechanics/compression/checks/check'
import { boreCheck, freeLengthCheck, leastInnerDiameterMm, rodCheck, solidLengthCheck } from '../../mechanics/compression/checks/fit'
import { fatigueCheck } from '../../mechanics/compression/checks/life'
import { coilsCheck } from '../../mechanics/compression/checks/proportion'
import { bucklingCheck } from '../../mechanics/compression/checks/stability'
import { stressSolidCheck, stressWorkingCheck } from '../../mechanics/compression/checks/stress'
import { clearanceCheck, orderCheck } from '../../mechanics/compression/checks/travel'
import { totalCoilsFor } from '../../mechanics/compression/end-geometry'
import type { CompressionModel } from '../../mechanics/compression/model'
import { fillState, stateMassG, type CompressionState } from '../../mechanics/compression/state'
import { rateNPerMm } from '../../mechanics/rate'
import { shearStressMpa } from '../../mechanics/stress'
import { minimiseBounded } from '../bounded-minimum'
import type { WireGoal, WireSpring } from '../kind-search'
import { greatestThatHolds, leastThatHolds } from '../numeric-search'
import { LEAST_INDEX, MOST_INDEX, forEachStep, isContinuous, stepped, type Steps } from '../steps'
import { LEAST_ACTIVE_COILS, allHold } from './search-state'
import type { FreeRateTravel } from './travel'

/*
 * One load F at one length L leaves rate and free length open: L0 = L + F/R, R = G d^4/(8 D^3 n).
 *
 * At a given D every check is constant in the coils n, or fails only below some n, or only above it: with n the rate falls,
 * so the load when solid, F + R (L - Lc), and the growth of the diameter fall, while solid length, free length and
 * slenderness rise. Mass rises with n, so of each D the fewest coils are taken and only D is searched, with bounds.
 *
 * Between diameters a and b no spring is lighter than one of diameter a with the fewest coils that could pass anywhere
 * between: mass rises with D too (n and L0 the same or more). Each check that can be judged for the whole range is judged
 * at its best place: see `couldPass`.
 */
const CONSTANT_CHECKS: readonly CompressionCheck[] = [wireRangeCheck, temperatureCheck, indexCheck, stressWorkingCheck, fatigueCheck, rodCheck]
const LEAST_COIL_CHECKS: readonly CompressionCheck[] = [coilsCheck, stressSolidCheck, boreCheck]
const MOST_COIL_CHECKS: readonly CompressionCheck[] = [orderCheck, clearanceCheck, solidLengthCheck, freeLengthCheck, bucklingCheck]
// At the least diameter these are easiest.
const EASIEST_SMALL: readonly CompressionCheck[] = [wireRangeCheck, temperatureCheck, stressWorkingCheck, fatigueCheck, orderCheck, clearanceCheck, solidLengthCheck, freeLengthCheck]

interface CoilRange {
  readonly least: number
  readonly most: number
}

function fillAt(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, D: number, n: number): CompressionState {
  const rate = rateNPerMm({ shearModulusMpa: model.shearModulusMpa, wireDiameterMm: model.wireDiameterMm, meanDiameterMm: D, activeCoils: n })
  return fillState(state, model, D, n, totalCoilsFor(model.ends, n), travel.point.lengthMm + travel.point.forceN / rate)
}

const mostCoils = (model: CompressionModel, travel: FreeRateTravel) => travel.point.lengthMm / model.wireDiameterMm

/** Coils that pass every stop check at a mean diameter; null where none do. */
function coilRange(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, D: number): CoilRange | null {
  let least = LEAST_ACTIVE_COILS
  let most = mostCoils(model, travel)
  if (!(least <= most)) return null
  if (!allHold(CONSTANT_CHECKS, model, fillAt(model, state, travel, D, least))) return null
  most = greatestThatHolds(n => allHold(MOST_COIL_CHECKS, model, fillAt(model, state, travel, D, n)), least, most)
  if (Number.isNaN(most)) return null
  least = leastThatHolds(n => allHold(LEAST_COIL_CHECKS, model, fillAt(model, state, travel, D, n)), least, most)
  return Number.isNaN(least) ? null : { least, most }
}

/** Fewest coils with which the checks that ask for coils could pass somewhere between two diameters; NaN where none do. */
function fewestCoilsBetween(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, a: number, b: number): number {
  return leastThatHolds((n) => {
    fillAt(model, state, travel, a, n)
    // The grown outside diameter rises with D: its growth falls at most as fast as it is large against D.
    if (boreCheck.applies(model, state) && boreCheck.stops(model, state)) return false
    return !stressSolidCheck.applies(model, state) || !model.solidSafe || leastSolidStressMpa(model, state, travel, n, a, b) <= model.allowableStressMpa * (1 + 1e-9)
  }, LEAST_ACTIVE_COILS, mostCoils(model, travel))
}

/** A stress when solid that no diameter between a and b falls under: factor at b, and the least of F D + K/D^2, which has one valley. */
function leastSolidStressMpa(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, n: number, a: number, b: number): number {
  const { lengthMm, forceN } = travel.point
  const d = model.wireDiameterMm
  const K = ((model.shearModulusMpa * d ** 4) / (8 * n)) * Math.max(0, lengthMm - state.solidLengthMm)
  const valley = Math.min(b, Math.max(a, Math.cbrt((2 * K) / forceN)))
  return model.staticLimit.stressFactor(b / d) * shearStressMpa(forceN + K / valley ** 3, valley, d)
}

/** False where no spring of diameters between a and b and at least n coils passes. */
function couldPass(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, n: number, a: number, b: number): boolean {
  fillAt(model, state, travel, a, n)
  if (!allHold(EASIEST_SMALL, model, state)) return false
  // Slender springs bow: thickest at b, shortest and least pressed at a.
  if (!model.guided) {
    const critical = bucklingDeflection(state.freeLengthMm, b, model.seating, model.moduli)
    if (state.freeLengthMm - travel.point.lengthMm > critical * (1 + 1e-9)) return false
  }
  if (Number.isNaN(model.rodMm)) return true
  const shrink = a - leastInnerDiameterMm(model, state)
  return b - shrink >= model.rodMm * (1 - 1e-9)
}

function diameterBound(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, a: number, b: number): number {
  const n = fewestCoilsBetween(model, state, travel, a, b)
  if (Number.isNaN(n) || !couldPass(model, state, travel, n, a, b)) return Infinity
  return stateMassG(model, fillAt(model, state, travel, a, n))
}

/** The best diameter for the goal and its least value, proven; null where the wire gives no spring. */
function bestDiameter(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, goal: 'mass' | 'stress'): number | null {
  const d = model.wireDiameterMm
  const { point } = minimiseBounded({
    low: [LEAST_INDEX * d], high: [MOST_INDEX * d],
    bound: ([a = 0], [b = 0]) => {
      const bound = diameterBound(model, state, travel, a, b)
      // The working stress of the one load rises with D alone.
      return goal === 'mass' || bound === Infinity ? bound : a
    },
    value: ([D = 0]) => {
      const range = coilRange(model, state, travel, D)
      if (!range) return Infinity
      return goal === 'mass' ? stateMassG(model, fillAt(model, state, travel, D, range.least)) : D
    },
  }, { leastWidth: 1e-7 })
  return point?.[0] ?? null
}

/** A mass below which no spring of the wire lies, g. */
export function leastMassFreeRateG(model: CompressionModel, state: CompressionState, travel: FreeRateTravel): number {
  return diameterBound(model, state, travel, LEAST_INDEX * model.wireDiameterMm, MOST_INDEX * model.wireDiameterMm)
}

/**
 * Springs of the wire that serve the goal when only one load is asked for; every one passes every stop check. In steps of
 * diameter each diameter gives its spring of fewest coils, which is its lightest; `every` gives all of those.
 */
export function searchFreeRate(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, goal: WireGoal, steps: Steps): WireSpring[] {
  const d = model.wireDiameterMm
  const found: WireSpring[] = []
  const take = (D: number) => {
    const range = coilRange(model, state, travel, D)
    if (!range) return
    const n = Number.isNaN(steps.coilStep) ? range.least : stepped(Math.ceil(range.least / steps.coilStep - 1e-9), steps.coilStep)
    if (n > range.most) return
    fillAt(model, state, travel, D, n)
    if (passesStopChecks(model, state)) found.push({ meanDiameterMm: D, activeCoils: n, totalCoils: state.totalCoils, freeLengthMm: state.freeLengthMm })
  }
  if (isContinuous(steps)) {
    const D = bestDiameter(model, state, travel, goal === 'stress' ? 'stress' : 'mass')
    if (D !== null) take(D)
    return found
  }
  if (Number.isNaN(steps.diameterStepMm)) return searchCoilSteps(model, state, travel, goal, steps.coilStep)
  forEachStep(LEAST_INDEX * d, MOST_INDEX * d, steps.diameterStepMm, take)
  return goal === 'every' ? found : bestOf(model, state, travel, goal, found)
}

// With the coils given, mass and stress rise with D: the least diameter that passes is both the lightest and the least stressed.
function searchCoilSteps(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, goal: WireGoal, coilStep: number): WireSpring[] {
  const d = model.wireDiameterMm
  const found: WireSpring[] = []
  forEachStep(LEAST_ACTIVE_COILS, mostCoils(model, travel), coilStep, (n) => {
    const { point } = minimiseBounded({
      low: [LEAST_INDEX * d], high: [MOST_INDEX * d],
      bound: ([a = 0], [b = 0]) => {
        const fewest = fewestCoilsBetween(model, state, travel, a, b)
        return fewest <= n && couldPass(model, state, travel, n, a, b) ? a : Infinity
      },
      value: ([D = 0]) => (passesStopChecks(model, fillAt(model, state, travel, D, n)) ? D : Infinity),
    }, { leastWidth: 1e-7 })
    const D = point?.[0]
    if (D === undefined) return
    fillAt(model, state, travel, D, n)
    found.push({ meanDiameterMm: D, activeCoils: n, totalCoils: state.totalCoils, freeLengthMm: state.freeLengthMm })
  })
  return goal === 'every' ? found : bestOf(model, state, travel, goal, found)
}

function bestOf(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, goal: 'mass' | 'stress', springs: readonly WireSpring[]): WireSpring[] {
  let best: WireSpring | null = null
  let least = Infinity
  for (const spring of springs) {
    const value = goal === 'stress' ? spring.meanDiameterMm : stateMassG(model, fillAt(model, state, travel, spring.meanDiameterMm, spring.activeCoils))
    if (value < least) {
      least = value
      best = spring
    }
  }
  return best ? [best] : []
}

/** True where the wire gives some spring. */
export function isFreeRateFeasible(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, steps: Steps): boolean {
  return searchFreeRate(model, state, travel, 'mass', steps).length > 0
}
