import { knownToleranceMm, makeBoreCheck, makeLengthCheck, makeRodCheck } from '../../checks/fit'
import type { TorsionModel } from '../model'
import { angleOrZero, bodyLengthAtMm, meanDiameterAtMm, type TorsionState } from '../state'
import type { TorsionCheck } from './check'

/** Mean diameter at the greatest angle, mm. */
const turnedMm = (model: TorsionModel, state: TorsionState) => meanDiameterAtMm(model, state, angleOrZero(state))

/** Outside: free, or opened where the load does so. */
export const boreCheck: TorsionCheck = makeBoreCheck({
  sizeMm: (model: TorsionModel, state: TorsionState) => Math.max(state.meanDiameterMm, turnedMm(model, state)) + model.wireDiameterMm + knownToleranceMm(model, state),
  how: model => (model.loadOpens ? 'opened by the load, ' : ''), what: 'The outside diameter of the coils reaches',
})

/** Inside: wound down at the greatest angle. */
export const rodCheck: TorsionCheck = makeRodCheck({
  sizeMm: (model: TorsionModel, state: TorsionState) => Math.min(state.meanDiameterMm, turnedMm(model, state)) - model.wireDiameterMm - knownToleranceMm(model, state),
  how: model => (model.loadOpens ? '' : 'wound down, D Nb/(Nb + turns); '), what: 'The inside diameter comes down to',
})

export const freeLengthCheck: TorsionCheck = makeLengthCheck('free-length', 'maxFreeLengthMm', 'The body, wound up, is', (model: TorsionModel, state: TorsionState) => bodyLengthAtMm(model, state, angleOrZero(state)))

export const solidLengthCheck: TorsionCheck = makeLengthCheck('solid-length', 'maxSolidLengthMm', 'The closed body is', (model: TorsionModel, state: TorsionState) => bodyLengthAtMm(model, state, 0))
