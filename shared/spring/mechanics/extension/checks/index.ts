import { passesAll } from '../../checks/check'
import { surroundingsCheck } from '../../checks/place'
import { indexCheck, methodCheck, wireRangeCheck } from '../../checks/wire'
import type { ExtensionModel } from '../model'
import type { ExtensionState } from '../state'
import type { ExtensionCheck } from './check'
import { coilsCheck } from './coils'
import { boreCheck, freeLengthCheck, rodCheck, solidLengthCheck } from './fit'
import { fatigueCheck } from './life'
import { temperatureCheck } from './place'
import { hookBendCheck, hookBendingCheck, hookTorsionCheck, stressWorkingCheck } from './stress'
import { initialTensionCheck, orderCheck } from './travel'

/** All checks of an extension spring, in the order they are shown. */
export const EXTENSION_CHECKS: readonly ExtensionCheck[] = [
  wireRangeCheck, indexCheck, coilsCheck, orderCheck, initialTensionCheck, stressWorkingCheck, hookBendingCheck, hookTorsionCheck,
  hookBendCheck, fatigueCheck, boreCheck, rodCheck, freeLengthCheck, solidLengthCheck, temperatureCheck, surroundingsCheck, methodCheck,
]

/** True where no check of severity stop fails: the constraint of sizing. */
export const passesExtensionStopChecks = (model: ExtensionModel, state: ExtensionState): boolean => passesAll(EXTENSION_CHECKS, model, state)
