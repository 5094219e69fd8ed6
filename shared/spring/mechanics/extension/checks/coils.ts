import { fallsShort, finishCheck } from '../../checks/check'
import { figure } from '../../figure'
import type { ExtensionCheck } from './check'

// Common practice, no source: fewer body coils do not hold the hooks apart.
const LEAST_BODY_COILS = 3
const EASY_BODY_COILS = 4

export const coilsCheck: ExtensionCheck = {
  code: 'coils',
  applies: () => true,
  stops: (_, state) => fallsShort(state.bodyCoils, LEAST_BODY_COILS),
  describe: (model, state) => {
    const n = figure(state.bodyCoils)
    return finishCheck(
      'coils',
      { stop: coilsCheck.stops(model, state), caution: fallsShort(state.bodyCoils, EASY_BODY_COILS) },
      state.bodyCoils,
      LEAST_BODY_COILS,
      {
        stop: `${n} coils in the body: at least ${LEAST_BODY_COILS} are needed (common practice).`,
        caution: `${n} coils in the body: under ${EASY_BODY_COILS} the hooks make the rate uncertain (common practice).`,
        pass: `${n} coils in the body, at least ${EASY_BODY_COILS} (common practice).`,
      },
    )
  },
}
