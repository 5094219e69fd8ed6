import { fallsShort, finishCheck } from '../../checks/check'
import { figure } from '../../figure'
import type { CompressionCheck } from './check'

// EN 15800 needs at least 2 active coils; under 3 the end coils weigh too much (common practice, no source).
const LEAST_COILS = 2
const EASY_COILS = 3

export const coilsCheck: CompressionCheck = {
  code: 'coils',
  applies: () => true,
  stops: (_, state) => fallsShort(state.activeCoils, LEAST_COILS),
  describe: (model, state) => {
    const n = state.activeCoils
    return finishCheck(
      'coils',
      { stop: coilsCheck.stops(model, state), caution: fallsShort(n, EASY_COILS) },
      n,
      LEAST_COILS,
      {
        stop: `${figure(n)} active coils: EN 15800 needs at least ${LEAST_COILS}.`,
        caution: `${figure(n)} active coils: under ${EASY_COILS} the end coils make the rate uncertain (common practice).`,
        pass: `${figure(n)} active coils, at least ${EASY_COILS} (EN 15800 asks for ${LEAST_COILS}, common practice for ${EASY_COILS}).`,
      },
    )
  },
}
