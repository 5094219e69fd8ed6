import { exceeds, fallsShort, finishCheck } from '../../checks/check'
import { figure } from '../../figure'
import { meanDiameterToleranceMm } from '../../tolerances/mean-diameter'
import { bodyLengthMm } from '../hooks'
import type { ExtensionModel } from '../model'
import type { ExtensionState } from '../state'
import type { ExtensionCheck } from './check'

const CLEARANCE_CAUTION = 0.02

const tolerance = (model: ExtensionModel, state: ExtensionState) => meanDiameterToleranceMm(state.meanDiameterMm, state.springIndex, model.grade)
const known = (value: number) => (Number.isNaN(value) ? 0 : value)

/** Greatest outside diameter, body and hooks, with the tolerance where one is published. */
const greatestOuterDiameterMm = (model: ExtensionModel, state: ExtensionState) => state.meanDiameterMm + model.wireDiameterMm + known(tolerance(model, state))
/** Least inside diameter of the body. */
export const leastInnerDiameterMm = (model: ExtensionModel, state: ExtensionState): number => state.meanDiameterMm - model.wireDiameterMm - known(tolerance(model, state))

function toleranceWords(model: ExtensionModel, state: ExtensionState): string {
  const plusMinus = tolerance(model, state)
  return Number.isNaN(plusMinus) ? 'no diameter tolerance is published for this size' : `diameter tolerance ${figure(plusMinus)} mm (EN 15800 grade ${model.grade})`
}

export const boreCheck: ExtensionCheck = {
  code: 'bore',
  applies: model => !Number.isNaN(model.boreMm),
  stops: (model, state) => exceeds(greatestOuterDiameterMm(model, state), model.boreMm),
  describe: (model, state) => {
    const outside = greatestOuterDiameterMm(model, state)
    const bore = model.boreMm
    const says = `The outside diameter of body and hooks reaches ${figure(outside)} mm (${toleranceWords(model, state)})`
    return finishCheck(
      'bore',
      { stop: boreCheck.stops(model, state), caution: bore - outside < CLEARANCE_CAUTION * bore || Number.isNaN(tolerance(model, state)) },
      outside, bore,
      {
        stop: `${says} and does not go into the bore of ${figure(bore)} mm.`,
        caution: `${says}: little room in the bore of ${figure(bore)} mm.`,
        pass: `${says} and goes into the bore of ${figure(bore)} mm.`,
      },
    )
  },
}

export const rodCheck: ExtensionCheck = {
  code: 'rod',
  applies: model => !Number.isNaN(model.rodMm),
  stops: (model, state) => fallsShort(leastInnerDiameterMm(model, state), model.rodMm),
  describe: (model, state) => {
    const inside = leastInnerDiameterMm(model, state)
    const rod = model.rodMm
    const says = `The inside diameter can be as small as ${figure(inside)} mm (${toleranceWords(model, state)})`
    return finishCheck(
      'rod',
      { stop: rodCheck.stops(model, state), caution: inside - rod < CLEARANCE_CAUTION * rod || Number.isNaN(tolerance(model, state)) },
      inside, rod,
      {
        stop: `${says} and does not go over the rod of ${figure(rod)} mm.`,
        caution: `${says}: little room over the rod of ${figure(rod)} mm.`,
        pass: `${says} and goes over the rod of ${figure(rod)} mm.`,
      },
    )
  },
}

export const freeLengthCheck: ExtensionCheck = {
  code: 'free-length',
  applies: model => !Number.isNaN(model.maxFreeLengthMm),
  stops: (model, state) => exceeds(state.freeLengthMm, model.maxFreeLengthMm),
  describe: (model, state) => {
    const says = `The free length inside the hooks is ${figure(state.freeLengthMm)} mm; at most ${figure(model.maxFreeLengthMm)} mm is asked for.`
    return finishCheck('free-length', { stop: freeLengthCheck.stops(model, state), caution: false }, state.freeLengthMm, model.maxFreeLengthMm, { stop: says, caution: '', pass: says })
  },
}

export const solidLengthCheck: ExtensionCheck = {
  code: 'solid-length',
  applies: model => !Number.isNaN(model.maxSolidLengthMm),
  stops: (model, state) => exceeds(bodyLengthMm(state.bodyCoils, model.wireDiameterMm), model.maxSolidLengthMm),
  describe: (model, state) => {
    const body = bodyLengthMm(state.bodyCoils, model.wireDiameterMm)
    const says = `The closed body is ${figure(body)} mm long; at most ${figure(model.maxSolidLengthMm)} mm is asked for.`
    return finishCheck('solid-length', { stop: solidLengthCheck.stops(model, state), caution: false }, body, model.maxSolidLengthMm, { stop: says, caution: '', pass: says })
  },
}
