import { withRelaxation } from '../../checks/place'
import { comparedStressMpa, greatestForceN } from '../state'
import type { CompressionCheck } from './check'

export const temperatureCheck: CompressionCheck = withRelaxation((model, state) => comparedStressMpa(model, state, greatestForceN(state)) / model.allowableStressMpa)
