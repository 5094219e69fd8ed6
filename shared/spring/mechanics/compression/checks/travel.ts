import { figure } from '../../figure'
import type { CompressionState } from '../state'
import { exceeds, fallsShort, finishCheck } from '../../checks/check'
import type { CompressionCheck } from './check'

const greatestLengthMm = (state: CompressionState) => (Number.isNaN(state.longestLengthMm) ? state.shortestLengthMm : state.longestLengthMm)

/** Points in order, within the free length and above solid; the free length above solid. */
export const orderCheck: CompressionCheck = {
  code: 'order',
  applies: () => true,
  stops: (_, state) =>
    !state.ordered
    || !exceeds(state.freeLengthMm, state.solidLengthMm)
    || exceeds(greatestLengthMm(state), state.freeLengthMm)
    || fallsShort(state.shortestLengthMm, state.solidLengthMm),
  describe: (model, state) => {
    const L0 = figure(state.freeLengthMm)
    const Lc = figure(state.solidLengthMm)
    let stop = ''
    let value = state.shortestLengthMm
    let limit = state.solidLengthMm
    if (!exceeds(state.freeLengthMm, state.solidLengthMm)) {
      stop = `The free length (${L0} mm) is no longer than the solid length (${Lc} mm): there is no travel.`
      value = state.freeLengthMm
    } else if (exceeds(greatestLengthMm(state), state.freeLengthMm)) {
      stop = `A working length of ${figure(greatestLengthMm(state))} mm is longer than the free length (${L0} mm).`
      value = greatestLengthMm(state)
      limit = state.freeLengthMm
    } else if (fallsShort(state.shortestLengthMm, state.solidLengthMm)) {
      stop = `A working length of ${figure(state.shortestLengthMm)} mm is under the solid length (${Lc} mm): the coils meet first.`
    } else if (!state.ordered) {
      stop = 'The points are not in order: each must be shorter, and so more heavily loaded, than the one before.'
    }
    return finishCheck('order', { stop: stop !== '', caution: false }, value, limit, {
      stop,
      caution: '',
      pass: 'The points are in order, between the free and the solid length.',
    })
  },
}

const CAUTION_MARGIN = 1.05

/** Shortest working length against solid length and least gaps. */
export const clearanceCheck: CompressionCheck = {
  code: 'clearance',
  applies: (_, state) => !Number.isNaN(state.shortestLengthMm),
  stops: (_, state) => fallsShort(state.shortestLengthMm, state.solidLengthMm + state.minimumClearanceMm),
  describe: (model, state) => {
    const least = state.solidLengthMm + state.minimumClearanceMm
    const L = figure(state.shortestLengthMm)
    const basis = `solid length ${figure(state.solidLengthMm)} mm and least gaps ${figure(state.minimumClearanceMm)} mm (EN 13906-1, ${model.dynamic ? 'dynamic duty, 1.5 times the static gaps' : 'static duty'})`
    return finishCheck(
      'clearance',
      { stop: clearanceCheck.stops(model, state), caution: state.shortestLengthMm < CAUTION_MARGIN * least },
      state.shortestLengthMm,
      least,
      {
        stop: `The shortest working length (${L} mm) is under ${figure(least)} mm: ${basis}.`,
        caution: `The shortest working length (${L} mm) is within 5 % of ${figure(least)} mm: ${basis}.`,
        pass: `The shortest working length (${L} mm) clears ${figure(least)} mm: ${basis}.`,
      },
    )
  },
}
