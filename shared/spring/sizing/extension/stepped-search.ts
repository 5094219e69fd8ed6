import { passesExtensionStopChecks } from '../../mechanics/extension/checks'
import { hookLengthMm, hookWireMm } from '../../mechanics/extension/hooks'
import type { ExtensionModel } from '../../mechanics/extension/model'
import { extensionWireLengthMm, greatestExtensionForceN, type ExtensionState } from '../../mechanics/extension/state'
import { minimiseBounded } from '../bounded-minimum'
import type { WireGoal, WireSpring } from '../kind-search'
import { leastThatHolds } from '../numeric-search'
import { stepped, type Steps } from '../steps'
import { couldPass, type DiameterRange } from './bounds'
import { coilsOfLength, exactBodyCoils, fewestBodyCoils, fillExtension, mostBodyCoils, stiffness } from './geometry'
import type { ExtensionTravel } from './travel'

/** `any`: the first that passes, whichever it is. */
export type ExtensionGoal = WireGoal | 'any'

const EDGE = 1e-9
/** Of a diameter, far below what can be wound. */
export const LEAST_WIDTH = 1e-8

export const springOf = (state: ExtensionState): WireSpring =>
  ({ meanDiameterMm: state.meanDiameterMm, activeCoils: state.activeCoils, totalCoils: state.bodyCoils, freeLengthMm: state.freeLengthMm })

/**
 * Springs of the wire in whole steps that pass every stop check: all of them, the best for the goal, or the first. With both
 * coils and diameter in steps every pair is looked at that meets the request within the tolerance of the steps; one load
 * alone leaves so many that each diameter gives its spring of fewest coils only, the lightest and least costly of it (should
 * that fail, so do all with more, see wire-search.ts). Of springs equal for the goal the one of the smaller diameter is taken, and
 * of these the one of fewer coils.
 */
export function searchStepped(model: ExtensionModel, state: ExtensionState, travel: ExtensionTravel, goal: ExtensionGoal, steps: Steps, range: DiameterRange): WireSpring[] {
  const found = new Collector(model, state, travel, goal)
  if (Number.isNaN(steps.diameterStepMm)) searchCoilSteps(found, steps.coilStep, range)
  else searchDiameterSteps(found, steps, range)
  return found.springs
}

/** Keeps the best of the springs it is shown, or all of them. */
class Collector {
  readonly springs: WireSpring[] = []
  private least = Infinity

  constructor(readonly model: ExtensionModel, readonly state: ExtensionState, readonly travel: ExtensionTravel, readonly goal: ExtensionGoal) {}

  /** True where mass counts and no spring of this diameter with as many coils is lighter than the best. */
  isTooHeavy(D: number, bodyCoils: number): boolean {
    if (this.goal !== 'mass') return false
    const d = this.model.wireDiameterMm
    const form = this.model.hookForm
    return Math.PI * D * bodyCoils + 2 * hookWireMm(form, D, d, hookLengthMm(form, D, d)) > this.least * (1 + EDGE)
  }

  /** True where the search may end. */
  take(D: number, bodyCoils: number): boolean {
    const { model, state, goal } = this
    fillExtension(model, state, this.travel, D, bodyCoils)
    const value = goal === 'mass' ? extensionWireLengthMm(model, state) : goal === 'stress' ? loadedForceN(state) * D : 0
    if ((goal === 'mass' || goal === 'stress') && !this.isBetter(value, D, bodyCoils)) return false
    if (!passesExtensionStopChecks(model, state)) return false
    if (goal === 'every') this.springs.push(springOf(state))
    else this.springs[0] = springOf(state)
    this.least = value
    return goal === 'any'
  }

  private isBetter(value: number, D: number, bodyCoils: number): boolean {
    const [best] = this.springs
    if (!best || value < this.least * (1 - EDGE)) return true
    return value <= this.least && (D < best.meanDiameterMm || (D === best.meanDiameterMm && bodyCoils < best.totalCoils))
  }
}

/** The load a spring is judged by: the greatest asked, or the initial tension where none is. */
const loadedForceN = (state: ExtensionState) => (Number.isNaN(state.longestLengthMm) ? state.initialTensionN : greatestExtensionForceN(state))

function searchDiameterSteps(found: Collector, { coilStep, diameterStepMm }: Steps, { low, high }: DiameterRange): void {
  const { model, travel } = found
  for (let i = Math.ceil((low / diameterStepMm) * (1 - EDGE)); i <= (high / diameterStepMm) * (1 + EDGE); i++) {
    const D = stepped(i, diameterStepMm)
    const fewest = fewestBodyCoils(model, travel, D)
    const most = mostBodyCoils(model, travel, D)
    if (!couldPass(model, travel, D, D, fewest, most)) continue
    if (Number.isNaN(coilStep)) {
      if (found.take(D, exactBodyCoils(model, travel, D))) return
      continue
    }
    for (let j = Math.ceil((fewest / coilStep) * (1 - EDGE)); j <= (most / coilStep) * (1 + EDGE); j++) {
      const n = stepped(j, coilStep)
      if (found.isTooHeavy(D, n)) break
      if (found.take(D, n)) return
      if (travel.kind === 'one-load') break
    }
  }
}

// The diameter follows from the coils: by the rate, by the free length, or for one load as the least that passes.
function searchCoilSteps(found: Collector, coilStep: number, range: DiameterRange): void {
  const { model, travel } = found
  const fewest = fewestBodyCoils(model, travel, range.high)
  const most = mostBodyCoils(model, travel, range.low)
  for (let j = Math.ceil((fewest / coilStep) * (1 - EDGE)); j <= (most / coilStep) * (1 + EDGE); j++) {
    const n = stepped(j, coilStep)
    if (!couldPass(model, travel, range.low, range.high, n, n) || found.isTooHeavy(range.low, n)) continue
    const D = diameterOfCoils(found, n, range)
    if (!Number.isNaN(D) && couldPass(model, travel, D, D, Math.max(n, fewestBodyCoils(model, travel, D) * (1 - EDGE)), n) && found.take(D, n)) return
  }
}

function diameterOfCoils({ model, state, travel }: Collector, n: number, { low, high }: DiameterRange): number {
  switch (travel.kind) {
    case 'rate': case 'rate-and-length': return Math.cbrt(stiffness(model) / (travel.rateNPerMm * (n + model.hookCoils)))
    case 'free-length': return leastThatHolds(D => coilsOfLength(model, D, travel.freeLengthMm) <= n, low, high)
    // With the coils given, mass and stress rise with D: the least diameter that passes is both the lightest and the least stressed.
    case 'one-load': {
      const from = leastThatHolds(D => fewestBodyCoils(model, travel, D) <= n, low, high)
      return Number.isNaN(from) ? from : minimiseBounded({
        low: [from], high: [high],
        bound: ([a = 0], [b = 0]) => (couldPass(model, travel, a, b, n, n) ? a : Infinity),
        value: ([D = 0]) => (passesExtensionStopChecks(model, fillExtension(model, state, travel, D, n)) ? D : Infinity),
      }, { leastWidth: LEAST_WIDTH }).point?.[0] ?? Number.NaN
    }
  }
}
