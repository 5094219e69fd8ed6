import { passesExtensionStopChecks } from '../../mechanics/extension/checks'
import type { ExtensionModel } from '../../mechanics/extension/model'
import { extensionMassG, type ExtensionState } from '../../mechanics/extension/state'
import { minimiseBounded } from '../bounded-minimum'
import type { WireGoal, WireSpring } from '../kind-search'
import { greatestThatHolds, leastThatHolds } from '../numeric-search'
import { LEAST_INDEX, MOST_INDEX, STEP_TOLERANCE, forEachStep, isContinuous, stepped, type Steps } from '../steps'
import { carriesAt, couldPass, leastMassG } from './bounds'
import { LEAST_BODY_COILS, bodyCoilsAt, fillExtension, steppedAnchorN, stiffness, type ExtensionTravel } from './geometry'

/*
 * Where the request fixes rate or free length the mean diameter D is the only unknown: it gives the coils, these the other of
 * the two, and the initial tension follows from one load. The checks of the greatest load only rise with D and are cut off
 * by bisection; the initial tension may pass in several ranges of D, so the rest is searched with bounds (see bounds.ts).
 *
 * One load alone leaves D and the coils. At a given D the tension F - R (L - L0) rises with the coils, since R and L - L0
 * fall; mass rises too. So of each D the fewest coils with a tension of nought or more are taken, and D is searched.
 */
const anchorWithin = 1 + 1e-12

/** The least D at which the wire could be wound and the greatest that carries the load; null where none does. */
function diameterRange(model: ExtensionModel, state: ExtensionState, travel: ExtensionTravel, greatestN: number): { low: number, high: number } | null {
  const d = model.wireDiameterMm
  const low = LEAST_INDEX * d
  const high = greatestThatHolds(D => carriesAt(model, state, travel, greatestN, D), low, MOST_INDEX * d)
  return Number.isNaN(high) ? null : { low, high }
}

/** Fewest body coils that leave a tension of nought or more at a diameter, for one load; NaN where none do. */
function fewestCoils(model: ExtensionModel, travel: ExtensionTravel, state: ExtensionState, meanDiameterMm: number): number {
  const most = travel.anchor.lengthMm / model.wireDiameterMm
  return leastThatHolds(n => fillExtension(model, state, travel, meanDiameterMm, n).initialTensionN >= 0, LEAST_BODY_COILS, Math.max(most, LEAST_BODY_COILS))
}

const coilsAt = (model: ExtensionModel, travel: ExtensionTravel, state: ExtensionState, D: number): number =>
  travel.kind === 'one-load' ? fewestCoils(model, travel, state, D) : bodyCoilsAt(model, travel, D)

function boundBetween(model: ExtensionModel, state: ExtensionState, travel: ExtensionTravel, a: number, b: number): number {
  const fewest = coilsAt(model, travel, state, b)
  if (Number.isNaN(fewest)) return Infinity
  const most = travel.kind === 'one-load' ? travel.anchor.lengthMm / model.wireDiameterMm : bodyCoilsAt(model, travel, a)
  const box = { a, b, fewest, most }
  return couldPass(model, travel, box) ? leastMassG(model, travel, box) : Infinity
}

/** A mass below which no spring of the wire lies, g; steps may lessen coils by their tolerance, so a wide share is taken off. */
export function leastExtensionMassG(model: ExtensionModel, state: ExtensionState, travel: ExtensionTravel, steps: Steps): number {
  const d = model.wireDiameterMm
  const loose = isContinuous(steps) ? travel : stiffestStepped(travel)
  return leastMassG(model, loose, { a: LEAST_INDEX * d, b: MOST_INDEX * d, fewest: LEAST_BODY_COILS, most: Infinity })
}

// The stiffest rate that steps may leave: between two loads it may be off by (F1 + F2)/(F2 - F1) of the tolerance.
function stiffestStepped(travel: ExtensionTravel): ExtensionTravel {
  if (travel.kind !== 'rate') return travel
  const [first, second] = travel.points
  const spread = first && second ? (first.forceN + second.forceN) / (second.forceN - first.forceN) : 1
  return { ...travel, rateNPerMm: travel.rateNPerMm * (1 + STEP_TOLERANCE * spread) }
}

function searchContinuous(model: ExtensionModel, state: ExtensionState, travel: ExtensionTravel, goal: WireGoal, range: { low: number, high: number }): number | null {
  const byStress = goal === 'stress'
  const { point } = minimiseBounded({
    low: [range.low], high: [range.high],
    bound: ([a = 0], [b = 0]) => {
      const bound = boundBetween(model, state, travel, a, b)
      // At the one greatest load the stress rises with D.
      return byStress && bound < Infinity ? a : bound
    },
    value: ([D = 0]) => {
      const n = coilsAt(model, travel, state, D)
      if (!(n >= LEAST_BODY_COILS * (1 - 1e-9))) return Infinity
      if (!passesExtensionStopChecks(model, fillExtension(model, state, travel, D, n))) return Infinity
      return byStress ? D : extensionMassG(model, state)
    },
  }, { leastWidth: 1e-8 })
  return point?.[0] ?? null
}

/** Springs of the wire for the goal; every one passes every stop check. In steps all of them are looked at. */
export function searchExtensionWire(model: ExtensionModel, state: ExtensionState, travel: ExtensionTravel, goal: WireGoal, steps: Steps): WireSpring[] {
  const greatest = travel.points[travel.points.length - 1]?.forceN ?? travel.anchor.forceN
  if (isContinuous(steps)) {
    const range = diameterRange(model, state, travel, greatest)
    const D = range && searchContinuous(model, state, travel, goal, range)
    if (D === null) return []
    fillExtension(model, state, travel, D, coilsAt(model, travel, state, D))
    return [springOf(state)]
  }
  // Steps may lessen the greatest load by their tolerance, so the range is searched a little wider.
  const range = diameterRange(model, state, travel, greatest * (1 - STEP_TOLERANCE))
  if (!range) return []
  const every: WireSpring[] = []
  let best: WireSpring | null = null
  let least = Infinity
  forEachStepped(model, state, travel, steps, range, (D, n) => {
    if (!fillStepped(model, state, travel, D, n)) return
    const value = goal === 'mass' ? extensionMassG(model, state) : D
    if (goal === 'every') every.push(springOf(state))
    else if (value < least) {
      least = value
      best = springOf(state)
    }
  })
  return best ? [best] : every
}

const springOf = (state: ExtensionState): WireSpring =>
  ({ meanDiameterMm: state.meanDiameterMm, activeCoils: state.activeCoils, totalCoils: state.bodyCoils, freeLengthMm: state.freeLengthMm })

/** Fills the state with a stepped spring, its tension so that the error of the loads is shared; true where it passes. */
export function fillStepped(model: ExtensionModel, state: ExtensionState, travel: ExtensionTravel, D: number, n: number): boolean {
  if (n < LEAST_BODY_COILS) return false
  const rate = stiffness(model) / (D * D * D * (n + model.hookCoils))
  const { forceN, error } = steppedAnchorN(travel, rate)
  if (error > STEP_TOLERANCE * anchorWithin) return false
  fillExtension(model, state, travel, D, n, forceN)
  if (travel.kind === 'free-length' && Math.abs(state.freeLengthMm / travel.freeLengthMm - 1) > STEP_TOLERANCE) return false
  return passesExtensionStopChecks(model, state)
}

function forEachStepped(
  model: ExtensionModel, state: ExtensionState, travel: ExtensionTravel, { coilStep, diameterStepMm }: Steps, { low, high }: { low: number, high: number },
  visit: (D: number, n: number) => void,
): void {
  if (Number.isNaN(diameterStepMm)) {
    forEachCoilStep(model, state, travel, coilStep, { low, high }, visit)
    return
  }
  forEachStep(low, high, diameterStepMm, (D) => {
    const exact = coilsAt(model, travel, state, D)
    if (Number.isNaN(exact)) return
    if (Number.isNaN(coilStep)) {
      visit(D, exact)
      return
    }
    const below = Math.floor(exact / coilStep + 1e-9)
    if (travel.kind !== 'one-load') visit(D, stepped(below, coilStep))
    visit(D, stepped(travel.kind === 'one-load' ? Math.ceil(exact / coilStep - 1e-9) : below + 1, coilStep))
  })
}

// Coils in steps and D as it must be: coils fall as D rises, so the diameter of a count is found by bisection.
function forEachCoilStep(
  model: ExtensionModel, state: ExtensionState, travel: ExtensionTravel, coilStep: number, { low, high }: { low: number, high: number },
  visit: (D: number, n: number) => void,
): void {
  const most = coilsAt(model, travel, state, low)
  const fewest = coilsAt(model, travel, state, high)
  const from = Number.isNaN(fewest) ? LEAST_BODY_COILS : Math.max(LEAST_BODY_COILS, fewest)
  forEachStep(from, Number.isNaN(most) ? travel.anchor.lengthMm / model.wireDiameterMm : most, coilStep, (n) => {
    const D = leastThatHolds(x => coilsAt(model, travel, state, x) <= n, low, high)
    if (!Number.isNaN(D)) visit(D, n)
  })
}
