import { passesTorsionStopChecks } from '../../mechanics/torsion/checks'
import type { TorsionCheck } from '../../mechanics/torsion/checks/check'
import { boreCheck, freeLengthCheck, leastInnerDiameterMm, rodCheck, solidLengthCheck } from '../../mechanics/torsion/checks/fit'
import { fatigueCheck, stressWorkingCheck } from '../../mechanics/torsion/checks/stress'
import { coilsCheck, orderCheck } from '../../mechanics/torsion/checks/travel'
import { legCoils, momentRateNmmPerDeg } from '../../mechanics/torsion/bending'
import type { TorsionModel } from '../../mechanics/torsion/model'
import { activeCoilsOf, fillTorsionState, torsionMassG, type TorsionState } from '../../mechanics/torsion/state'
import { INDEX_STEPS, MEAN_DIAMETER_STEPS_MM } from '../../mechanics/tolerances/mean-diameter'
import type { WireGoal, WireSpring } from '../kind-search'
import { greatestThatHolds, leastThatHolds } from '../numeric-search'
import { LEAST_INDEX, MOST_INDEX, STEP_TOLERANCE, forEachStep, isContinuous, stepped, type Steps } from '../steps'
import type { TorsionTravel } from './travel'

/*
 * The rate fixes D times the active coils, and the legs count as (l1 + l2)/(3 pi D): so D times the body coils is a constant K
 * of the wire, and with it the length of wire pi K + l1 + l2. Mass does not depend on D, and the bending stress before its
 * factor does not either. The body is wound up by the same share of the angle whatever D.
 *
 * So a wire's best spring is any that passes, and the tie is broken by ease: the index nearest to EASIEST_INDEX, the smaller of
 * two as near. Checks: the factor of the inner fibre falls with D, the body gets shorter with D (few D fail: order, stress,
 * life, lengths); coils fall and the outside grows with D (many fail: coils, bore, opened or not). D K/(K + turns D), the
 * mean diameter wound up, rises with D; the rod alone has gaps, where the diameter tolerance steps up.
 */

/** Index that coils easiest (6 to 12 are usual; common practice, no source). */
export const EASIEST_INDEX = 8

const LEAST_DIAMETER_CHECKS: readonly TorsionCheck[] = [orderCheck, stressWorkingCheck, fatigueCheck, freeLengthCheck, solidLengthCheck]
const MOST_DIAMETER_CHECKS: readonly TorsionCheck[] = [coilsCheck, boreCheck]

/** D times the body coils for the asked rate, mm. */
export function bodyConstantMm(model: TorsionModel, travel: TorsionTravel): number {
  const active = momentRateNmmPerDeg(model.method, model.youngsModulusMpa, model.wireDiameterMm, 1, 1) / travel.rateNmmPerDeg
  return active - legCoils(model.legsLengthMm, 1)
}

function fillAtDiameter(model: TorsionModel, state: TorsionState, bodyConstant: number, D: number): TorsionState {
  const body = bodyConstant / D
  return fillTorsionState(state, model, D, body, activeCoilsOf(model, D, body))
}

function allHold(checks: readonly TorsionCheck[], model: TorsionModel, state: TorsionState): boolean {
  for (const check of checks) {
    if (check.applies(model, state) && check.stops(model, state)) return false
  }
  return true
}

interface Interval {
  readonly lowMm: number
  readonly highMm: number
}

/** Mean diameters at which the wire gives a spring that passes every stop check; empty where there is none. */
export function feasibleTorsionDiameters(model: TorsionModel, state: TorsionState, travel: TorsionTravel): Interval[] {
  const d = model.wireDiameterMm
  const K = bodyConstantMm(model, travel)
  if (!(K > 0)) return []
  const at = (D: number) => fillAtDiameter(model, state, K, D)
  let low = LEAST_INDEX * d
  let high = MOST_INDEX * d
  low = leastThatHolds(D => allHold(LEAST_DIAMETER_CHECKS, model, at(D)), low, high)
  if (Number.isNaN(low)) return []
  high = greatestThatHolds(D => allHold(MOST_DIAMETER_CHECKS, model, at(D)), low, high)
  if (Number.isNaN(high)) return []
  const pieces = Number.isNaN(model.rodMm) ? [{ lowMm: low, highMm: high }] : piecesOverRod(model, state, K, low, high)
  // What is left, wire and heat, does not depend on D.
  return pieces.filter(({ highMm }) => passesTorsionStopChecks(model, at(highMm)))
}

// Between two steps of the tolerance table the inside diameter rises with D, so the rod asks for one least diameter there.
function piecesOverRod(model: TorsionModel, state: TorsionState, K: number, low: number, high: number): Interval[] {
  const steps = [...MEAN_DIAMETER_STEPS_MM, ...INDEX_STEPS.map(w => w * model.wireDiameterMm)].filter(D => D > low && D < high).sort((a, b) => a - b)
  const pieces: Interval[] = []
  let from = low
  for (const to of [...steps, high]) {
    // The tolerance at a step is still that of the row below it; just above a step it is the next row's.
    const start = from === low ? from : from * (1 + 1e-12)
    const least = leastThatHolds(D => !rodCheck.stops(model, fillAtDiameter(model, state, K, D)), start, to)
    if (!Number.isNaN(least)) pieces.push({ lowMm: least, highMm: to })
    from = to
  }
  return pieces
}

const ease = (d: number, D: number) => Math.abs(D / d - EASIEST_INDEX)

/** The place of the intervals with the easiest index. */
function easiest(d: number, intervals: readonly Interval[]): number | null {
  let best: number | null = null
  for (const { lowMm, highMm } of intervals) {
    const D = Math.min(highMm, Math.max(lowMm, EASIEST_INDEX * d))
    if (best === null || ease(d, D) < ease(d, best)) best = D
  }
  return best
}

/** Springs of the wire for the goal; every one passes every stop check. Mass and stress have the same best spring. */
export function searchTorsionWire(model: TorsionModel, state: TorsionState, travel: TorsionTravel, goal: WireGoal, steps: Steps): WireSpring[] {
  const d = model.wireDiameterMm
  const K = bodyConstantMm(model, travel)
  if (isContinuous(steps)) {
    const D = easiest(d, feasibleTorsionDiameters(model, state, travel))
    return D === null ? [] : [springOf(fillAtDiameter(model, state, K, D))]
  }
  if (!(K > 0)) return []
  const every: WireSpring[] = []
  let best: WireSpring | null = null
  let leastValue = Infinity
  let leastEase = Infinity
  const take = (D: number, body: number) => {
    if (!fillStepped(model, state, travel, D, body)) return
    const spring = springOf(state)
    if (goal === 'every') {
      every.push(spring)
      return
    }
    // In steps the wire differs a little from spring to spring; equal to nine figures counts as a tie.
    const value = goal === 'mass' ? torsionMassG(model, state) : state.rateNmmPerDeg * state.greatestAngleDeg
    const isLess = value < leastValue * (1 - 1e-9)
    if (isLess || (value <= leastValue * (1 + 1e-9) && ease(d, D) < leastEase)) {
      leastValue = Math.min(value, leastValue)
      leastEase = ease(d, D)
      best = spring
    }
  }
  forEachStepped(d, K, steps, take)
  return best ? [best] : every
}

function forEachStepped(d: number, K: number, { coilStep, diameterStepMm }: Steps, take: (D: number, body: number) => void): void {
  const low = LEAST_INDEX * d
  const high = MOST_INDEX * d
  if (Number.isNaN(diameterStepMm)) {
    forEachStep(K / high, K / low, coilStep, body => take(K / body, body))
    return
  }
  forEachStep(low, high, diameterStepMm, (D) => {
    if (Number.isNaN(coilStep)) {
      take(D, K / D)
      return
    }
    const below = Math.floor(K / D / coilStep + 1e-9)
    take(D, stepped(below, coilStep))
    take(D, stepped(below + 1, coilStep))
  })
}

/** Fills the state with a stepped spring, the moments' error shared; true where it is within the tolerance and passes. */
function fillStepped(model: TorsionModel, state: TorsionState, travel: TorsionTravel, D: number, body: number): boolean {
  if (!(body > 0)) return false
  fillTorsionState(state, model, D, body, activeCoilsOf(model, D, body))
  const { angles, error } = travel.anglesAt(state.rateNmmPerDeg)
  if (error > STEP_TOLERANCE) return false
  state.greatestAngleDeg = angles[angles.length - 1] ?? Number.NaN
  state.leastAngleDeg = angles.length > 1 ? angles[0] ?? Number.NaN : Number.NaN
  return passesTorsionStopChecks(model, state)
}

const springOf = (state: TorsionState): WireSpring => ({
  meanDiameterMm: state.meanDiameterMm, activeCoils: state.activeCoils, totalCoils: state.bodyCoils, freeLengthMm: 0,
})

/** Inside diameter at its least, for tests of the rod's gaps. */
export { leastInnerDiameterMm }
