import { figure } from '../../figure'
import type { CompressionModel } from '../model'
import { outerDiameterAtSolidMm, type CompressionState } from '../state'
import { meanDiameterToleranceMm } from '../../tolerances/mean-diameter'
import { exceeds, fallsShort, finishCheck } from '../../checks/check'
import type { CompressionCheck } from './check'

const CLEARANCE_CAUTION = 0.02

function tolerance(model: CompressionModel, state: CompressionState): number {
  return meanDiameterToleranceMm(state.meanDiameterMm, state.springIndex, model.grade)
}

/** Greatest outside diameter: grown when solid, with the diameter tolerance where one is published. */
export function greatestOuterDiameterMm(model: CompressionModel, state: CompressionState): number {
  const plus = tolerance(model, state)
  return outerDiameterAtSolidMm(model, state) + (Number.isNaN(plus) ? 0 : plus)
}

/** Least inside diameter: free, less the diameter tolerance where one is published. */
export function leastInnerDiameterMm(model: CompressionModel, state: CompressionState): number {
  const minus = tolerance(model, state)
  return state.meanDiameterMm - model.wireDiameterMm - (Number.isNaN(minus) ? 0 : minus)
}

function toleranceWords(model: CompressionModel, state: CompressionState): string {
  const plusMinus = tolerance(model, state)
  return Number.isNaN(plusMinus)
    ? 'no diameter tolerance is published for this size'
    : `diameter tolerance ${figure(plusMinus)} mm (EN 15800 grade ${model.grade})`
}

export const boreCheck: CompressionCheck = {
  code: 'bore',
  applies: model => !Number.isNaN(model.boreMm),
  stops: (model, state) => exceeds(greatestOuterDiameterMm(model, state), model.boreMm),
  describe: (model, state) => {
    const outside = greatestOuterDiameterMm(model, state)
    const bore = model.boreMm
    const basis = `grown when solid (EN 13906-1), ${toleranceWords(model, state)}`
    const says = `The outside diameter reaches ${figure(outside)} mm (${basis})`
    return finishCheck(
      'bore',
      { stop: boreCheck.stops(model, state), caution: bore - outside < CLEARANCE_CAUTION * bore || Number.isNaN(tolerance(model, state)) },
      outside,
      bore,
      {
        stop: `${says} and does not go into the bore of ${figure(bore)} mm.`,
        caution: `${says}: little room in the bore of ${figure(bore)} mm.`,
        pass: `${says} and goes into the bore of ${figure(bore)} mm.`,
      },
    )
  },
}

export const rodCheck: CompressionCheck = {
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
      inside,
      rod,
      {
        stop: `${says} and does not go over the rod of ${figure(rod)} mm.`,
        caution: `${says}: little room over the rod of ${figure(rod)} mm.`,
        pass: `${says} and goes over the rod of ${figure(rod)} mm.`,
      },
    )
  },
}

export const solidLengthCheck: CompressionCheck = {
  code: 'solid-length',
  applies: model => !Number.isNaN(model.maxSolidLengthMm),
  stops: (model, state) => exceeds(state.solidLengthMm, model.maxSolidLengthMm),
  describe: (model, state) => {
    const says = `The solid length is ${figure(state.solidLengthMm)} mm; at most ${figure(model.maxSolidLengthMm)} mm is asked for`
    return finishCheck(
      'solid-length',
      { stop: solidLengthCheck.stops(model, state), caution: false },
      state.solidLengthMm,
      model.maxSolidLengthMm,
      { stop: `${says}.`, caution: '', pass: `${says}.` },
    )
  },
}

export const freeLengthCheck: CompressionCheck = {
  code: 'free-length',
  applies: model => !Number.isNaN(model.maxFreeLengthMm),
  stops: (model, state) => exceeds(state.freeLengthMm, model.maxFreeLengthMm),
  describe: (model, state) => {
    const says = `The free length is ${figure(state.freeLengthMm)} mm; at most ${figure(model.maxFreeLengthMm)} mm is asked for`
    return finishCheck(
      'free-length',
      { stop: freeLengthCheck.stops(model, state), caution: false },
      state.freeLengthMm,
      model.maxFreeLengthMm,
      { stop: `${says}.`, caution: '', pass: `${says}.` },
    )
  },
}
