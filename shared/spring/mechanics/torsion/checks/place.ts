import { withRelaxation } from '../../checks/place'
import { comparedBendingMpa, greatestMomentNmm } from '../state'
import type { TorsionCheck } from './check'

export const temperatureCheck: TorsionCheck = withRelaxation((model, state) => comparedBendingMpa(model, state, greatestMomentNmm(state)) / model.allowableStressMpa)
