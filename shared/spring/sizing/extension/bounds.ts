import { temperatureCheck } from '../../mechanics/checks/place'
import { wireRangeCheck } from '../../mechanics/checks/wire'
import type { ExtensionCheck } from '../../mechanics/extension/checks/check'
import { fatigueCheck } from '../../mechanics/extension/checks/life'
import { hookBendCheck, hookBendingCheck, hookTorsionCheck, stressWorkingCheck } from '../../mechanics/extension/checks/stress'
import { hookLengthMm, hookWireMm } from '../../mechanics/extension/hooks'
import { greatestInitialStressMpa } from '../../mechanics/extension/initial-tension'
import type { ExtensionModel } from '../../mechanics/extension/model'
import { fillExtensionState, type ExtensionState } from '../../mechanics/extension/state'
import { shearStressMpa } from '../../mechanics/stress'
import { MOST_MEAN_DIAMETER_MM, meanDiameterToleranceMm } from '../../mechanics/tolerances/mean-diameter'
import { wireMassG } from '../../mechanics/wire-length'
import { greatestThatHolds } from '../numeric-search'
import { LEAST_INDEX, MOST_INDEX } from '../steps'
import { LEAST_BODY_COILS, fewestBodyCoils, mostBodyCoils, stiffness, usualFreeLengthMm } from './geometry'
import type { ExtensionTravel } from './travel'

/*
 * Why the search misses nothing. Every stop check has its place here:
 * - `wire-range`, `temperature` and `hook-bend` do not change with coils, nor in a way that helps with the diameter.
 * - `stress-working`, `stress-hook-bending`, `stress-hook-torsion` and `fatigue` rise with D at a given load, whatever the coils:
 *   K(C) C rises for every factor used from an index of 3.3 (bends of a given radius: D alone), and both mean and amplitude
 *   are in proportion to it. One bisection finds the D beyond which they fail (`diameterRange`).
 * - `index`, `coils`, `order`, `initial-tension`, `bore`, `rod`, `free-length` and `solid-length` may each fail on either side of what
 *   passes. They are bounded over a box of diameters and coils (`couldPass`), never above what some spring in it has, and the
 *   bounds close as the box does.
 * tests/unit/spring/extension-bounds.test.ts tries each claim on random springs.
 */

// Wider than the slack of the checks, so that rounding leaves no spring out that passes.
const SLACK = 2e-9

/** Checks that fail beyond some diameter, whatever the coils, or do not know it. */
export const RISING_CHECKS: readonly ExtensionCheck[] = [wireRangeCheck, temperatureCheck, hookBendCheck, stressWorkingCheck, hookBendingCheck, hookTorsionCheck, fatigueCheck]

/**
 * False where diameter D is too large for the loads, whatever the coils; true without a load, unless wire or heat stop it.
 * Steps may lessen the second load and raise the first by their tolerance, and that is easiest: the use of the fatigue
 * strength, amplitude/Se + mean/Su, grows with the error e as (F1 + F2)/Se + (F2 - F1)/Su.
 */
export function carriesAt(model: ExtensionModel, state: ExtensionState, travel: ExtensionTravel, meanDiameterMm: number): boolean {
  const { longestLengthMm, shortestLengthMm } = state
  const greatestN = travel.greatestForceN * (1 - travel.loadTolerance)
  // The greatest load is put on the state as its tension, at its longest length as its free one.
  fillExtensionState(state, model, meanDiameterMm, LEAST_BODY_COILS, LEAST_BODY_COILS + model.hookCoils, longestLengthMm, greatestN)
  if (!Number.isNaN(shortestLengthMm)) state.rateNPerMm = (greatestN - travel.forceN * (1 + travel.loadTolerance)) / (longestLengthMm - shortestLengthMm)
  for (const check of RISING_CHECKS) {
    if (check.applies(model, state) && check.stops(model, state)) return false
  }
  return true
}

export interface DiameterRange {
  readonly low: number
  readonly high: number
}

/** Mean diameters outside which no spring of the wire passes, by what needs no search; null where none does anywhere. */
export function possibleDiameters(model: ExtensionModel, travel: ExtensionTravel): DiameterRange | null {
  const d = model.wireDiameterMm
  let low = LEAST_INDEX * d
  let high = MOST_INDEX * d
  // Of bore and rod only the bare wire is asked here.
  if (model.rodMm + d > low) low = (model.rodMm + d) * (1 - SLACK)
  if (model.boreMm - d < high) high = (model.boreMm - d) * (1 + SLACK)
  if (!Number.isNaN(travel.rateNPerMm)) {
    // The stiffest rate has the fewest coils, which fall with D; a body under three coils, or longer than the space for it, is no use.
    const perCoil = stiffness(model) / travel.rateNPerMm
    const most = longestBodyMm(model, travel, low) / d - 1
    if (most < LEAST_BODY_COILS) return null
    low = Math.max(low, Math.cbrt(perCoil / (1 + travel.rateTolerance) / (most + model.hookCoils)) * (1 - SLACK))
    high = Math.min(high, Math.cbrt(perCoil / (1 - travel.rateTolerance) / (LEAST_BODY_COILS + model.hookCoils)) * (1 + SLACK))
  }
  if (!(low <= high)) return null
  return couldPass(model, travel, low, high, fewestBodyCoils(model, travel, high), mostBodyCoils(model, travel, low)) ? { low, high } : null
}

/** The same, cut off where the loads become too great for the diameter. */
export function diameterRange(model: ExtensionModel, state: ExtensionState, travel: ExtensionTravel): DiameterRange | null {
  const possible = possibleDiameters(model, travel)
  if (!possible) return null
  const high = greatestThatHolds(D => carriesAt(model, state, travel, D), possible.low, possible.high)
  return Number.isNaN(high) ? null : { low: possible.low, high }
}

// No body is longer than this, mm, beside hooks at least as long as those of diameter D.
function longestBodyMm(model: ExtensionModel, travel: ExtensionTravel, D: number): number {
  let free = Infinity
  if (travel.lengthMm < free) free = travel.lengthMm
  if (model.maxFreeLengthMm < free) free = model.maxFreeLengthMm
  const body = (free - 2 * hookLengthMm(model.hookForm, D, model.wireDiameterMm)) * (1 + SLACK)
  return model.maxSolidLengthMm < body ? model.maxSolidLengthMm * (1 + SLACK) : body
}

/** The least diameter tolerance between two mean diameters, mm: it steps up with D, ends at 200 mm and is counted as none outside its table. */
function leastToleranceMm(model: ExtensionModel, a: number, b: number): number {
  const atA = meanDiameterToleranceMm(a, a / model.wireDiameterMm, model.grade)
  return b > MOST_MEAN_DIAMETER_MM || Number.isNaN(atA) ? 0 : atA
}

/**
 * False where no spring passes whose mean diameter is between a and b and whose body coils are between the fewest and the most. Free
 * length lies between that of (a, fewest) and that of (b, most), the rate between that of (b, most) and that of (a, fewest), and
 * the initial tension F - R (L - L0) between what these leave.
 */
export function couldPass(model: ExtensionModel, travel: ExtensionTravel, a: number, b: number, fewest: number, most: number): boolean {
  if (!(most >= fewest * (1 - SLACK)) || most < LEAST_BODY_COILS * (1 - SLACK)) return false
  const d = model.wireDiameterMm
  if ((fewest + 1) * d > model.maxSolidLengthMm * (1 + SLACK)) return false
  const shortest = usualFreeLengthMm(model, a, fewest)
  if (shortest > travel.lengthMm * (1 + SLACK) || shortest > model.maxFreeLengthMm * (1 + SLACK)) return false
  if (!Number.isNaN(model.boreMm) || !Number.isNaN(model.rodMm)) {
    const tolerance = leastToleranceMm(model, a, b)
    if (a + d + tolerance > model.boreMm * (1 + SLACK) || b - d - tolerance < model.rodMm * (1 - SLACK)) return false
  }
  const F = travel.forceN
  if (Number.isNaN(F)) return true
  const stiff = stiffness(model)
  const slow = stiff / (b * b * b * (most + model.hookCoils))
  const stiffest = stiff / (a * a * a * (fewest + model.hookCoils))
  const longest = usualFreeLengthMm(model, b, most)
  const mostTension = F * (1 + travel.loadTolerance) - slow * Math.max(0, travel.lengthMm - longest)
  if (mostTension < -SLACK * travel.greatestForceN) return false
  const leastTension = F * (1 - travel.loadTolerance) - stiffest * Math.max(0, travel.lengthMm - shortest)
  return shearStressMpa(Math.max(0, leastTension), a, d) <= greatestInitialStressMpa(a / d) * (1 + SLACK)
}

/**
 * A mass below which no spring lies whose mean diameter is between a and b and whose body has at least the fewest coils, g. With a
 * rate D Nb = G d^4/(8 R D^2) - D G/E falls as D rises, so it is least at b; else D Nb is least at a.
 */
export function leastMassG(model: ExtensionModel, travel: ExtensionTravel, a: number, b: number, fewest: number): number {
  const d = model.wireDiameterMm
  let bodyMm = a * Math.max(fewest, LEAST_BODY_COILS)
  if (!Number.isNaN(travel.rateNPerMm)) {
    bodyMm = Math.max(bodyMm, stiffness(model) / (b * b * travel.rateNPerMm * (1 + travel.rateTolerance)) - model.hookCoils * b)
  }
  return wireMassG(d, Math.PI * bodyMm + 2 * hookWireMm(model.hookForm, a, d, hookLengthMm(model.hookForm, a, d)), model.densityKgPerM3)
}

/** A mass below which no passing spring of the wire lies, g; Infinity where none can pass. */
export function leastWireMassG(model: ExtensionModel, travel: ExtensionTravel): number {
  const possible = possibleDiameters(model, travel)
  return possible ? leastMassG(model, travel, possible.low, possible.high, fewestBodyCoils(model, travel, possible.high)) : Infinity
}
