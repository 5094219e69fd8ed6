import { passesTorsionStopChecks } from '../../mechanics/torsion/checks'
import type { TorsionCheck } from '../../mechanics/torsion/checks/check'
import { boreCheck, freeLengthCheck, rodCheck, solidLengthCheck } from '../../mechanics/torsion/checks/fit'
import { fatigueCheck, stressWorkingCheck } from '../../mechanics/torsion/checks/stress'
import { coilsCheck, orderCheck } from '../../mechanics/torsion/checks/travel'
import { legCoils, momentRateNmmPerDeg } from '../../mechanics/torsion/bending'
import type { TorsionModel } from '../../mechanics/torsion/model'
import { activeCoilsOf, fillTorsionState, type TorsionState } from '../../mechanics/torsion/state'
import { INDEX_STEPS, MEAN_DIAMETER_STEPS_MM } from '../../mechanics/tolerances/mean-diameter'
import { greatestThatHolds, leastThatHolds } from '../numeric-search'
import { LEAST_INDEX, MOST_INDEX } from '../steps'
import { placeTravel, type TorsionTravel } from './travel'

/*
 * The rate fixes D times the active coils, and the legs count as (l1 + l2)/(3 pi D): so D times the body coils is a constant K
 * of the wire. Hence, whatever D, the wire is pi K + l1 + l2 long and the mass the same; the moments, and the stress before
 * its factor, are the same; and the body takes the same share of the angle, K/(K + (l1 + l2)/(3 pi)).
 *
 * Every stop check is then constant in D, or fails only below some D, or only above it, between two steps of the diameter
 * tolerance:
 * - Constant: wire, heat, points in order.
 * - Failing below: the factors q = (w + 0.07)/(w - 0.75) and Ki = (4w^2 - w - 1)/(4w (w - 1)) fall with w, and so do stress,
 *   amplitude and mean; the body d (K/D + 1 + turns) gets shorter; wound up, K D/(K + D turns) and with it the inside rises.
 * - Failing above: coils K/D fall below three, or below the turns by which the load opens them; the outside rises, opened
 *   K D/(K - D turns) too.
 * tests/unit/spring/torsion-monotone.test.ts tries each claim on random springs.
 */

/** Checks that a small D fails. */
export const SMALL_FAILS: readonly TorsionCheck[] = [stressWorkingCheck, fatigueCheck, freeLengthCheck, solidLengthCheck]
/** Checks that a large D fails. */
export const LARGE_FAILS: readonly TorsionCheck[] = [orderCheck, coilsCheck]
/** Checks that hold the diameter tolerance, which steps up with D and ends at 200 mm; small and large D fail them in turn. */
export const STEPPED_SMALL_FAILS = rodCheck
export const STEPPED_LARGE_FAILS = boreCheck

export interface DiameterInterval {
  readonly lowMm: number
  readonly highMm: number
}

/** D times the active coils for the asked rate, mm. */
export function activeConstantMm(model: TorsionModel, rateNmmPerDeg: number): number {
  return momentRateNmmPerDeg(model.method, model.youngsModulusMpa, model.wireDiameterMm, 1, 1) / rateNmmPerDeg
}

/** D times the body coils for the asked rate, mm: K; nought or less where the legs alone are too soft. */
export function bodyConstantMm(model: TorsionModel, rateNmmPerDeg: number): number {
  return activeConstantMm(model, rateNmmPerDeg) - legCoils(model.legsLengthMm, 1)
}

/** Fills the state with a spring and the places of the asked points. */
export function fillTorsion(model: TorsionModel, state: TorsionState, travel: TorsionTravel, D: number, bodyCoils: number): TorsionState {
  fillTorsionState(state, model, D, bodyCoils, activeCoilsOf(model, D, bodyCoils))
  placeTravel(travel, state)
  return state
}

export function allHold(checks: readonly TorsionCheck[], model: TorsionModel, state: TorsionState): boolean {
  for (const check of checks) {
    if (check.applies(model, state) && check.stops(model, state)) return false
  }
  return true
}

const holds = (check: TorsionCheck, model: TorsionModel, state: TorsionState) => !check.applies(model, state) || !check.stops(model, state)

/** Mean diameters at which the wire gives a spring that passes every stop check, in rising order; empty where there is none. */
export function feasibleTorsionDiameters(model: TorsionModel, state: TorsionState, travel: TorsionTravel): DiameterInterval[] {
  const d = model.wireDiameterMm
  const K = bodyConstantMm(model, travel.rateNmmPerDeg)
  if (!(K > 0)) return []
  const at = (D: number) => fillTorsion(model, state, travel, D, K / D)
  const isSmallEnough = (D: number) => allHold(LARGE_FAILS, model, at(D))
  const isLargeEnough = (D: number) => allHold(SMALL_FAILS, model, at(D))
  if (!isSmallEnough(LEAST_INDEX * d)) return []
  const low = leastThatHolds(isLargeEnough, LEAST_INDEX * d, MOST_INDEX * d)
  if (Number.isNaN(low)) return []
  const high = greatestThatHolds(isSmallEnough, low, MOST_INDEX * d)
  if (Number.isNaN(high)) return []
  const hasFit = !Number.isNaN(model.rodMm) || !Number.isNaN(model.boreMm)
  const intervals = hasFit ? intervalsThatFit(model, at, low, high) : [{ lowMm: low, highMm: high }]
  return intervals.filter(({ highMm }) => passesTorsionStopChecks(model, at(highMm)))
}

const HAIR = 1e-12

// Between two steps the tolerance is constant, so the rod asks for one least diameter there and the bore for one greatest.
function intervalsThatFit(model: TorsionModel, at: (D: number) => TorsionState, low: number, high: number): DiameterInterval[] {
  const steps = [...MEAN_DIAMETER_STEPS_MM, ...INDEX_STEPS.map(w => w * model.wireDiameterMm)].filter(D => D > low && D < high).sort((a, b) => a - b)
  const intervals: DiameterInterval[] = []
  const ends = [...steps, high]
  let from = low
  for (const to of ends) {
    // A hair inside: on the step itself rounding decides which tolerance counts.
    const start = from === low ? low : from * (1 + HAIR)
    const end = to === high ? high : to * (1 - HAIR)
    from = to
    if (!(start <= end)) continue
    const least = leastThatHolds(D => holds(STEPPED_SMALL_FAILS, model, at(D)), start, end)
    if (Number.isNaN(least)) continue
    const most = greatestThatHolds(D => holds(STEPPED_LARGE_FAILS, model, at(D)), least, end)
    if (!Number.isNaN(most)) intervals.push({ lowMm: least, highMm: most })
  }
  return intervals
}
