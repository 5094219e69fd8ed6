import { hookLengthMm, hookWireMm } from '../../mechanics/extension/hooks'
import { greatestInitialStressMpa } from '../../mechanics/extension/initial-tension'
import type { ExtensionModel } from '../../mechanics/extension/model'
import { temperatureCheck } from '../../mechanics/checks/place'
import { wireRangeCheck } from '../../mechanics/checks/wire'
import { boreCheck } from '../../mechanics/extension/checks/fit'
import { fatigueCheck } from '../../mechanics/extension/checks/life'
import { hookBendCheck, hookBendingCheck, hookTorsionCheck, stressWorkingCheck } from '../../mechanics/extension/checks/stress'
import type { ExtensionCheck } from '../../mechanics/extension/checks/check'
import { fillExtensionState, type ExtensionState } from '../../mechanics/extension/state'
import { shearStressMpa } from '../../mechanics/stress'
import { meanDiameterToleranceMm } from '../../mechanics/tolerances/mean-diameter'
import { wireMassG } from '../../mechanics/wire-length'
import { LEAST_BODY_COILS, stiffness, usualFreeLengthMm, type ExtensionTravel } from './geometry'

const SLACK = 1e-9

/*
 * Checks of the greatest load alone rise with the mean diameter: body and hooks at a given load (K(C) C rises for an index
 * above 3.3, for all the factors used), the life with them, and the outside diameter with its stepped tolerance. Wire, heat
 * and bend radii that are given do not change with it.
 */
const RISING_CHECKS: readonly ExtensionCheck[] = [wireRangeCheck, temperatureCheck, hookBendCheck, stressWorkingCheck, hookBendingCheck, hookTorsionCheck, fatigueCheck, boreCheck]

/** False where diameter D is too large for the greatest load or the bore, whatever the coils. The greatest load is put on the state as its tension. */
export function carriesAt(model: ExtensionModel, state: ExtensionState, travel: ExtensionTravel, greatestN: number, meanDiameterMm: number): boolean {
  const longest = state.longestLengthMm
  const shortest = state.shortestLengthMm
  fillExtensionState(state, model, meanDiameterMm, LEAST_BODY_COILS, LEAST_BODY_COILS + model.hookCoils, longest, greatestN)
  // The life between two loads needs the least of them: both lie on a line through the greatest.
  if (!Number.isNaN(shortest)) {
    const least = travel.points[0]?.forceN ?? 0
    state.rateNPerMm = (greatestN - least) / (longest - shortest)
  }
  for (const check of RISING_CHECKS) {
    if (check.applies(model, state) && check.stops(model, state)) return false
  }
  return true
}

/** What lies between two mean diameters and two counts of body coils. */
export interface ExtensionBox {
  readonly a: number
  readonly b: number
  readonly fewest: number
  readonly most: number
}

/**
 * False where no spring of the box passes. Free length lies between that of (a, fewest) and (b, most), the rate between that
 * of (b, most) and (a, fewest), and the initial tension F - R (L - L0) between what these leave.
 */
export function couldPass(model: ExtensionModel, travel: ExtensionTravel, { a, b, fewest, most }: ExtensionBox): boolean {
  if (most < LEAST_BODY_COILS * (1 - SLACK)) return false
  const d = model.wireDiameterMm
  const { lengthMm: L, forceN: F } = travel.anchor
  const shortest = travel.kind === 'free-length' ? travel.freeLengthMm : usualFreeLengthMm(model, a, Math.max(fewest, LEAST_BODY_COILS))
  const longest = travel.kind === 'free-length' ? travel.freeLengthMm : usualFreeLengthMm(model, b, most)
  if (shortest > L * (1 + SLACK)) return false
  if (shortest > model.maxFreeLengthMm * (1 + SLACK)) return false
  if ((Math.max(fewest, LEAST_BODY_COILS) + 1) * d > model.maxSolidLengthMm * (1 + SLACK)) return false
  if (!Number.isNaN(model.rodMm)) {
    // The tolerance rises in steps with D, so it is least at a.
    const shrink = meanDiameterToleranceMm(a, a / d, model.grade)
    if (b - d - (Number.isNaN(shrink) ? 0 : shrink) < model.rodMm * (1 - SLACK)) return false
  }
  const stiff = stiffness(model)
  const low = travel.kind === 'rate' ? travel.rateNPerMm : stiff / (b * b * b * (most + model.hookCoils))
  const high = travel.kind === 'rate' ? travel.rateNPerMm : stiff / (a * a * a * (Math.max(fewest, LEAST_BODY_COILS) + model.hookCoils))
  // The least pull-out between the shortest free length and the load, and the greatest.
  const most0 = F - low * Math.max(0, L - longest)
  const least0 = F - high * Math.max(0, L - shortest)
  if (most0 < -SLACK * F) return false
  return shearStressMpa(Math.max(0, least0), a, d) <= greatestInitialStressMpa(a / d) * (1 + SLACK)
}

/** A mass below which no spring of the box lies, g: pi D Nb at its least, and the hooks at a. */
export function leastMassG(model: ExtensionModel, travel: ExtensionTravel, { a, b, fewest }: ExtensionBox): number {
  const d = model.wireDiameterMm
  const n = Math.max(fewest, LEAST_BODY_COILS)
  // With the rate fixed D Nb = k/D^2 - (G/E) D falls with D, so it is least at b; else it is at least a times the fewest.
  const bodyMm = travel.kind === 'rate'
    ? Math.max(a * LEAST_BODY_COILS, stiffness(model) / (b * b * travel.rateNPerMm) - model.hookCoils * b)
    : a * n
  return wireMassG(d, Math.PI * bodyMm + 2 * hookWireMm(model.hookForm, a, d, hookLengthMm(model.hookForm, a, d)), model.densityKgPerM3)
}
