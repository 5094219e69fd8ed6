import { exceeds, fallsShort, finishCheck } from '../../checks/check'
import { figure } from '../../figure'
import { meanDiameterToleranceMm } from '../../tolerances/mean-diameter'
import type { TorsionModel } from '../model'
import { angleOrZero, bodyLengthAtMm, meanDiameterAtMm, type TorsionState } from '../state'
import type { TorsionCheck } from './check'

const CLEARANCE_CAUTION = 0.02

const tolerance = (model: TorsionModel, state: TorsionState) => meanDiameterToleranceMm(state.meanDiameterMm, state.springIndex, model.grade)
const known = (value: number) => (Number.isNaN(value) ? 0 : value)

/** Greatest outside diameter, mm: free, or opened where the load does so, with the tolerance where one is published. */
function greatestOuterDiameterMm(model: TorsionModel, state: TorsionState): number {
  return Math.max(state.meanDiameterMm, meanDiameterAtMm(model, state, angleOrZero(state))) + model.wireDiameterMm + known(tolerance(model, state))
}

/** Least inside diameter, mm: wound down at the greatest angle, less the tolerance where one is published. */
export function leastInnerDiameterMm(model: TorsionModel, state: TorsionState): number {
  return Math.min(state.meanDiameterMm, meanDiameterAtMm(model, state, angleOrZero(state))) - model.wireDiameterMm - known(tolerance(model, state))
}

function toleranceWords(model: TorsionModel, state: TorsionState): string {
  const plusMinus = tolerance(model, state)
  return Number.isNaN(plusMinus) ? 'no diameter tolerance is published for this size' : `diameter tolerance ${figure(plusMinus)} mm (EN 15800 grade ${model.grade})`
}

export const boreCheck: TorsionCheck = {
  code: 'bore',
  applies: model => !Number.isNaN(model.boreMm),
  stops: (model, state) => exceeds(greatestOuterDiameterMm(model, state), model.boreMm),
  describe: (model, state) => {
    const outside = greatestOuterDiameterMm(model, state)
    const bore = model.boreMm
    const says = `The outside diameter of the coils reaches ${figure(outside)} mm (${model.loadOpens ? 'opened by the load, ' : ''}${toleranceWords(model, state)})`
    return finishCheck('bore', { stop: boreCheck.stops(model, state), caution: bore - outside < CLEARANCE_CAUTION * bore || Number.isNaN(tolerance(model, state)) }, outside, bore, {
      stop: `${says} and does not go into the bore of ${figure(bore)} mm.`,
      caution: `${says}: little room in the bore of ${figure(bore)} mm.`,
      pass: `${says} and goes into the bore of ${figure(bore)} mm.`,
    })
  },
}

export const rodCheck: TorsionCheck = {
  code: 'rod',
  applies: model => !Number.isNaN(model.rodMm),
  stops: (model, state) => fallsShort(leastInnerDiameterMm(model, state), model.rodMm),
  describe: (model, state) => {
    const inside = leastInnerDiameterMm(model, state)
    const rod = model.rodMm
    const says = `The inside diameter comes down to ${figure(inside)} mm (${model.loadOpens ? '' : 'wound down, D Nb/(Nb + turns); '}${toleranceWords(model, state)})`
    return finishCheck('rod', { stop: rodCheck.stops(model, state), caution: inside - rod < CLEARANCE_CAUTION * rod || Number.isNaN(tolerance(model, state)) }, inside, rod, {
      stop: `${says} and grips the rod of ${figure(rod)} mm.`,
      caution: `${says}: little room over the rod of ${figure(rod)} mm.`,
      pass: `${says} and clears the rod of ${figure(rod)} mm.`,
    })
  },
}

export const freeLengthCheck: TorsionCheck = {
  code: 'free-length',
  applies: model => !Number.isNaN(model.maxFreeLengthMm),
  stops: (model, state) => exceeds(bodyLengthAtMm(model, state, angleOrZero(state)), model.maxFreeLengthMm),
  describe: (model, state) => {
    const length = bodyLengthAtMm(model, state, angleOrZero(state))
    const says = `The body, wound up, is ${figure(length)} mm long; at most ${figure(model.maxFreeLengthMm)} mm is asked for.`
    return finishCheck('free-length', { stop: freeLengthCheck.stops(model, state), caution: false }, length, model.maxFreeLengthMm, { stop: says, caution: '', pass: says })
  },
}

export const solidLengthCheck: TorsionCheck = {
  code: 'solid-length',
  applies: model => !Number.isNaN(model.maxSolidLengthMm),
  stops: (model, state) => exceeds(bodyLengthAtMm(model, state, 0), model.maxSolidLengthMm),
  describe: (model, state) => {
    const length = bodyLengthAtMm(model, state, 0)
    const says = `The closed body is ${figure(length)} mm long; at most ${figure(model.maxSolidLengthMm)} mm is asked for.`
    return finishCheck('solid-length', { stop: solidLengthCheck.stops(model, state), caution: false }, length, model.maxSolidLengthMm, { stop: says, caution: '', pass: says })
  },
}
