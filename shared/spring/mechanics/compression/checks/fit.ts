import { knownToleranceMm, makeBoreCheck, makeLengthCheck, makeRodCheck } from '../../checks/fit'
import type { CompressionModel } from '../model'
import { outerDiameterAtSolidMm, type CompressionState } from '../state'
import type { CompressionCheck } from './check'

/** Greatest outside diameter: grown when solid, with the diameter tolerance where one is published. */
export const greatestOuterDiameterMm = (model: CompressionModel, state: CompressionState): number => outerDiameterAtSolidMm(model, state) + knownToleranceMm(model, state)

/** Least inside diameter: free, less the diameter tolerance where one is published. */
export const leastInnerDiameterMm = (model: CompressionModel, state: CompressionState): number => state.meanDiameterMm - model.wireDiameterMm - knownToleranceMm(model, state)

export const boreCheck: CompressionCheck = makeBoreCheck({ sizeMm: greatestOuterDiameterMm, how: () => 'grown when solid (EN 13906-1), ', what: 'The outside diameter reaches' })

export const rodCheck: CompressionCheck = makeRodCheck({ sizeMm: leastInnerDiameterMm, how: () => '', what: 'The inside diameter can be as small as' })

export const solidLengthCheck: CompressionCheck = makeLengthCheck('solid-length', 'maxSolidLengthMm', 'The solid length is', (_: CompressionModel, state: CompressionState) => state.solidLengthMm)

export const freeLengthCheck: CompressionCheck = makeLengthCheck('free-length', 'maxFreeLengthMm', 'The free length is', (_: CompressionModel, state: CompressionState) => state.freeLengthMm)
