import { passesStopChecks } from '../../mechanics/compression/checks'
import type { CompressionCheck } from '../../mechanics/compression/checks/check'
import { boreCheck, freeLengthCheck, rodCheck, solidLengthCheck } from '../../mechanics/compression/checks/fit'
import { temperatureCheck } from '../../mechanics/checks/place'
import { wireRangeCheck } from '../../mechanics/checks/wire'
import { fatigueCheck } from '../../mechanics/compression/checks/life'
import { coilsCheck } from '../../mechanics/compression/checks/proportion'
import { bucklingCheck } from '../../mechanics/compression/checks/stability'
import { stressSolidCheck, stressWorkingCheck } from '../../mechanics/compression/checks/stress'
import { clearanceCheck, orderCheck } from '../../mechanics/compression/checks/travel'
import type { CompressionModel } from '../../mechanics/compression/model'
import { rateNPerMm } from '../../mechanics/rate'
import { fillState, stateMassG, type CompressionState } from '../../mechanics/compression/state'
import { greatestThatHolds, leastThatHolds, placeOfLeast } from '../numeric-search'
import type { FreeRateTravel } from './travel'
import { LEAST_ACTIVE_COILS, LEAST_INDEX, MOST_INDEX, allHold, stepped, totalCoils, type Steps, type WireGoal, type WireSpring } from './wire-search'

/*
 * One load at one length leaves rate and free length open: L0 = L + F/R. At a given mean diameter the coils have a least
 * number (the stress when solid, the bore) and a greatest (room, length, buckling); mass grows with the coils, so the
 * least number is taken and the diameter is searched.
 */
const CONSTANT_CHECKS: readonly CompressionCheck[] = [wireRangeCheck, temperatureCheck, stressWorkingCheck, fatigueCheck, rodCheck]
const LEAST_COIL_CHECKS: readonly CompressionCheck[] = [coilsCheck, stressSolidCheck, boreCheck]
const MOST_COIL_CHECKS: readonly CompressionCheck[] = [orderCheck, clearanceCheck, solidLengthCheck, freeLengthCheck, bucklingCheck]

const GRID = 24
const STEPPED_NEIGHBOURS = 20

interface CoilRange {
  readonly least: number
  readonly most: number
}

function fillAt(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, D: number, n: number): CompressionState {
  const rate = rateNPerMm({
    shearModulusMpa: model.shearModulusMpa, wireDiameterMm: model.wireDiameterMm, meanDiameterMm: D, activeCoils: n,
  })
  return fillState(state, model, D, n, totalCoils(model, n), travel.point.lengthMm + travel.point.forceN / rate)
}

/** Coils that pass every stop check at a mean diameter; null where none do. */
function coilRange(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, D: number): CoilRange | null {
  let least = LEAST_ACTIVE_COILS
  let most = travel.point.lengthMm / model.wireDiameterMm
  if (!(least <= most)) return null
  fillAt(model, state, travel, D, least)
  if (!allHold(CONSTANT_CHECKS, model, state)) return null
  most = greatestThatHolds(n => allHold(MOST_COIL_CHECKS, model, fillAt(model, state, travel, D, n)), least, most)
  if (Number.isNaN(most)) return null
  least = leastThatHolds(n => allHold(LEAST_COIL_CHECKS, model, fillAt(model, state, travel, D, n)), least, most)
  return Number.isNaN(least) ? null : { least, most }
}

/** Springs of the wire that serve the goal when only one load is asked for; every one passes every stop check. */
export function searchFreeRate(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, goal: WireGoal, steps: Steps): WireSpring[] {
  const d = model.wireDiameterMm
  const low = LEAST_INDEX * d
  const high = MOST_INDEX * d
  const massAt = (D: number) => {
    const range = coilRange(model, state, travel, D)
    return range ? stateMassG(model, fillAt(model, state, travel, D, range.least)) : Infinity
  }
  const grid = Array.from({ length: GRID + 1 }, (_, i) => low * (high / low) ** (i / GRID))
  const masses = grid.map(massAt)
  const isStepped = !Number.isNaN(steps.coilStep) || !Number.isNaN(steps.diameterStepMm)
  const places: number[] = []
  grid.forEach((D, i) => {
    const mass = masses[i] ?? Infinity
    if (!Number.isFinite(mass)) return
    const left = grid[i - 1] ?? D
    const right = grid[i + 1] ?? D
    const feasible = (x: number) => Number.isFinite(massAt(x))
    const from = Number.isFinite(masses[i - 1] ?? mass) ? left : leastThatHolds(feasible, left, D)
    const to = Number.isFinite(masses[i + 1] ?? mass) ? right : greatestThatHolds(feasible, D, right)
    const isFirst = !Number.isFinite(masses[i - 1] ?? Infinity)
    if (goal === 'stress') {
      if (isFirst) places.push(from)
    } else if (mass <= (masses[i - 1] ?? Infinity) && mass <= (masses[i + 1] ?? Infinity)) {
      places.push(placeOfLeast(massAt, from, to))
    }
    if (goal === 'spread' && !isStepped) places.push(D)
  })
  const springs = places.flatMap(D => (isStepped ? steppedNear(model, state, travel, D, steps) : springsAt(model, state, travel, D, goal)))
  return springs.sort((a, b) => a.meanDiameterMm - b.meanDiameterMm)
}

function springsAt(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, D: number, goal: WireGoal): WireSpring[] {
  const range = coilRange(model, state, travel, D)
  if (!range) return []
  const coils = goal === 'spread' ? [range.least, (range.least + range.most) / 2, range.most] : [range.least]
  return coils.flatMap(n => passing(model, state, travel, D, n))
}

function steppedNear(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, place: number, steps: Steps): WireSpring[] {
  const { coilStep, diameterStepMm } = steps
  const diameters = Number.isNaN(diameterStepMm)
    ? [place]
    : Array.from({ length: 2 * STEPPED_NEIGHBOURS + 1 }, (_, i) => stepped(Math.round(place / diameterStepMm) + i - STEPPED_NEIGHBOURS, diameterStepMm))
  return diameters.flatMap((D) => {
    if (D < LEAST_INDEX * model.wireDiameterMm || D > MOST_INDEX * model.wireDiameterMm) return []
    const range = coilRange(model, state, travel, D)
    if (!range) return []
    const n = Number.isNaN(coilStep) ? range.least : stepped(Math.ceil(range.least / coilStep - 1e-9), coilStep)
    return n <= range.most ? passing(model, state, travel, D, n) : []
  })
}

function passing(model: CompressionModel, state: CompressionState, travel: FreeRateTravel, D: number, n: number): WireSpring[] {
  fillAt(model, state, travel, D, n)
  if (!passesStopChecks(model, state)) return []
  return [{ meanDiameterMm: D, activeCoils: n, totalCoils: state.totalCoils, freeLengthMm: state.freeLengthMm }]
}
