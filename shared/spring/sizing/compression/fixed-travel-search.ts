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
import { totalCoilsFor } from '../../mechanics/compression/end-geometry'
import type { CompressionModel } from '../../mechanics/compression/model'
import { fillState, stateMassG, type CompressionState } from '../../mechanics/compression/state'
import { wireMassG } from '../../mechanics/wire-length'
import { INDEX_STEPS, MEAN_DIAMETER_STEPS_MM } from '../../mechanics/tolerances/mean-diameter'
import { minimiseBounded } from '../bounded-minimum'
import type { WireGoal, WireSpring } from '../kind-search'
import { greatestThatHolds, leastThatHolds, placeOfLeast } from '../numeric-search'
import { LEAST_INDEX, MOST_INDEX } from '../steps'
import { LEAST_ACTIVE_COILS, allHold } from './search-state'
import type { FixedTravel } from './travel'

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
  return fillState(state, model, meanDiameterMm, n, totalCoilsFor(model.ends, n), travel.freeLengthMm)
}

// Index, and the fewest coils: fewer than two are left only where D is larger.
function diameterBounds(model: CompressionModel, travel: FixedTravel): { low: number, high: number } {
  const d = model.wireDiameterMm
  const coilsBound = Math.cbrt((model.shearModulusMpa * d ** 4) / (8 * LEAST_ACTIVE_COILS * travel.rateNPerMm))
  return { low: LEAST_INDEX * d, high: Math.min(MOST_INDEX * d, coilsBound) }
}

/** Mean diameters at which the wire gives a spring that passes every stop check; empty where there is none. */
export function feasibleDiameters(model: CompressionModel, state: CompressionState, travel: FixedTravel): DiameterInterval[] {
  let { low, high } = diameterBounds(model, travel)
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
  return intervals.filter(({ highMm }) => !rodCheck.stops(model, fillAtDiameter(model, state, travel, highMm)))
}

/**
 * The spring of the wire that serves the goal best, or none; it passes every stop check.
 *
 * Mass: the wire is n sqrt((pi D)^2 + p^2) and (nt - n) pi D for the end coils. With n = c/D^3 the first part is
 * sqrt((pi c/D^2)^2 + (n p)^2). Where n p does not change with D (all ends but open and ground) it is the norm of a
 * convex falling function and a constant, so convex, and the end coils add a straight line: the sum has one valley, which
 * golden section finds to seven figures. For open and ground ends n p falls with D too, and a search with bounds is used:
 * between a and b the falling part is least at b, the rising one at a.
 *
 * Stress at a fixed load rises with D, with or without the factor for curvature (k w rises for w above 4).
 */
export function searchFixedTravel(model: CompressionModel, state: CompressionState, travel: FixedTravel, goal: WireGoal): WireSpring[] {
  let best: WireSpring | null = null
  let least = Infinity
  for (const { lowMm, highMm } of feasibleDiameters(model, state, travel)) {
    const D = goal === 'stress' ? lowMm : placeOfLeastMass(model, state, travel, lowMm, highMm)
    const spring = passingSpring(model, state, travel, D)
    if (!spring) continue
    if (goal === 'stress') return [spring]
    const mass = massAt(model, state, travel, spring.meanDiameterMm)
    if (mass < least) {
      least = mass
      best = spring
    }
  }
  return best ? [best] : []
}

const massAt = (model: CompressionModel, state: CompressionState, travel: FixedTravel, D: number): number =>
  stateMassG(model, fillAtDiameter(model, state, travel, D))

function placeOfLeastMass(model: CompressionModel, state: CompressionState, travel: FixedTravel, low: number, high: number): number {
  const mass = (D: number) => massAt(model, state, travel, D)
  if (model.ends !== 'open-ground') return placeOfLeast(mass, low, high)
  const endCoils = (D: number) => stateWireEndsG(model, fillAtDiameter(model, state, travel, D))
  const { point } = minimiseBounded({
    low: [low], high: [high],
    bound: ([a = low], [b = high]) => mass(b) - endCoils(b) + endCoils(a),
    value: ([D = low]) => mass(D),
  })
  return point?.[0] ?? low
}

// Mass of the coils that do not work, g: straight in D.
function stateWireEndsG(model: CompressionModel, state: CompressionState): number {
  return wireMassG(model.wireDiameterMm, (state.totalCoils - state.activeCoils) * Math.PI * state.meanDiameterMm, model.densityKgPerM3)
}

/** A mass below which no spring of the wire lies, g: the least over all indices, whether it passes or not. */
export function leastMassFixedG(model: CompressionModel, state: CompressionState, travel: FixedTravel): number {
  const d = model.wireDiameterMm
  return massAt(model, state, travel, placeOfLeastMass(model, state, travel, LEAST_INDEX * d, MOST_INDEX * d)) * (1 - 1e-4)
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
