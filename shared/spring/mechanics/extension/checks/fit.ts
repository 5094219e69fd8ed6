import { knownToleranceMm, makeBoreCheck, makeLengthCheck, makeRodCheck } from '../../checks/fit'
import { bodyLengthMm } from '../hooks'
import type { ExtensionModel } from '../model'
import type { ExtensionState } from '../state'
import type { ExtensionCheck } from './check'

/** Body and hooks are as wide as each other. */
export const boreCheck: ExtensionCheck = makeBoreCheck({
  sizeMm: (model: ExtensionModel, state: ExtensionState) => state.meanDiameterMm + model.wireDiameterMm + knownToleranceMm(model, state),
  how: () => '', what: 'The outside diameter of body and hooks reaches',
})

export const rodCheck: ExtensionCheck = makeRodCheck({
  sizeMm: (model: ExtensionModel, state: ExtensionState) => state.meanDiameterMm - model.wireDiameterMm - knownToleranceMm(model, state),
  how: () => '', what: 'The inside diameter can be as small as',
})

export const freeLengthCheck: ExtensionCheck = makeLengthCheck('free-length', 'maxFreeLengthMm', 'The free length inside the hooks is', (_: ExtensionModel, state: ExtensionState) => state.freeLengthMm)

export const solidLengthCheck: ExtensionCheck = makeLengthCheck('solid-length', 'maxSolidLengthMm', 'The closed body is', (model: ExtensionModel, state: ExtensionState) => bodyLengthMm(state.bodyCoils, model.wireDiameterMm))
