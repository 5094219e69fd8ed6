import type { CompressionModel } from '../model'
import type { CompressionState } from '../state'
import type { Check } from '../../types'
import type { CompressionCheck } from './check'
import { boreCheck, freeLengthCheck, rodCheck, solidLengthCheck } from './fit'
import { fatigueCheck, peeningCheck, surroundingsCheck, temperatureCheck } from './life'
import { coilsCheck, indexCheck, wireRangeCheck } from './proportion'
import { bucklingCheck, resonanceCheck } from './stability'
import { stressSolidCheck, stressWorkingCheck } from './stress'
import { clearanceCheck, orderCheck } from './travel'

/** All checks of a compression spring, in the order they are shown. */
export const COMPRESSION_CHECKS: readonly CompressionCheck[] = [
  wireRangeCheck, indexCheck, coilsCheck, orderCheck, clearanceCheck, stressSolidCheck, stressWorkingCheck, fatigueCheck,
  boreCheck, rodCheck, bucklingCheck, solidLengthCheck, freeLengthCheck, temperatureCheck, resonanceCheck, peeningCheck,
  surroundingsCheck,
]

/** True where no check of severity stop fails: the constraint of sizing. */
export function passesStopChecks(model: CompressionModel, state: CompressionState): boolean {
  for (const check of COMPRESSION_CHECKS) {
    if (check.applies(model, state) && check.stops(model, state)) return false
  }
  return true
}

/** Every check that applies, in words. */
export function describeChecks(model: CompressionModel, state: CompressionState): Check[] {
  return COMPRESSION_CHECKS.filter(check => check.applies(model, state)).map(check => check.describe(model, state))
}
