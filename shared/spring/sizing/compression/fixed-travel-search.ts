import { COMPRESSION_CHECKS, passesStopChecks } from '../../mechanics/compression/checks'
import type { CompressionCheck } from '../../mechanics/compression/checks/check'
import { boreCheck, freeLengthCheck, leastInnerDiameterMm, rodCheck, solidLengthCheck } from '../../mechanics/compression/checks/fit'
import { temperatureCheck } from '../../mechanics/checks/place'
import { wireRangeCheck } from '../../mechanics/checks/wire'
import { fatigueCheck } from '../../mechanics/compression/checks/life'
import { coilsCheck } from '../../mechanics/compression/checks/proportion'
import { bucklingCheck } from '../../mechanics/compression/checks/stability'
import { stressSolidCheck, stressWorkingCheck } from '../../mechanics/compression/checks/stress'
import { clearanceCheck, orderCheck } from '../../mechanics/compression/checks/travel'
import type { CompressionModel } from '../../mechanics/compression/model'
import { fillState, stateMassG, type CompressionState } from '../../mechanics/compression/state'
import { INDEX_STEPS, MEAN_DIAMETER_STEPS_MM } from '../../mechanics/tolerances/mean-diameter'
import { greatestThatHolds, leastThatHolds, placeOfLeast } from '../numeric-search'
import type { FixedTravel } from './travel'
import { LEAST_ACTIVE_COILS, LEAST_INDEX, MOST_INDEX, allHold, holds, totalCoils, type WireGoal, type WireSpring } from './wire-search'

/*
 * With rate and free length fixed, the mean diameter D is the only unknown: n = G d^4/(8 D^3 R). Every stop check is then
 * constant in D, or fails only below some D (the coils are too many), or only above it (the stress or the diameter is too
 * great). The rod alone has gaps, where the diameter tolerance steps up.
 */

/** Checks that D does not move. */
export const CONSTANT_CHECKS: readonly CompressionCheck[] = [wireRangeCheck, freeLengthCheck, temperatureCheck]
/** Checks that a small D fails. */
export const LEAST_DIAMETER_CHECKS: readonly CompressionCheck[] = [orderCheck, clearanceCheck, solidLengthCheck, bucklingCheck]
/** Checks that a large D fails. */
export const MOST_DIAMETER_CHECKS: readonly CompressionCheck[] = [coilsCheck, stressWorkingCheck, stressSolidCheck, fatigueCheck, boreCheck]

export interface DiameterInterval {
  readonly lowMm: number
  readonly highMm: number
}

/** Fills the state with the spring of mean diameter D that has the asked rate and free length. */
export function fillAtDiameter(model: CompressionModel, state: CompressionState, travel: FixedTravel, meanDiameterMm: number): CompressionState {
  const d = model.wireDiameterMm
  const n = (model.shearModulusMpa * d * d * d * d) / (8 * meanDiameterMm * meanDiameterMm * meanDiameterMm * travel.rateNPerMm)
  return fillState(state, model, meanDiameterMm, n, totalCoils(model, n), travel.freeLengthMm)
}

/** Mean diameters at which the wire gives a spring that passes every stop check; empty where there is none. */
export function feasibleDiameters(model: CompressionModel, state: CompressionState, travel: FixedTravel): DiameterInterval[] {
  const d = model.wireDiameterMm
  const coilsBound = Math.cbrt((model.shearModulusMpa * d ** 4) / (8 * LEAST_ACTIVE_COILS * travel.rateNPerMm))
  let low = LEAST_INDEX * d
  let high = Math.min(MOST_INDEX * d, coilsBound)
  if (!(low <= high)) return []
  fillAtDiameter(model, state, travel, low)
  if (!allHold(CONSTANT_CHECKS, model, state)) return []
  // Checks that fail the same way fail together, so one bisection serves each side.
  low = leastThatHolds(D => allHold(LEAST_DIAMETER_CHECKS, model, fillAtDiameter(model, state, travel, D)), low, high)
  if (Number.isNaN(low)) return []
  high = greatestThatHolds(D => allHold(MOST_DIAMETER_CHECKS, model, fillAtDiameter(model, state, travel, D)), low, high)
  if (Number.isNaN(high)) return []
  return Number.isNaN(model.rodMm) ? [{ lowMm: low, highMm: high }] : intervalsOverRod(model, state, travel, low, high)
}

// Between two steps of the tolerance table the tolerance is constant, so the rod asks for one least diameter there.
function intervalsOverRod(model: CompressionModel, state: CompressionState, travel: FixedTravel, low: number, high: number): DiameterInterval[] {
  const steps = [...MEAN_DIAMETER_STEPS_MM, ...INDEX_STEPS.map(w => w * model.wireDiameterMm)]
    .filter(D => D > low && D < high)
    .sort((a, b) => a - b)
  const intervals: DiameterInterval[] = []
  let from = low
  for (const to of [...steps, high]) {
    fillAtDiameter(model, state, travel, (from + to) / 2)
    const shrink = state.meanDiameterMm - leastInnerDiameterMm(model, state)
    const least = Math.max(from, model.rodMm + shrink)
    if (least <= to) {
      const last = intervals[intervals.length - 1]
      if (last && last.highMm === least) intervals[intervals.length - 1] = { lowMm: last.lowMm, highMm: to }
      else intervals.push({ lowMm: least, highMm: to })
    }
    from = to
  }
  return intervals.filter(({ highMm }) => holds(rodCheck, model, fillAtDiameter(model, state, travel, highMm)))
}

const SPREAD_POINTS = 7

/** Springs of the wire that serve the goal; every one passes every stop check. */
export function searchFixedTravel(model: CompressionModel, state: CompressionState, travel: FixedTravel, goal: WireGoal): WireSpring[] {
  const massAt = (D: number) => stateMassG(model, fillAtDiameter(model, state, travel, D))
  const found: WireSpring[] = []
  const take = (D: number) => {
    const spring = passingSpring(model, state, travel, D)
    if (spring) found.push(spring)
  }
  for (const { lowMm, highMm } of feasibleDiameters(model, state, travel)) {
    if (goal !== 'stress') take(placeOfLeast(massAt, lowMm, highMm))
    if (goal !== 'mass') take(lowMm)
    if (goal === 'spread') {
      for (let i = 1; i <= SPREAD_POINTS; i++) take(lowMm + ((highMm - lowMm) * i) / SPREAD_POINTS)
    }
  }
  return found
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

/** Checks that can stop a spring and have no place in the search above; empty, or the search would be wrong. */
export function uncoveredChecks(): string[] {
  const covered = new Set([...CONSTANT_CHECKS, ...LEAST_DIAMETER_CHECKS, ...MOST_DIAMETER_CHECKS, rodCheck].map(c => c.code))
  covered.add('index')
  const neverStop = new Set(['resonance', 'peening', 'surroundings'])
  return COMPRESSION_CHECKS.map(c => c.code).filter(code => !covered.has(code) && !neverStop.has(code))
}
