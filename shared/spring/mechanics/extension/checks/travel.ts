import { exceeds, fallsShort, finishCheck } from '../../checks/check'
import { figure } from '../../figure'
import { leastInitialStressMpa, greatestInitialStressMpa } from '../initial-tension'
import { extensionForceN, greatestExtensionForceN, initialStressMpa, type ExtensionState } from '../state'
import { hasPoint, type ExtensionCheck } from './check'

const leastWorkingLengthMm = (state: ExtensionState) => (Number.isNaN(state.shortestLengthMm) ? state.longestLengthMm : state.shortestLengthMm)
// Rounding of a few parts in a thousand million must not call a spring at its free length shorter than free.
const slackMm = (state: ExtensionState) => 1e-9 * state.freeLengthMm

/** Points in order, at or beyond the free length; hooks that have a length. */
export const orderCheck: ExtensionCheck = {
  code: 'order',
  applies: () => true,
  stops: (_, state) =>
    !state.ordered
    || !(state.hookLengthMm > 0)
    || leastWorkingLengthMm(state) < state.freeLengthMm - slackMm(state),
  describe: (model, state) => {
    const L0 = figure(state.freeLengthMm)
    const least = leastWorkingLengthMm(state)
    let stop = ''
    let value = least
    let limit = state.freeLengthMm
    if (!(state.hookLengthMm > 0)) {
      value = state.freeLengthMm
      limit = state.freeLengthMm - 2 * state.hookLengthMm
      stop = `The free length inside the hooks (${L0} mm) leaves no room for hooks beside a body of ${figure(limit)} mm.`
    } else if (least < state.freeLengthMm - slackMm(state)) {
      stop = `A working length of ${figure(least)} mm is under the free length (${L0} mm): the load there (${figure(extensionForceN(state, least))} N) is below the initial tension of ${figure(state.initialTensionN)} N and does not open the coils.`
    } else if (!state.ordered) {
      stop = 'The points are not in order: each must be longer, and so more heavily loaded, than the one before.'
    }
    return finishCheck('order', { stop: stop !== '', caution: false }, value, limit, {
      stop, caution: '', pass: hasPoint(state) ? 'The points are in order and beyond the free length.' : 'The hooks have room beside the body.',
    })
  },
}

/** Initial tension against what winding gives at this index. */
export const initialTensionCheck: ExtensionCheck = {
  code: 'initial-tension',
  applies: () => true,
  stops: (model, state) => state.initialTensionN < -1e-9 * greatestOrOne(state)
    || exceeds(initialStressMpa(model, state), greatestInitialStressMpa(state.springIndex)),
  describe: (model, state) => {
    const stress = initialStressMpa(model, state)
    const most = greatestInitialStressMpa(state.springIndex)
    const least = leastInitialStressMpa(state.springIndex)
    const range = `${figure(least)} to ${figure(most)} MPa at index ${figure(state.springIndex)} (Shigley)`
    const says = `The initial tension of ${figure(state.initialTensionN)} N is a stress of ${figure(stress)} MPa; sensible are ${range}`
    const isNegative = state.initialTensionN < 0
    return finishCheck(
      'initial-tension',
      { stop: initialTensionCheck.stops(model, state), caution: fallsShort(stress, least) },
      stress,
      stress < least ? least : most,
      {
        stop: isNegative ? `The initial tension comes out below nought (${figure(state.initialTensionN)} N): no closed coil can do that.` : `${says}: it cannot be wound so tight.`,
        caution: `${says}: so little is hard to hold, and the coils may stand open.`,
        pass: `${says}.`,
      },
    )
  },
}

// The scale against which a negative tension is mere rounding.
function greatestOrOne(state: ExtensionState): number {
  const greatest = greatestExtensionForceN(state)
  return Number.isNaN(greatest) ? 1 : Math.abs(greatest)
}
