import { figure } from '../figure'
import type { WireModel } from '../wire-model'
import { exceeds, fallsShort, finishCheck, type SpringCheck } from './check'

const always = () => true

export const wireRangeCheck: SpringCheck<WireModel, unknown> = {
  code: 'wire-range',
  applies: always,
  stops: model => model.wireProblem !== null,
  describe: (model) => {
    const { min, max } = model.material.strength.rangeMm
    const d = model.wireDiameterMm
    const basis = `${model.material.standard} data cover ${min} to ${max} mm`
    return finishCheck(
      'wire-range',
      { stop: model.wireProblem !== null, caution: model.context.stocked === false },
      d,
      d < min ? min : max,
      {
        stop: model.wireProblem ?? '',
        caution: `Wire of ${d} mm is covered (${basis}) but not in stock: it must be bought.`,
        pass: `Wire of ${d} mm is covered: ${basis}.`,
      },
    )
  },
}

// Range of the European quality table (EN 15800); the cautions are common practice, no source.
const INDEX = { least: 4, most: 20, easyLeast: 5, easyMost: 15 } as const

export const indexCheck: SpringCheck<WireModel, { readonly springIndex: number }> = {
  code: 'index',
  applies: always,
  stops: (_, state) => fallsShort(state.springIndex, INDEX.least) || exceeds(state.springIndex, INDEX.most),
  describe: (model, state) => {
    const w = state.springIndex
    const low = w < (INDEX.least + INDEX.most) / 2
    const says = `The index D/d is ${figure(w)}`
    return finishCheck(
      'index',
      { stop: indexCheck.stops(model, state), caution: w < INDEX.easyLeast || w > INDEX.easyMost },
      w,
      low ? INDEX.least : INDEX.most,
      {
        stop: `${says}: cold coiling by EN 15800 needs ${INDEX.least} to ${INDEX.most}.`,
        caution: `${says}: ${low ? 'tight to coil' : 'loose, it tangles and its diameter spreads'}; ${INDEX.easyLeast} to ${INDEX.easyMost} is easier (common practice).`,
        pass: `${says}, within ${INDEX.easyLeast} to ${INDEX.easyMost} (EN 15800 allows ${INDEX.least} to ${INDEX.most}).`,
      },
    )
  },
}

/**
 * Limits and strengths from one set: EN 13906 states its limits with the least strengths of EN 10270 steel wire, while A/d^m of the inch-system
 * wires is of the level of a mean, and copper alloys are no steel. Shown only where the two are mixed.
 */
export const methodCheck: SpringCheck<WireModel, unknown> = {
  code: 'method',
  applies: ({ method, material, isStrengthGiven }) => method === 'en13906' && !material.standard.startsWith('EN') && (!isStrengthGiven || material.family === 'copper-alloy'),
  stops: () => false,
  describe: ({ material }) => finishCheck('method', { stop: false, caution: true }, Number.NaN, Number.NaN, {
    stop: '',
    caution: `The limits of EN 13906 are stated with the least strengths of EN 10270 steel wire and are used here with ${material.standard}: the method of published fractions (Shigley) has the limits that go with it.`,
    pass: '',
  }, 'caution'),
}
