import { passesAll } from '../../checks/check'
import { surroundingsCheck } from '../../checks/place'
import { indexCheck, methodCheck, wireRangeCheck } from '../../checks/wire'
import type { TorsionModel } from '../model'
import type { TorsionState } from '../state'
import type { TorsionCheck } from './check'
import { boreCheck, freeLengthCheck, rodCheck, solidLengthCheck } from './fit'
import { temperatureCheck } from './place'
import { fatigueCheck, stressWorkingCheck } from './stress'
import { coilsCheck, orderCheck, windingCheck } from './travel'

/** All checks of a torsion spring, in the order they are shown. */
export const TORSION_CHECKS: readonly TorsionCheck[] = [
  wireRangeCheck, indexCheck, coilsCheck, orderCheck, stressWorkingCheck, fatigueCheck, boreCheck, rodCheck, freeLengthCheck, solidLengthCheck,
  temperatureCheck, windingCheck, surroundingsCheck, methodCheck,
]

/** True where no check of severity stop fails: the constraint of sizing. */
export const passesTorsionStopChecks = (model: TorsionModel, state: TorsionState): boolean => passesAll(TORSION_CHECKS, model, state)
