import { passesTorsionStopChecks } from '../../mechanics/torsion/checks'
import { fatigueCheck, stressWorkingCheck } from '../../mechanics/torsion/checks/stress'
import { LEAST_BODY_COILS } from '../../mechanics/torsion/checks/travel'
import { legCoils } from '../../mechanics/torsion/bending'
import type { TorsionModel } from '../../mechanics/torsion/model'
import { fillTorsionState, greatestMomentNmm, torsionMassG, torsionWireLengthMm, type TorsionState } from '../../mechanics/torsion/state'
import type { WireGoal, WireSpring } from '../kind-search'
import { leastThatHolds } from '../numeric-search'
import { LEAST_INDEX, MOST_INDEX, STEP_TOLERANCE, isContinuous, stepped, type Steps } from '../steps'
import { activeConstantMm, allHold, bodyConstantMm, feasibleTorsionDiameters, fillTorsion } from './diameters'
import type { TorsionTravel } from './travel'

/**
 * Index that coils easiest (6 to 12 are usual; common practice, no source). All springs of a wire that have the asked rate are
 * equal in mass and in bending stress (see diameters.ts), so the tie is broken by the index nearest to this one, and of two
 * as near by the smaller diameter.
 */
export const EASIEST_INDEX = 8

/** `any`: the first that passes, whichever it is. */
export type TorsionGoal = WireGoal | 'any'

const ease = (d: number, D: number) => Math.abs(D / d - EASIEST_INDEX)

const springOf = (state: TorsionState): WireSpring => ({
  meanDiameterMm: state.meanDiameterMm, activeCoils: state.activeCoils, totalCoils: state.bodyCoils, freeLengthMm: 0,
})

/** Springs of the wire for the goal; every one passes every stop check. In steps with the goal `every`, all there are. */
export function searchTorsionWire(model: TorsionModel, state: TorsionState, travel: TorsionTravel, goal: TorsionGoal, steps: Steps): WireSpring[] {
  const K = bodyConstantMm(model, travel.rateNmmPerDeg)
  if (isContinuous(steps)) {
    const D = easiestDiameter(model, state, travel, K)
    return Number.isNaN(D) ? [] : [springOf(fillTorsion(model, state, travel, D, K / D))]
  }
  const found = new Collector(model, state, travel, goal)
  if (Number.isNaN(steps.coilStep) || Number.isNaN(steps.diameterStepMm)) searchOneStepped(found, steps, K)
  else searchBothStepped(found, steps)
  return found.springs
}

// Most wires pass, if at all, at the easiest index; only else are the ends of the range looked for.
function easiestDiameter(model: TorsionModel, state: TorsionState, travel: TorsionTravel, K: number): number {
  const d = model.wireDiameterMm
  const easy = EASIEST_INDEX * d
  if (!(K > 0)) return Number.NaN
  if (passesTorsionStopChecks(model, fillTorsion(model, state, travel, easy, K / easy))) return easy
  let best = Number.NaN
  for (const { lowMm, highMm } of feasibleTorsionDiameters(model, state, travel)) {
    const D = Math.min(highMm, Math.max(lowMm, easy))
    if (Number.isNaN(best) || ease(d, D) < ease(d, best)) best = D
  }
  return best
}

// Values equal to nine figures are a tie: rounding must not decide.
const TIE = 1e-9

/** Keeps the best of the springs it is shown, or all of them. */
class Collector {
  readonly springs: WireSpring[] = []
  private leastValue = Infinity
  private leastEase = Infinity
  private leastLengthMm = Infinity

  constructor(readonly model: TorsionModel, readonly state: TorsionState, readonly travel: TorsionTravel, private readonly goal: TorsionGoal) {}

  /** True where a spring, and so any of the same diameter with more coils, is heavier than the best when mass counts. */
  isTooHeavy(D: number, bodyCoils: number): boolean {
    return this.goal === 'mass' && Math.PI * D * bodyCoils + this.model.legsLengthMm > this.leastLengthMm * (1 + TIE)
  }

  /** True where the search may end. */
  take(D: number, bodyCoils: number): boolean {
    if (!(bodyCoils > 0)) return false
    const { model, state, goal } = this
    fillTorsion(model, state, this.travel, D, bodyCoils)
    if (goal === 'every' || goal === 'any') {
      if (!passesTorsionStopChecks(model, state)) return false
      this.springs.push(springOf(state))
      return goal === 'any'
    }
    const value = goal === 'mass' ? torsionMassG(model, state) : greatestMomentNmm(state)
    const easy = ease(model.wireDiameterMm, D)
    const isLess = value < this.leastValue * (1 - TIE)
    if (!isLess && !(value <= this.leastValue * (1 + TIE) && easy < this.leastEase)) return false
    if (!passesTorsionStopChecks(model, state)) return false
    this.leastValue = isLess ? value : Math.min(value, this.leastValue)
    this.leastEase = easy
    this.leastLengthMm = Math.min(this.leastLengthMm, torsionWireLengthMm(model, state))
    this.springs[0] = springOf(state)
    return false
  }
}

const EDGE = 1e-9
const STRESS_FAILS = [stressWorkingCheck, fatigueCheck] as const

// With one of the two in steps the other makes the rate exact, so only steps within the feasible diameters can pass.
function searchOneStepped(found: Collector, { coilStep, diameterStepMm }: Steps, K: number): void {
  for (const { lowMm, highMm } of feasibleTorsionDiameters(found.model, found.state, found.travel)) {
    const isCoils = Number.isNaN(diameterStepMm)
    const step = isCoils ? coilStep : diameterStepMm
    const from = isCoils ? K / highMm : lowMm
    const to = isCoils ? K / lowMm : highMm
    const last = (to / step) * (1 + EDGE)
    for (let i = Math.ceil((from / step) * (1 - EDGE)); i <= last; i++) {
      const value = stepped(i, step)
      if (isCoils ? found.take(K / value, value) : found.take(value, K / value)) return
    }
  }
}

/** With both in steps every pair is looked at whose rate is within the tolerance: active coils A/(D (1 + t)) to A/(D (1 - t)). */
function searchBothStepped(found: Collector, { coilStep, diameterStepMm }: Steps): void {
  const { model, travel } = found
  const A = activeConstantMm(model, travel.rateNmmPerDeg)
  const legs = legCoils(model.legsLengthMm, 1)
  const most = A / (1 - travel.rateTolerance) - legs
  const fewest = A / (1 + travel.rateTolerance) - legs
  const { low, high } = steppedRange(found, { A, most, fewest })
  for (let i = Math.ceil((low / diameterStepMm) * (1 - EDGE)); i <= (high / diameterStepMm) * (1 + EDGE); i++) {
    const D = stepped(i, diameterStepMm)
    const last = (most / D / coilStep) * (1 + EDGE)
    for (let j = Math.max(1, Math.ceil((fewest / D / coilStep) * (1 - EDGE))); j <= last; j++) {
      const bodyCoils = stepped(j, coilStep)
      if (found.isTooHeavy(D, bodyCoils)) break
      if (found.take(D, bodyCoils)) return
    }
  }
}

/**
 * Mean diameters outside which no stepped spring passes (`low` NaN where none does anywhere): those at which the bare wire does
 * not go over the rod or into the bore; the most coils are fewer than asked; the fewest are longer than the body may be; or
 * the stress or the life fails even with the least greatest and the greatest least moment that steps allow, since their
 * factors fall with the index and the life with a wider swing.
 */
function steppedRange({ model, state, travel }: Collector, { A, most, fewest }: { readonly A: number, readonly most: number, readonly fewest: number }): { low: number, high: number } {
  const d = model.wireDiameterMm
  const rod = Number.isNaN(model.rodMm) ? 0 : model.rodMm + d
  const bore = Number.isNaN(model.boreMm) ? Infinity : model.boreMm - d
  const longest = Math.min(Number.isNaN(model.maxFreeLengthMm) ? Infinity : model.maxFreeLengthMm, Number.isNaN(model.maxSolidLengthMm) ? Infinity : model.maxSolidLengthMm)
  const mostRoom = longest / d - 1
  const from = Math.max(LEAST_INDEX * d, rod, mostRoom > 0 ? fewest / mostRoom : Infinity)
  const high = Math.min(MOST_INDEX * d, bore, most / LEAST_BODY_COILS)
  if (!(from <= high)) return { low: Number.NaN, high }
  const first = travel.points[0]?.momentNmm ?? 0
  const last = travel.points[travel.points.length - 1]?.momentNmm ?? 0
  const leastGreatest = (last * (1 - STEP_TOLERANCE)) / travel.rateNmmPerDeg
  const low = leastThatHolds((D) => {
    fillTorsionState(state, model, D, A / D, A / D)
    state.greatestAngleDeg = leastGreatest
    state.leastAngleDeg = travel.points.length > 1 ? Math.min((first * (1 + STEP_TOLERANCE)) / travel.rateNmmPerDeg, leastGreatest) : Number.NaN
    return allHold(STRESS_FAILS, model, state)
  }, from, high)
  return { low, high }
}
