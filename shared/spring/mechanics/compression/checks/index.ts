import { describeAll, passesAll } from '../../checks/check'
import { surroundingsCheck } from '../../checks/place'
import { indexCheck, methodCheck, wireRangeCheck } from '../../checks/wire'
import type { Check } from '../../types'
import type { CompressionModel } from '../model'
import type { CompressionState } from '../state'
import type { CompressionCheck } from './check'
import { boreCheck, freeLengthCheck, rodCheck, solidLengthCheck } from './fit'
import { impactCheck } from './impact'
import { fatigueCheck, peeningCheck } from './life'
import { temperatureCheck } from './place'
import { coilsCheck } from './proportion'
import { bucklingCheck, resonanceCheck } from './stability'
import { stressSolidCheck, stressWorkingCheck } from './stress'
import { tanglingCheck } from './tangling'
import { clearanceCheck, orderCheck } from './travel'

/** All checks of a compression spring, in the order they are shown. */
export const COMPRESSION_CHECKS: readonly CompressionCheck[] = [
  wireRangeCheck, indexCheck, coilsCheck, orderCheck, clearanceCheck, stressSolidCheck, stressWorkingCheck, fatigueCheck,
  boreCheck, rodCheck, bucklingCheck, solidLengthCheck, freeLengthCheck, temperatureCheck, resonanceCheck, impactCheck, peeningCheck,
  tanglingCheck, surroundingsCheck, methodCheck,
]

/** True where no check of severity stop fails: the constraint of sizing. */
export const passesStopChecks = (model: CompressionModel, state: CompressionState): boolean => passesAll(COMPRESSION_CHECKS, model, state)

/** Every check that applies, in words. */
export const describeChecks = (model: CompressionModel, state: CompressionState): Check[] => describeAll(COMPRESSION_CHECKS, model, state)
