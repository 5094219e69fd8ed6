import { passesExtensionStopChecks } from '../../mechanics/extension/checks'
import type { ExtensionModel } from '../../mechanics/extension/model'
import { extensionMassG, initialStressMpa, type ExtensionState } from '../../mechanics/extension/state'
import { minimiseBounded } from '../bounded-minimum'
import type { WireSpring } from '../kind-search'
import { greatestThatHolds, leastThatHolds, placeOfLeast } from '../numeric-search'
import { isContinuous, type Steps } from '../steps'
import { couldPass, diameterRange, leastMassG, type DiameterRange } from './bounds'
import { LEAST_BODY_COILS, coilsOfLength, coilsOfRate, exactBodyCoils, fewestBodyCoils, fillExtension, mostBodyCoils } from './geometry'
import { LEAST_WIDTH, searchStepped, springOf, type ExtensionGoal } from './stepped-search'
import type { ExtensionTravel } from './travel'

/**
 * Springs of the wire for the goal; every one passes every stop check. Continuous, the best of the wire, of equals the one met
 * first; in steps with the goal `every`, all there are.
 */
export function searchExtensionWire(model: ExtensionModel, state: ExtensionState, travel: ExtensionTravel, goal: ExtensionGoal, steps: Steps): WireSpring[] {
  const range = diameterRange(model, state, travel)
  if (!range) return []
  if (!isContinuous(steps)) return searchStepped(model, state, travel, goal, steps, range)
  const D = travel.kind === 'rate-and-length' ? searchRateAndLength(model, state, travel, goal, range) : searchDiameters(model, state, travel, goal, range)
  if (Number.isNaN(D)) return []
  return [springOf(fillExtension(model, state, travel, D, exactBodyCoils(model, travel, D)))]
}

/*
 * Where the request fixes rate or free length the mean diameter D is the only unknown: it gives the coils, these the other of
 * the two, and the initial tension follows from one load. One load alone leaves D and the coils. At a given D its tension
 * F - R (L - L0) rises with the coils, since R and L - L0 fall; so do free length and mass; so of each D the spring of fewest
 * coils, three or those that leave a tension of nought, passes if any does, and is the lightest. The passing D may
 * lie in several ranges and the mass have several valleys, so D is halved again and again under bounds (bounds.ts).
 */
function searchDiameters(model: ExtensionModel, state: ExtensionState, travel: ExtensionTravel, goal: ExtensionGoal, { low, high }: DiameterRange): number {
  const byStress = goal === 'stress'
  const { point } = minimiseBounded({
    low: [low], high: [high],
    bound: ([a = 0], [b = 0]) => {
      const fewest = fewestBodyCoils(model, travel, b)
      if (!couldPass(model, travel, a, b, fewest, mostBodyCoils(model, travel, a))) return Infinity
      // At the one greatest load the stress rises with D.
      return byStress ? a : leastMassG(model, travel, a, b, fewest)
    },
    value: ([D = 0]) => {
      const n = exactBodyCoils(model, travel, D)
      if (!(n >= LEAST_BODY_COILS * (1 - 1e-9))) return Infinity
      if (!passesExtensionStopChecks(model, fillExtension(model, state, travel, D, n))) return Infinity
      return byStress ? D : extensionMassG(model, state)
    },
  }, { leastWidth: LEAST_WIDTH, anyPoint: goal === 'any' })
  return point?.[0] ?? Number.NaN
}

// Share of the coils within which rate and free length ask for the same number.
const ROOT = 1e-8

/*
 * Rate and free length without a load: the coils that the rate leaves less those that the length leaves,
 * G d^4/(8 R D^3) - G/E - (L0 - 2 H)/d + 1, is convex in D (a falling power and the hooks, which are linear), so it is nought at
 * two diameters at the most, one on either side of its valley. Both are tried.
 */
function searchRateAndLength(model: ExtensionModel, state: ExtensionState, travel: ExtensionTravel, goal: ExtensionGoal, { low, high }: DiameterRange): number {
  const tooMany = (D: number) => coilsOfRate(model, D, travel.rateNPerMm) - coilsOfLength(model, D, travel.freeLengthMm)
  const valley = placeOfLeast(tooMany, low, high)
  if (tooMany(valley) > 0) return Number.NaN
  let best = Number.NaN
  let least = Infinity
  for (const D of [leastThatHolds(x => tooMany(x) <= 0, low, valley), greatestThatHolds(x => tooMany(x) <= 0, valley, high)]) {
    const n = exactBodyCoils(model, travel, D)
    // At an end of the range the difference need not be nought.
    if (!(tooMany(D) >= -ROOT * (n + D / model.wireDiameterMm))) continue
    if (!passesExtensionStopChecks(model, fillExtension(model, state, travel, D, n))) continue
    const value = goal === 'stress' ? initialStressMpa(model, state) : extensionMassG(model, state)
    if (value < least) {
      least = value
      best = D
    }
  }
  return best
}
