import { withRelaxation } from '../../checks/place'
import { bodyStressMpa, greatestExtensionForceN } from '../state'
import type { ExtensionCheck } from './check'

export const temperatureCheck: ExtensionCheck = withRelaxation((model, state) => bodyStressMpa(model, state, greatestExtensionForceN(state)) / model.allowableStressMpa)
