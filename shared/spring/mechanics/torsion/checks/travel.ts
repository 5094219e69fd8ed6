import { fallsShort, finishCheck } from '../../checks/check'
import { figure } from '../../figure'
import type { TorsionModel } from '../model'
import type { TorsionState } from '../state'
import { hasPoint, type TorsionCheck } from './check'

const leastAngleDeg = (state: TorsionState) => (Number.isNaN(state.leastAngleDeg) ? state.greatestAngleDeg : state.leastAngleDeg)

/** Points in order and turned the way of the load; coils to turn. */
export const orderCheck: TorsionCheck = {
  code: 'order',
  applies: () => true,
  stops: (model, state) => !state.ordered || leastAngleDeg(state) < 0 || !(state.activeCoils > 0)
    || (model.loadOpens && hasPoint(state) && state.greatestAngleDeg / 360 >= state.activeCoils),
  describe: (model, state) => {
    const least = leastAngleDeg(state)
    let stop = ''
    if (!(state.activeCoils > 0)) stop = 'It has no coils that work.'
    else if (least < 0) stop = `A working angle of ${figure(least)} degrees lies before free: the spring turns one way only.`
    else if (!state.ordered) stop = 'The points are not in order: each must be turned further, and so need more moment, than the one before.'
    else if (orderCheck.stops(model, state)) stop = `Opened by ${figure(state.greatestAngleDeg)} degrees, no coil would be left.`
    return finishCheck('order', { stop: stop !== '', caution: false }, least, 0, {
      stop, caution: '', pass: hasPoint(state) ? 'The points are in order, turned from free.' : 'It can be turned.',
    })
  },
}

// Common practice, no source: fewer body coils do not guide themselves.
export const LEAST_BODY_COILS = 3
const EASY_BODY_COILS = 4

export const coilsCheck: TorsionCheck = {
  code: 'coils',
  applies: () => true,
  stops: (_, state) => fallsShort(state.bodyCoils, LEAST_BODY_COILS),
  describe: (model, state) => {
    const n = figure(state.bodyCoils)
    return finishCheck('coils', { stop: coilsCheck.stops(model, state), caution: fallsShort(state.bodyCoils, EASY_BODY_COILS) }, state.bodyCoils, LEAST_BODY_COILS, {
      stop: `${n} coils in the body: at least ${LEAST_BODY_COILS} are needed (common practice).`,
      caution: `${n} coils in the body: under ${EASY_BODY_COILS} the legs make the rate uncertain (common practice).`,
      pass: `${n} coils in the body, at least ${EASY_BODY_COILS} (common practice).`,
    })
  },
}

/** How the load must turn it, seen along the axis; from the geometry of a helix: a right-hand coil goes away clockwise. */
function turnWords({ hand, loadOpens }: TorsionModel): string {
  if (hand === null) return ''
  const clockwise = (hand === 'right') !== loadOpens
  return ` The coil is ${hand}-hand: seen from its fixed end, the other leg is turned ${clockwise ? 'clockwise' : 'anticlockwise'}.`
}

/** Which way the load turns it. */
export const windingCheck: TorsionCheck = {
  code: 'winding',
  applies: () => true,
  stops: () => false,
  describe: model => finishCheck('winding', { stop: false, caution: model.loadOpens }, Number.NaN, Number.NaN, {
    stop: '',
    caution: `The load opens the coil: a fifth less stress is allowed (a stockist's published practice); wind it the other way so that the load winds it up.${turnWords(model)}`,
    pass: `The load winds the coil up, as it should.${turnWords(model)}`,
  }, 'caution'),
}
