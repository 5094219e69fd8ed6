import { wireRangeCheck, indexCheck } from '../../mechanics/checks/wire'
import { temperatureCheck } from '../../mechanics/checks/place'
import { bucklingDeflection } from '../../mechanics/compression/buckling'
import type { CompressionCheck } from '../../mechanics/compression/checks/check'
import { boreCheck, freeLengthCheck, rodCheck, solidLengthCheck } from '../../mechanics/compression/checks/fit'
import { fatigueCheck } from '../../mechanics/compression/checks/life'
import { coilsCheck } from '../../mechanics/compression/checks/proportion'
import { bucklingCheck } from '../../mechanics/compression/checks/stability'
import { stressSolidCheck, stressWorkingCheck } from '../../mechanics/compression/checks/stress'
import { clearanceCheck, orderCheck } from '../../mechanics/compression/checks/travel'
import { growthAtSolidMm, growthPitchMm } from '../../mechanics/compression/diameter-growth'
import { totalCoilsFor } from '../../mechanics/compression/end-geometry'
import type { CompressionModel } from '../../mechanics/compression/model'
import { fillState, stateMassG, type CompressionState } from '../../mechanics/compression/state'
import { shearStressMpa } from '../../mechanics/stress'
import { MOST_MEAN_DIAMETER_MM, meanDiameterToleranceMm } from '../../mechanics/tolerances/mean-diameter'
import { greatestThatHolds, leastThatHolds } from '../numeric-search'
import { LEAST_INDEX, MOST_INDEX } from '../steps'
import { LEAST_ACTIVE_COILS, allHold } from './search-state'
import type { FreeRateTravel } from './travel'

/*
 * One load F at one length L leaves rate and free length open: L0 = L + F/R, R = k/(D^3 n) with k = G d^4/8.
 *
 * At a given D every check is constant in the coils n, or fails only below some n, or only above it. With n the rate falls
 * and L0 rises in a straight line. Failing above: solid length, gaps, free length; buckling, since the deflection F/R rises
 * while the critical one falls with L0. Failing below: coils; the stress when solid, of F + R (L - Lc), since R and
 * L - Lc fall; the bore, since the pitch (L - x d)/n + F D^3/k falls. Mass is that of sqrt((pi D n)^2 + (n p)^2) and the end
 * coils, n p = L0 less a constant (L0 n/(n + 1) for open and ground ends), so it rises with n: of each D the fewest coils are
 * taken and only D is searched, with bounds.
 *
 * At given coils mass rises with D as well (the turn, and L0). So between diameters a and b no spring is lighter than one of
 * diameter a with the fewest coils that could pass anywhere between, and each check is judged there at its best place.
 */
const CONSTANT_CHECKS: readonly CompressionCheck[] = [wireRangeCheck, temperatureCheck, indexCheck, stressWorkingCheck, fatigueCheck, rodCheck]
const LEAST_COIL_CHECKS: readonly CompressionCheck[] = [coilsCheck, stressSolidCheck, boreCheck]
const MOST_COIL_CHECKS: readonly CompressionCheck[] = [orderCheck, clearanceCheck, solidLengthCheck, freeLengthCheck, bucklingCheck]
// At the least diameter these are easiest: stress and life go with k w, the gaps and L0 grow with D.
const EASIEST_SMALL: readonly CompressionCheck[] = [wireRangeCheck, temperatureCheck, stressWorkingCheck, fatigueCheck, orderCheck, clearanceCheck, solidLengthCheck, freeLengthCheck]
const SLACK = 1e-9

export interface CoilRange {
  readonly least: number
  readonly most: number
}

/** Fills the state with the spring of mean diameter D and n active coils that carries the load at its length. */
export function fillFreeRate(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, D: number, n: number): CompressionState {
  const d = model.wireDiameterMm
  const rate = (model.shearModulusMpa * d * d * d * d) / (8 * D * D * D * n)
  return fillState(state, model, D, n, totalCoilsFor(model.ends, n), travel.point.lengthMm + travel.point.forceN / rate)
}

/** More coils than this are solid at the length. */
export const mostCoils = (model: CompressionModel, travel: FreeRateTravel): number => travel.point.lengthMm / model.wireDiameterMm

/** Coils that pass every stop check at a mean diameter; null where none do. */
export function coilRange(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, D: number): CoilRange | null {
  const most = mostCoils(model, travel)
  if (!(LEAST_ACTIVE_COILS <= most)) return null
  fillFreeRate(model, state, travel, D, LEAST_ACTIVE_COILS)
  if (!allHold(CONSTANT_CHECKS, model, state) || !allHold(MOST_COIL_CHECKS, model, state)) return null
  const greatest = greatestThatHolds(n => allHold(MOST_COIL_CHECKS, model, fillFreeRate(model, state, travel, D, n)), LEAST_ACTIVE_COILS, most)
  const least = leastThatHolds(n => allHold(LEAST_COIL_CHECKS, model, fillFreeRate(model, state, travel, D, n)), LEAST_ACTIVE_COILS, greatest)
  return Number.isNaN(least) ? null : { least, most: greatest }
}

/** The least diameter tolerance anywhere between two diameters, mm: at the smaller, unless the table ends between. */
function leastToleranceMm(model: CompressionModel, a: number, b: number): number {
  const tolerance = b > MOST_MEAN_DIAMETER_MM ? Number.NaN : meanDiameterToleranceMm(a, a / model.wireDiameterMm, model.grade)
  return Number.isNaN(tolerance) ? 0 : tolerance
}

/** Fewest coils with which the checks that ask for coils could pass somewhere between two diameters; NaN where none do. */
export function fewestCoilsBetween(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, a: number, b: number): number {
  return leastThatHolds((n) => {
    fillFreeRate(model, state, travel, a, n)
    if (!Number.isNaN(model.boreMm) && leastOutsideMm(model, state, a, b) > model.boreMm * (1 + SLACK)) return false
    return !stressSolidCheck.applies(model, state) || !model.solidSafe || leastSolidStressMpa(model, state, travel, n, a, b) <= model.allowableStressMpa * (1 + SLACK)
  }, LEAST_ACTIVE_COILS, mostCoils(model, travel))
}

// Of the growth 0.1 (m^2 - 0.8 m d - 0.2 d^2)/D the upper part is least at a, where the pitch is, and the whole at b.
function leastOutsideMm(model: CompressionModel, state: CompressionState, a: number, b: number): number {
  const pitch = growthPitchMm(model.ends === 'closed', state.freeLengthMm, model.wireDiameterMm, state.activeCoils)
  return a + model.wireDiameterMm + growthAtSolidMm(b, model.wireDiameterMm, Math.max(pitch, 0)) + leastToleranceMm(model, a, b)
}

/** A stress when solid that no diameter between a and b falls under: factor at b, and the least of F D + K/D^2, which has one valley. */
function leastSolidStressMpa(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, n: number, a: number, b: number): number {
  const { lengthMm, forceN } = travel.point
  const d = model.wireDiameterMm
  const K = ((model.shearModulusMpa * d * d * d * d) / (8 * n)) * Math.max(0, lengthMm - state.solidLengthMm)
  const valley = Math.min(b, Math.max(a, Math.cbrt((2 * K) / forceN)))
  return model.staticLimit.stressFactor(b / d) * shearStressMpa(forceN + K / (valley * valley * valley), valley, d)
}

/** False where no spring of diameters between a and b and at least n coils passes. */
export function couldPass(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, n: number, a: number, b: number): boolean {
  fillFreeRate(model, state, travel, a, n)
  if (!allHold(EASIEST_SMALL, model, state)) return false
  // Slender springs bow: thickest at b, shortest and least pressed at a.
  if (!model.guided) {
    const critical = bucklingDeflection(state.freeLengthMm, b, model.seating, model.moduli)
    if (state.freeLengthMm - travel.point.lengthMm > critical * (1 + SLACK)) return false
  }
  return Number.isNaN(model.rodMm) || b - model.wireDiameterMm - leastToleranceMm(model, a, b) >= model.rodMm * (1 - SLACK)
}

/** A mass below which no spring of diameters between a and b lies, g; Infinity where none passes. */
export function massBoundG(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, a: number, b: number): number {
  // Two coils first: most ranges that give nothing are turned away by them.
  if (!couldPass(model, state, travel, LEAST_ACTIVE_COILS, a, b)) return Infinity
  const n = fewestCoilsBetween(model, state, travel, a, b)
  if (Number.isNaN(n) || !couldPass(model, state, travel, n, a, b)) return Infinity
  return stateMassG(model, fillFreeRate(model, state, travel, a, n))
}

/** Mean diameters outside which no spring of the wire passes: what is easiest for two coils at the smallest fails only above some diameter. */
export function possibleDiameters(model: CompressionModel, state: CompressionState, travel: FreeRateTravel): { low: number, high: number } | null {
  const d = model.wireDiameterMm
  const low = Math.max(LEAST_INDEX * d, Number.isNaN(model.rodMm) ? 0 : model.rodMm + d)
  const to = Math.min(MOST_INDEX * d, Number.isNaN(model.boreMm) ? Infinity : model.boreMm - d)
  if (!(low <= to) || !(LEAST_ACTIVE_COILS <= mostCoils(model, travel))) return null
  const high = greatestThatHolds(D => allHold(EASIEST_SMALL, model, fillFreeRate(model, state, travel, D, LEAST_ACTIVE_COILS)), low, to)
  return Number.isNaN(high) ? null : { low, high }
}

/** A mass below which no spring of the wire lies, g. */
export function leastMassFreeRateG(model: CompressionModel, state: CompressionState, travel: FreeRateTravel): number {
  const range = possibleDiameters(model, state, travel)
  return range ? massBoundG(model, state, travel, range.low, range.high) : Infinity
}
