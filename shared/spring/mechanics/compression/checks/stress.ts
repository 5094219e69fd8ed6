import { figure } from '../../figure'
import { comparedStressMpa, greatestForceN } from '../state'
import { exceeds, finishCheck } from '../../checks/check'
import type { CompressionCheck } from './check'

const SOLID_CAUTION = 0.95
const WORKING_CAUTION = 0.9

/** Stress when solid against the static limit. */
export const stressSolidCheck: CompressionCheck = {
  code: 'stress-solid',
  applies: model => !Number.isNaN(model.allowableStressMpa),
  stops: (model, state) =>
    model.solidSafe && exceeds(comparedStressMpa(model, state, state.solidForceN), model.allowableStressMpa),
  describe: (model, state) => {
    const stress = comparedStressMpa(model, state, state.solidForceN)
    const limit = model.allowableStressMpa
    const says = `Stress when solid is ${figure(stress)} MPa, limit ${figure(limit)} MPa: ${model.staticLimit.basis}`
    const over = exceeds(stress, limit)
    // EN 13906-1, 10.3: the stress at solid is checked for changing load too, with resonance in mind.
    const surge = model.dynamic ? ' EN 13906-1 asks for it under changing load too, since surge may close the coils.' : ''
    return finishCheck(
      'stress-solid',
      { stop: over && model.solidSafe, caution: over || stress > SOLID_CAUTION * limit },
      stress,
      limit,
      {
        stop: `${says}. It would take a set if pressed solid.${surge}`,
        caution: over
          ? `${says}. It would take a set if pressed solid; the request says that it cannot happen.${surge}`
          : `${says}. Over 95 % of it.${surge}`,
        pass: `${says}.`,
      },
    )
  },
}

/** Stress at the greatest working load against the static limit. */
export const stressWorkingCheck: CompressionCheck = {
  code: 'stress-working',
  applies: (model, state) => !Number.isNaN(model.allowableStressMpa) && !Number.isNaN(state.shortestLengthMm),
  stops: (model, state) => exceeds(comparedStressMpa(model, state, greatestForceN(state)), model.allowableStressMpa),
  describe: (model, state) => {
    const stress = comparedStressMpa(model, state, greatestForceN(state))
    const limit = model.allowableStressMpa
    const says = `Stress at the greatest working load is ${figure(stress)} MPa, limit ${figure(limit)} MPa: ${model.staticLimit.basis}`
    return finishCheck(
      'stress-working',
      { stop: exceeds(stress, limit), caution: stress > WORKING_CAUTION * limit },
      stress,
      limit,
      { stop: `${says}.`, caution: `${says}. Over 90 % of it.`, pass: `${says}.` },
    )
  },
}
